import { z } from "zod";
import { addDays, instantAt } from "~/domain/scheduling";
import type { AuditSearch } from "~/models/audit-list.server";

const blank = (value: unknown) => (value === "" || value === null ? undefined : value);
const words = (most: number) => z.preprocess(blank, z.string().trim().max(most).optional().catch(undefined));
const day = z.preprocess(blank, z.iso.date().optional().catch(undefined));

export const auditFilterSchema = z.object({
  person: words(64),
  act: words(60),
  order: words(20),
  from: day,
  to: day,
  page: z.coerce.number().int().min(1).max(100_000).catch(1),
});
export type AuditFilter = z.infer<typeof auditFilterSchema>;

/** What the address asks for. */
export const auditFilterOf = (query: URLSearchParams): AuditFilter =>
  auditFilterSchema.parse(Object.fromEntries(query));

/** The same for the model: days become instants of the shop's zone, the last one whole. */
export const auditSearchOf = (
  { person, act, order, from, to, page }: AuditFilter,
  timeZone: string,
  size: number,
): AuditSearch => ({
  actor: person,
  act,
  reference: order?.toUpperCase(),
  from: from === undefined ? undefined : instantAt(from, "00:00", timeZone),
  before: to === undefined ? undefined : instantAt(addDays(to, 1), "00:00", timeZone),
  page,
  size,
});
