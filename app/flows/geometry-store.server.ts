import { createHash } from "node:crypto";
import { gunzipSync, gzipSync } from "node:zlib";
import { canonicalJson } from "~/documents/canonical-json";
import type { GeometryDocument } from "~/documents/geometry";
import { storage } from "~/services/clients.server";

const objectKey = (geometryKey: string) => `geometry/${geometryKey}`;

export const sha256Of = (text: string): string => createHash("sha256").update(text).digest("hex");

export const isGeometryStored = (geometryKey: string): Promise<boolean> =>
  storage.exists(objectKey(geometryKey));

/** Keeps a document under the hash of its canonical JSON, and gives the hash. */
export async function storeGeometry(document: GeometryDocument): Promise<string> {
  const json = canonicalJson(document);
  const geometryKey = sha256Of(json);
  if (!(await isGeometryStored(geometryKey)))
    await storage.put(objectKey(geometryKey), gzipSync(json), "application/gzip");
  return geometryKey;
}

/** A kept document, that of a frozen revision, say. Undefined when there is none under the hash. */
export async function loadGeometry(geometryKey: string): Promise<GeometryDocument | undefined> {
  const zipped = await loadGeometryBytes(geometryKey);
  return zipped && JSON.parse(gunzipSync(zipped).toString("utf8"));
}

/** The same as it is kept: gzipped JSON. */
export const loadGeometryBytes = (geometryKey: string): Promise<Uint8Array | undefined> =>
  storage.get(objectKey(geometryKey));
