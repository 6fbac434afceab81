import { db } from "~/db/client.server";
import type { Part } from "~/domain/parts";
import type { PieceWithPart } from "~/models/pieces.server";
import { findRevision } from "~/models/revisions.server";
import { loadGeometry } from "./geometry-store.server";

/** The outlines of the parts that some pieces are copies of, by part row id, out of the revisions that froze them. */
export async function findPlacedParts(
  pieces: readonly Pick<PieceWithPart, "orderId" | "part">[],
): Promise<Map<string, Part>> {
  const revisions = new Map(pieces.map(({ orderId, part }) => [part.revisionId, orderId]));
  const found = new Map<string, Part>();
  for (const [revisionId, orderId] of revisions) {
    const revision = await findRevision(db, orderId, revisionId);
    const geometry = revision && (await loadGeometry(revision.geometryKey));
    for (const { part } of pieces) {
      if (part.revisionId !== revisionId || found.has(part.id)) continue;
      const file = geometry?.files.find(({ sha256 }) => sha256 === part.fileSha);
      const outline = file?.report.parts.find(({ id }) => id === part.letter);
      if (outline) found.set(part.id, outline);
    }
  }
  return found;
}
