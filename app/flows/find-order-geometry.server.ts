import { gunzipSync } from "node:zlib";
import { db } from "~/db/client.server";
import type { GeometryDocument } from "~/documents/geometry";
import { holdsFiles } from "~/models/drawing-files.server";
import { loadGeometryBytes } from "./geometry-store.server";

interface FindOrderGeometryOptions {
  readonly orderId: string;
  readonly geometryKey: string;
}

/**
 * A geometry document, as stored (gzipped JSON), for an order that holds or held every file it was found in: a hash
 * known from elsewhere opens nothing. Undefined otherwise.
 */
export async function findOrderGeometry(options: FindOrderGeometryOptions): Promise<Uint8Array | undefined> {
  const { orderId, geometryKey } = options;
  if (!/^[0-9a-f]{64}$/.test(geometryKey)) return undefined;
  const zipped = await loadGeometryBytes(geometryKey);
  if (!zipped) return undefined;
  const { files }: GeometryDocument = JSON.parse(gunzipSync(zipped).toString("utf8"));
  const held = await holdsFiles(
    db,
    orderId,
    files.map(({ sha256 }) => sha256),
  );
  return held ? zipped : undefined;
}
