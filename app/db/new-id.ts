/** 128 random bits: an id in a URL cannot be guessed. */
export const newId = (): string => crypto.randomUUID().replaceAll("-", "");
