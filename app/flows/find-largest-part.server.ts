import { db } from "~/db/client.server";
import type { GeometryDocument } from "~/documents/geometry";
import type { Part } from "~/domain/parts";
import type { Order } from "~/models/orders.server";
import { findRevision } from "~/models/revisions.server";
import { findOrderParts } from "./find-order-parts.server";
import { loadGeometry } from "./geometry-store.server";

/** Lists show the same orders again and again; a frozen revision never changes. */
const FROZEN_KEPT = 500;
const frozen = new Map<string, Part | null>();

/** The part that stands for an order in a list: the largest of its drawings. Null while none is found. */
export async function findLargestPart(
  order: Pick<Order, "id" | "builderId" | "revisionId">,
): Promise<Part | null> {
  if (order.revisionId === null) {
    const { files } = await findOrderParts({ order });
    return largestOf(files.flatMap((file) => (file.state === "read" ? [file.geometry] : [])));
  }
  const known = frozen.get(order.revisionId);
  if (known !== undefined) return known;
  const revision = await findRevision(db, order.id, order.revisionId);
  const geometry = revision && (await loadGeometry(revision.geometryKey));
  const largest = geometry ? largestOf(geometry.files) : null;
  if (frozen.size >= FROZEN_KEPT) frozen.clear();
  frozen.set(order.revisionId, largest);
  return largest;
}

const largestOf = (files: GeometryDocument["files"]): Part | null =>
  files
    .flatMap(({ report }) => report.parts)
    .reduce<Part | null>(
      (largest, part) => (largest === null || part.grossArea > largest.grossArea ? part : largest),
      null,
    );
