import { and, eq, inArray } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { labels, parcels } from "~/db/schema";

export type Parcel = typeof parcels.$inferSelect;
export type Label = typeof labels.$inferSelect;

export type LabelledParcel = Parcel & { readonly labels: readonly Label[] };

/** Millimetres and kilograms, packing included. */
export type NewParcel = Pick<Parcel, "length" | "width" | "height" | "weight">;

/** An order's parcels with the labels bought for them, by number. */
export async function listParcels(executor: Executor, orderId: string): Promise<LabelledParcel[]> {
  const rows = await executor
    .select()
    .from(parcels)
    .where(eq(parcels.orderId, orderId))
    .orderBy(parcels.number);
  if (rows.length === 0) return [];
  const bought = await executor
    .select()
    .from(labels)
    .where(
      inArray(
        labels.parcelId,
        rows.map((row) => row.id),
      ),
    )
    .orderBy(labels.createdAt);
  return rows.map((row) => ({ ...row, labels: bought.filter((label) => label.parcelId === row.id) }));
}

/** Writes an order's parcels anew, numbered from 1. */
export async function replaceParcels(
  tx: Executor,
  { orderId, packedBy, packed }: { orderId: string; packedBy: string; packed: readonly NewParcel[] },
): Promise<Parcel[]> {
  await tx.delete(parcels).where(eq(parcels.orderId, orderId));
  if (packed.length === 0) return [];
  const at = new Date();
  return tx
    .insert(parcels)
    .values(
      packed.map((parcel, index) => ({ ...parcel, orderId, number: index + 1, packedBy, packedAt: at })),
    )
    .returning();
}

export async function markHandedOver(tx: Executor, orderId: string, at: Date | null): Promise<void> {
  await tx.update(parcels).set({ handedOverAt: at }).where(eq(parcels.orderId, orderId));
}

/** The label that stands on a parcel: bought and not void. */
export const standingLabel = ({ labels: bought }: LabelledParcel): Label | undefined =>
  bought.find(({ status }) => status === "bought");

/** Writes down a label; the same one of the carrier's once. */
export async function insertLabel(
  tx: Executor,
  label: Pick<
    typeof labels.$inferInsert,
    "parcelId" | "carrierLabelId" | "service" | "trackingNumber" | "price" | "boughtBy"
  >,
): Promise<void> {
  await tx
    .insert(labels)
    .values({ ...label, status: "bought" })
    .onConflictDoNothing({ target: labels.carrierLabelId });
}

/** False when it was void before. */
export async function markLabelVoid(tx: Executor, labelId: string, at: Date): Promise<boolean> {
  const changed = await tx
    .update(labels)
    .set({ status: "void", voidedAt: at })
    .where(and(eq(labels.id, labelId), eq(labels.status, "bought")))
    .returning({ id: labels.id });
  return changed.length === 1;
}
