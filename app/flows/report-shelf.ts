import type { PartsReport } from "~/domain/parts";

/** Bytes as stored, zipped, of all reports on the shelf; parsed they take some thirty times that. */
const ROOM = 6 * 1024 * 1024;

/**
 * Reports that were just used, parsed: a page of an order asks for the same one several times. A report never
 * changes under its key, so any process may keep its own shelf.
 */
export function createReportShelf(room = ROOM) {
  const kept = new Map<string, { readonly report: PartsReport; readonly bytes: number }>();
  let taken = 0;
  return {
    /** The report under a key, which then counts as the one used last. */
    take(key: string): PartsReport | undefined {
      const found = kept.get(key);
      if (!found) return undefined;
      kept.delete(key);
      kept.set(key, found);
      return found.report;
    },
    /** Puts a report on the shelf; those used longest ago make room for it. */
    put(key: string, report: PartsReport, bytes: number): void {
      if (bytes > room || kept.has(key)) return;
      kept.set(key, { report, bytes });
      taken += bytes;
      for (const [oldest, { bytes: freed }] of kept) {
        if (taken <= room) return;
        kept.delete(oldest);
        taken -= freed;
      }
    },
  };
}
