export const RATE_WINDOW_SECONDS = 60;

/** Requests in a window, by who calls. A page open in a few tabs asks more than a program should. */
export const API_RATES = { key: 120, session: 600, nobody: 120 } as const;
