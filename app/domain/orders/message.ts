/** What one message in an order's thread may hold: characters of text, files, bytes of one file. */
export const MESSAGE_LIMITS = { characters: 4_000, files: 5, fileBytes: 10 * 1024 * 1024 } as const;
