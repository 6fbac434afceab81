/** Length is what makes a password hard to guess; no other rule. The upper bound keeps hashing cheap. */
export const PASSWORD_MIN = 10;
export const PASSWORD_MAX = 128;
