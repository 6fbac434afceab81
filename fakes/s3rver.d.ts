/** The part of s3rver 3.7.1 that the storage fake uses; the package ships no types. */
declare module "s3rver" {
  import type { IncomingMessage, ServerResponse } from "node:http";
  import type { Readable } from "node:stream";

  interface StoredObject {
    bucket: string;
    key: string;
    content: Readable | Buffer;
    metadata: Record<string, string>;
  }

  interface Stored {
    size: number;
    md5: string;
  }

  interface FilesystemStore {
    getResourcePath(bucket: string, key: string | undefined, resource: string): string;
    putMetadata(bucket: string, key: string, metadata: Record<string, string>, md5: string): Promise<void>;
    putObject(object: StoredObject): Promise<Stored>;
    putPart(bucket: string, uploadId: string, partNumber: string, content: Readable): Promise<Stored>;
  }

  interface S3rverOptions {
    silent: boolean;
    directory: string;
    vhostBuckets: boolean;
    configureBuckets: { name: string }[];
  }

  export default class S3rver {
    constructor(options: S3rverOptions);
    store: FilesystemStore;
    configureBuckets(): Promise<unknown>;
    callback(): (request: IncomingMessage, response: ServerResponse) => Promise<void>;
    on(event: "error", listener: (error: Error) => void): this;
    logger: { close(): void };
  }
}
