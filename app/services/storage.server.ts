/**
 * Object storage through the AWS SDK: any S3 endpoint, one bucket, keys chosen by the caller (by content hash).
 *
 * Checksums are sent only where the service requires them: the SDK's default frames stream bodies in a way
 * that some S3 endpoints store as part of the object.
 */
import { Readable, Transform } from "node:stream";
import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  NoSuchKey,
  NotFound,
  PutObjectCommand,
  S3Client,
  S3ServiceException,
} from "@aws-sdk/client-s3";
import { Upload } from "@aws-sdk/lib-storage";

export interface StorageConfig {
  /** Address of the S3 endpoint, e.g. `http://127.0.0.1:4701`. */
  endpoint: string;
  region: string;
  bucket: string;
  accessKeyId: string;
  secretAccessKey: string;
}

export type PutStreamResult = { ok: true; size: number } | { ok: false; reason: "too-large"; limit: number };

export interface StoredObject {
  body: Readable;
  contentType: string;
  /** Bytes. */
  size: number;
}

export interface Storage {
  /**
   * Streams a body of unknown length in parts of 5 MiB, two at a time. With `sizeLimit` (bytes) a longer body is
   * given up and leaves nothing behind. Rejects when the stream or the service fails; again nothing is left.
   */
  putStream(
    key: string,
    body: Readable,
    contentType: string,
    options?: { sizeLimit?: number; signal?: AbortSignal },
  ): Promise<PutStreamResult>;
  put(key: string, bytes: Uint8Array, contentType: string): Promise<void>;
  /** Undefined when there is no such object. The caller must read or destroy the body. */
  getStream(key: string): Promise<StoredObject | undefined>;
  get(key: string): Promise<Uint8Array | undefined>;
  exists(key: string): Promise<boolean>;
  /** Removing what is not there is no error. */
  remove(key: string): Promise<void>;
  /** Closes idle connections. */
  close(): void;
}

class TooLarge extends Error {}

/** A client for one bucket. */
export function createStorage(config: StorageConfig): Storage {
  const client = new S3Client({
    endpoint: config.endpoint,
    region: config.region,
    credentials: { accessKeyId: config.accessKeyId, secretAccessKey: config.secretAccessKey },
    forcePathStyle: true,
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
  });
  const at = (key: string) => ({ Bucket: config.bucket, Key: key });

  async function getStream(key: string): Promise<StoredObject | undefined> {
    try {
      const found = await client.send(new GetObjectCommand(at(key)));
      if (!(found.Body instanceof Readable)) throw new Error("The storage answered without a readable body.");
      return {
        body: found.Body,
        contentType: found.ContentType ?? "application/octet-stream",
        size: found.ContentLength ?? 0,
      };
    } catch (error) {
      if (isMissing(error)) return undefined;
      throw error;
    }
  }

  return {
    async putStream(key, body, contentType, options = {}) {
      const meter = meterOf(options.sizeLimit ?? Number.POSITIVE_INFINITY);
      const upload = new Upload({
        client,
        params: { ...at(key), Body: body.pipe(meter.stream), ContentType: contentType },
        partSize: 5 * 1024 * 1024,
        queueSize: 2,
      });
      const abort = () => meter.stream.destroy(new Error("The upload was given up."));
      body.once("error", (error) => meter.stream.destroy(error));
      body.once("close", () => {
        if (!body.readableEnded) meter.stream.destroy(new Error("The upload broke off before its end."));
      });
      options.signal?.addEventListener("abort", abort, { once: true });
      if (options.signal?.aborted) abort();
      try {
        await upload.done();
        return { ok: true, size: meter.size() };
      } catch (error) {
        body.destroy();
        if (error instanceof TooLarge)
          return { ok: false, reason: "too-large", limit: options.sizeLimit ?? 0 };
        throw error;
      } finally {
        options.signal?.removeEventListener("abort", abort);
      }
    },
    async put(key, bytes, contentType) {
      await client.send(new PutObjectCommand({ ...at(key), Body: bytes, ContentType: contentType }));
    },
    getStream,
    async get(key) {
      const found = await getStream(key);
      if (!found) return undefined;
      const chunks: Buffer[] = [];
      for await (const chunk of found.body) chunks.push(chunk as Buffer);
      return new Uint8Array(Buffer.concat(chunks));
    },
    async exists(key) {
      try {
        await client.send(new HeadObjectCommand(at(key)));
        return true;
      } catch (error) {
        if (isMissing(error)) return false;
        throw error;
      }
    },
    async remove(key) {
      await client.send(new DeleteObjectCommand(at(key)));
    },
    close: () => client.destroy(),
  };
}

/** Counts bytes on their way and fails past the limit. */
function meterOf(limit: number) {
  let size = 0;
  const stream = new Transform({
    transform(chunk: Buffer, _encoding, done) {
      size += chunk.length;
      if (size > limit) done(new TooLarge(`More than ${limit} bytes.`));
      else done(null, chunk);
    },
  });
  return { stream, size: () => size };
}

function isMissing(error: unknown): boolean {
  if (error instanceof NoSuchKey || error instanceof NotFound) return true;
  return (
    error instanceof S3ServiceException &&
    error.$metadata.httpStatusCode === 404 &&
    error.name !== "NoSuchBucket"
  );
}
