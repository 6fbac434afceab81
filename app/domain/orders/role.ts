export const ROLES = ["builder", "operator", "clerk", "owner"] as const;
export type Role = (typeof ROLES)[number];
export const STAFF_ROLES = ["operator", "clerk", "owner"] as const satisfies readonly Role[];

/** Anything that is not a role exactly as spelled is no role. */
export const isRole = (value: unknown): value is Role => ROLES.some((role) => role === value);
