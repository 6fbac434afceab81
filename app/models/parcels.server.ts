import { eq, inArray } from "drizzle-orm";
import type { Executor } from "~/db/client.server";
import { labels, parcels } from "~/db/schema";

export type Parcel = typeof parcels.$inferSelect;
export type Label = typeof labels.$inferSelect;

/** Millimetres and kilograms, packing included. */
export type NewParcel = Pick<Parcel, "length" | "width" | "height" | "weight">;

/** An order's parcels with the labels bought for them, by number. */
export async function listParcels(
  executor: Executor,
  orderId: string,
): Promise<(Parcel & { readonly labels: readonly Label[] })[]> {
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
