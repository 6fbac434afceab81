import { desc, eq, inArray, sql } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { findingAnswers, findings } from "~/db/schema";

export type StoredFinding = typeof findings.$inferSelect;
export type FindingAnswer = typeof findingAnswers.$inferSelect;
export type AnsweredFinding = StoredFinding & {
  /** The last one given: it is the one that counts. */
  readonly answer: FindingAnswer | null;
};

export async function insertFindings(
  tx: Executor,
  revisionId: string,
  found: readonly StoredFinding["content"][],
): Promise<StoredFinding[]> {
  if (found.length === 0) return [];
  return tx
    .insert(findings)
    .values(
      found.map((finding, position) => ({
        revisionId,
        position,
        severity: finding.severity,
        code: finding.code,
        content: finding,
      })),
    )
    .returning();
}

/** A revision's findings in order, each with the answer that counts. */
export async function listFindings(executor: Executor, revisionId: string): Promise<AnsweredFinding[]> {
  const rows = await executor
    .select()
    .from(findings)
    .where(eq(findings.revisionId, revisionId))
    .orderBy(findings.position);
  if (rows.length === 0) return [];
  const answers = await executor
    .select()
    .from(findingAnswers)
    .where(
      inArray(
        findingAnswers.findingId,
        rows.map((row) => row.id),
      ),
    )
    .orderBy(desc(findingAnswers.createdAt), sql`rowid desc`);
  return rows.map((row) => ({
    ...row,
    answer: answers.find((answer) => answer.findingId === row.id) ?? null,
  }));
}

export async function insertFindingAnswer(
  tx: Executor,
  answer: { findingId: string; answer: FindingAnswer["answer"]; note: string | null; answeredBy: string },
): Promise<void> {
  await tx.insert(findingAnswers).values(answer);
}
