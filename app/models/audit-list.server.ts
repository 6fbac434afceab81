import { and, desc, eq, gte, isNull, lt, type SQL, sql } from "drizzle-orm";
import { unionAll } from "drizzle-orm/sqlite-core";
import type { Executor } from "~/db/client.server";
import { auditEntries, orders, stageMoves, users } from "~/db/schema";

export interface AuditSearch {
  /** A person's id; `system` for what nobody pressed. */
  readonly actor?: string | undefined;
  readonly act?: string | undefined;
  /** An order's reference: KP-2047. */
  readonly reference?: string | undefined;
  readonly from?: Date | undefined;
  readonly before?: Date | undefined;
  /** From 1. */
  readonly page: number;
  readonly size: number;
}

export interface AuditRow {
  readonly id: string;
  readonly at: Date;
  readonly actorId: string | null;
  /** Null for the system, and for a person who is gone. */
  readonly actor: string | null;
  readonly role: string | null;
  readonly act: string;
  readonly subjectKind: string;
  readonly subjectId: string;
  /** Where the subject is an order. */
  readonly reference: string | null;
  readonly reason: string | null;
  readonly detail: Readonly<Record<string, unknown>>;
}

/** Moves of orders and acts on everything else, together, the newest first, one page of them. */
export async function pageOfAudit(
  executor: Executor,
  search: AuditSearch,
): Promise<{ readonly rows: AuditRow[]; readonly found: number }> {
  const both = unionAll(movesOf(executor, search), actsOf(executor, search)).as("audit");
  const rows = await executor
    .select()
    .from(both)
    .orderBy(desc(both.at), desc(both.id))
    .limit(search.size)
    .offset((search.page - 1) * search.size);
  const [counted] = await executor.select({ found: sql<number>`count(*)`.mapWith(Number) }).from(both);
  return {
    found: counted?.found ?? 0,
    rows: rows.map(({ at, detail, ...row }) => ({
      ...row,
      at: new Date(at),
      detail: JSON.parse(detail),
    })),
  };
}

const movesOf = (executor: Executor, search: AuditSearch) =>
  executor
    .select({
      id: sql<string>`${stageMoves.id}`.as("id"),
      at: sql<number>`${stageMoves.createdAt}`.as("at"),
      actorId: sql<string | null>`${stageMoves.actorId}`.as("actor_id"),
      actor: sql<string | null>`${users.name}`.as("actor"),
      role: sql<string | null>`${stageMoves.actorRole}`.as("role"),
      act: sql<string>`'order.' || ${stageMoves.act}`.as("act"),
      subjectKind: sql<string>`'order'`.as("subject_kind"),
      subjectId: sql<string>`${stageMoves.orderId}`.as("subject_id"),
      reference: sql<string | null>`${orders.reference}`.as("reference"),
      reason: sql<string | null>`${stageMoves.reason}`.as("reason"),
      detail:
        sql<string>`json_object('from', ${stageMoves.from}, 'to', ${stageMoves.to}, 'pieces', json_array_length(coalesce(${stageMoves.pieceIds}, '[]')))`.as(
          "detail",
        ),
    })
    .from(stageMoves)
    .innerJoin(orders, eq(orders.id, stageMoves.orderId))
    .leftJoin(users, eq(users.id, stageMoves.actorId))
    .where(
      and(
        byActor(stageMoves.actorId, search.actor),
        search.act ? sql`'order.' || ${stageMoves.act} = ${search.act}` : undefined,
        search.reference ? eq(orders.reference, search.reference) : undefined,
        search.from && gte(stageMoves.createdAt, search.from),
        search.before && lt(stageMoves.createdAt, search.before),
      ),
    );

const actsOf = (executor: Executor, search: AuditSearch) =>
  executor
    .select({
      id: sql<string>`${auditEntries.id}`.as("id"),
      at: sql<number>`${auditEntries.createdAt}`.as("at"),
      actorId: sql<string | null>`${auditEntries.actorId}`.as("actor_id"),
      actor: sql<string | null>`${users.name}`.as("actor"),
      role: sql<string | null>`null`.as("role"),
      act: sql<string>`${auditEntries.act}`.as("act"),
      subjectKind: sql<string>`${auditEntries.subjectKind}`.as("subject_kind"),
      subjectId: sql<string>`${auditEntries.subjectId}`.as("subject_id"),
      reference: sql<string | null>`${orders.reference}`.as("reference"),
      reason: sql<string | null>`null`.as("reason"),
      detail: sql<string>`${auditEntries.detail}`.as("detail"),
    })
    .from(auditEntries)
    .leftJoin(users, eq(users.id, auditEntries.actorId))
    .leftJoin(orders, and(eq(auditEntries.subjectKind, "order"), eq(orders.id, auditEntries.subjectId)))
    .where(
      and(
        byActor(auditEntries.actorId, search.actor),
        search.act ? eq(auditEntries.act, search.act) : undefined,
        search.reference ? eq(orders.reference, search.reference) : undefined,
        search.from && gte(auditEntries.createdAt, search.from),
        search.before && lt(auditEntries.createdAt, search.before),
      ),
    );

function byActor(
  column: typeof stageMoves.actorId | typeof auditEntries.actorId,
  actor: string | undefined,
): SQL | undefined {
  if (actor === undefined) return undefined;
  return actor === "system" ? isNull(column) : eq(column, actor);
}

/** Who did anything and what has been done: what the filters offer. */
export async function auditChoices(executor: Executor): Promise<{
  readonly people: readonly { readonly id: string; readonly name: string }[];
  readonly acts: readonly string[];
}> {
  const people = await executor
    .select({ id: users.id, name: users.name })
    .from(users)
    .where(
      sql`${users.id} in (select ${stageMoves.actorId} from ${stageMoves} union select ${auditEntries.actorId} from ${auditEntries})`,
    )
    .orderBy(users.name);
  const moved = await executor.selectDistinct({ act: stageMoves.act }).from(stageMoves);
  const done = await executor.selectDistinct({ act: auditEntries.act }).from(auditEntries);
  const acts = [...moved.map(({ act }) => `order.${act}`), ...done.map(({ act }) => act)];
  return { people, acts: [...new Set(acts)].toSorted() };
}
