/**
 * Object storage: s3rver behind the real AWS SDK, one bucket `kerfpost`, path-style addresses.
 *
 * Where it departs from the real service:
 * - The key pair is always S3RVER / S3RVER; a signature of version 4 is not checked, only its key's name.
 *   A request that carries no credentials at all is refused with 403 here, as by a private bucket.
 * - Listing, versions, access lists, encryption, life-cycle rules and notifications are missing or partial.
 * - Parts of a multipart upload may be smaller than 5 MiB.
 * - Writing is replaced: s3rver answers before its file is flushed, and a broken upload leaves a short object.
 *   Here an object appears whole or not at all, as in the real service. Aborting a multipart upload, which
 *   s3rver does not know, is answered here.
 */
import { createHash, randomUUID } from "node:crypto";
import { createWriteStream } from "node:fs";
import { mkdir, rename, rm, writeFile } from "node:fs/promises";
import type { IncomingMessage, ServerResponse } from "node:http";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { Readable, Transform } from "node:stream";
import { pipeline } from "node:stream/promises";
import S3rver from "s3rver";
import {
  type ListenOptions,
  listen,
  type RunningFake,
  send,
  sendJson,
  type Unexpected,
} from "./local-server";

export const STORAGE_BUCKET = "kerfpost";
export const STORAGE_ACCESS_KEY = "S3RVER";

export interface StorageFakeOptions extends ListenOptions {
  /** Where objects are kept; without it a fresh temporary directory that is removed on stop. */
  dataDirectory?: string | undefined;
}

export interface StorageFake extends RunningFake {
  bucket: string;
  region: string;
  accessKeyId: string;
  secretAccessKey: string;
  /** The next `count` requests are answered 503 SlowDown, which the SDK retries. */
  failNext(count: number): void;
}

/** Starts the storage fake. */
export async function startStorage(options: StorageFakeOptions): Promise<StorageFake> {
  const directory = options.dataDirectory ?? join(tmpdir(), `kerfpost-storage-${randomUUID()}`);
  await mkdir(directory, { recursive: true });
  const s3rver = new S3rver({
    silent: true,
    directory,
    vhostBuckets: false,
    configureBuckets: [{ name: STORAGE_BUCKET }],
  });
  s3rver.on("error", () => undefined);
  writeWholeObjects(s3rver);
  await s3rver.configureBuckets();

  const unexpected: Unexpected[] = [];
  let failures = 0;
  const answer = s3rver.callback();
  const handler = async (request: IncomingMessage, response: ServerResponse) => {
    const address = new URL(request.url ?? "/", "http://storage");
    const method = request.method ?? "GET";
    if (address.pathname === "/_fake/unexpected") return sendJson(response, 200, unexpected);
    if (!request.headers.authorization && !address.searchParams.has("X-Amz-Signature"))
      return sendError(response, 403, "AccessDenied", "Access Denied");
    if (failures > 0) {
      failures -= 1;
      request.resume();
      return sendError(response, 503, "SlowDown", "Please reduce your request rate.");
    }
    const uploadId = address.searchParams.get("uploadId");
    if (method === "DELETE" && uploadId) {
      await abortUpload(s3rver, address.pathname, uploadId);
      response.writeHead(204).end();
      return;
    }
    response.once("finish", () => {
      if (response.statusCode === 405 || response.statusCode === 501)
        unexpected.push({
          method,
          path: request.url ?? "/",
          why: `answered ${response.statusCode}: not known to the storage stand-in`,
        });
    });
    await answer(request, response);
  };
  const server = await listen(handler, options);
  return {
    url: server.url,
    port: server.port,
    bucket: STORAGE_BUCKET,
    region: "us-east-1",
    accessKeyId: STORAGE_ACCESS_KEY,
    secretAccessKey: STORAGE_ACCESS_KEY,
    unexpected,
    failNext(count) {
      failures = count;
    },
    async stop() {
      await server.stop();
      s3rver.logger.close();
      if (!options.dataDirectory) await rm(directory, { recursive: true, force: true });
    },
  };
}

/** Replaces s3rver's writing by: beside the target, flushed, then renamed. */
function writeWholeObjects(s3rver: S3rver) {
  const { store } = s3rver;
  store.putObject = async (object) => {
    const path = store.getResourcePath(object.bucket, object.key, "object");
    const content = Buffer.isBuffer(object.content) ? Readable.from([object.content]) : object.content;
    const stored = await writeWhole(path, content);
    await store.putMetadata(object.bucket, object.key, object.metadata, stored.md5);
    return stored;
  };
  store.putPart = async (bucket, uploadId, partNumber, content) => {
    const path = join(store.getResourcePath(bucket, undefined, "uploads"), uploadId, partNumber);
    const stored = await writeWhole(path, content);
    await writeFile(`${path}.md5`, stored.md5);
    return stored;
  };
}

async function writeWhole(path: string, content: Readable) {
  await mkdir(dirname(path), { recursive: true });
  const partial = `${path}.${randomUUID()}.partial`;
  const md5 = createHash("md5");
  let size = 0;
  const count = new Transform({
    transform(chunk: Buffer, _encoding, done) {
      md5.update(chunk);
      size += chunk.length;
      done(null, chunk);
    },
  });
  try {
    await pipeline(content, count, createWriteStream(partial));
    await rename(partial, path);
  } catch (error) {
    await rm(partial, { force: true });
    throw error;
  }
  return { size, md5: md5.digest("hex") };
}

async function abortUpload(s3rver: S3rver, pathname: string, uploadId: string) {
  const bucket = decodeURIComponent(pathname.split("/")[1] ?? "");
  if (bucket !== STORAGE_BUCKET || !/^[0-9a-f]{32}$/.test(uploadId)) return;
  await rm(join(s3rver.store.getResourcePath(bucket, undefined, "uploads"), uploadId), {
    recursive: true,
    force: true,
  });
}

function sendError(response: ServerResponse, status: number, code: string, message: string) {
  const body = `<?xml version="1.0" encoding="UTF-8"?>\n<Error><Code>${code}</Code><Message>${message}</Message></Error>`;
  send(response, status, "application/xml", body);
}
