const KILOBYTE = 1024;
const MEGABYTE = 1024 * KILOBYTE;

/** The size of a file: `842 B`, `12 kB`, `4.1 MB`. */
export const sizeInWords = (bytes: number): string =>
  bytes >= MEGABYTE
    ? `${(bytes / MEGABYTE).toFixed(1)} MB`
    : bytes >= KILOBYTE
      ? `${Math.round(bytes / KILOBYTE)} kB`
      : `${bytes} B`;
