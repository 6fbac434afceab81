import { and, desc, eq } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { auditEntries } from "~/db/schema";

export type AuditEntry = typeof auditEntries.$inferSelect;

interface NewEntry {
  /** Null when the system itself acted. */
  actorId: string | null;
  act: string;
  subject: { kind: string; id: string };
  detail?: Record<string, unknown>;
}

/** Writes down what was done to something other than an order's stage, in the transaction that does it. */
export async function recordAct(executor: Executor, entry: NewEntry): Promise<void> {
  const { actorId, act, subject, detail = {} } = entry;
  await executor
    .insert(auditEntries)
    .values({ actorId, act, subjectKind: subject.kind, subjectId: subject.id, detail });
}

/** What was done to one thing, newest first. */
export async function listActs(
  executor: Executor,
  subject: { kind: string; id: string },
  limit = 100,
): Promise<AuditEntry[]> {
  return executor
    .select()
    .from(auditEntries)
    .where(and(eq(auditEntries.subjectKind, subject.kind), eq(auditEntries.subjectId, subject.id)))
    .orderBy(desc(auditEntries.createdAt))
    .limit(limit);
}
