import { createHash } from "node:crypto";
import { Readable } from "node:stream";
import {
  GetBucketTaggingCommand,
  GetObjectCommand,
  ListMultipartUploadsCommand,
  S3Client,
} from "@aws-sdk/client-s3";
import { afterAll, describe, expect, it } from "vitest";
import { fakesForTests, serviceConfigs, takeUnexpected } from "../../support/fakes";

const running = fakesForTests();

/** Reproducible bytes without pattern: a chain of SHA-256 digests. */
function noise(length: number, seed: string): Buffer {
  const bytes = Buffer.alloc(length);
  let digest = createHash("sha256").update(seed).digest();
  for (let at = 0; at < length; at += digest.length) {
    digest.copy(bytes, at);
    digest = createHash("sha256").update(digest).digest();
  }
  return bytes;
}

function inChunks(bytes: Buffer, size: number): Readable {
  const chunks: Buffer[] = [];
  for (let at = 0; at < bytes.length; at += size) chunks.push(bytes.subarray(at, at + size));
  return Readable.from(chunks);
}

const sha256 = (bytes: Uint8Array) => createHash("sha256").update(bytes).digest("hex");

describe("object storage", () => {
  const clients: S3Client[] = [];
  afterAll(() => {
    for (const client of clients) client.destroy();
  });
  const sdk = () => {
    const { endpoint, region, accessKeyId, secretAccessKey } = serviceConfigs(running.fakes).storage;
    const client = new S3Client({
      endpoint,
      region,
      credentials: { accessKeyId, secretAccessKey },
      forcePathStyle: true,
    });
    clients.push(client);
    return client;
  };

  // 5 MiB is the part size of a multipart upload: below, at, and above it, and several parts with a rest.
  it.each([0, 1, 65_537, 5 * 1024 * 1024, 5 * 1024 * 1024 + 1, 17 * 1024 * 1024 + 13])(
    "keeps a stream of %i bytes byte for byte",
    async (length) => {
      const { storage } = running.services;
      const bytes = noise(length, `stream ${length}`);
      const key = `drawings/${sha256(bytes)}`;
      const put = await storage.putStream(key, inChunks(bytes, 60_000), "image/vnd.dxf");
      expect(put).toEqual({ ok: true, size: length });
      const back = await storage.get(key);
      expect(back?.length).toBe(length);
      expect(sha256(back ?? new Uint8Array())).toBe(sha256(bytes));
    },
  );

  it("keeps a buffer byte for byte, with its content type and size", async () => {
    const { storage } = running.services;
    const bytes = noise(300_000, "buffer");
    await storage.put("labels/one.pdf", bytes, "application/pdf");
    const found = await storage.getStream("labels/one.pdf");
    expect(found).toMatchObject({ contentType: "application/pdf", size: 300_000 });
    const chunks: Buffer[] = [];
    for await (const chunk of found?.body ?? []) chunks.push(chunk as Buffer);
    expect(sha256(Buffer.concat(chunks))).toBe(sha256(bytes));
  });

  it("tells what is there from what is not, and removes", async () => {
    const { storage } = running.services;
    expect(await storage.exists("drawings/none")).toBe(false);
    expect(await storage.get("drawings/none")).toBeUndefined();
    await storage.put("drawings/some", Buffer.from("0\nSECTION\n"), "image/vnd.dxf");
    expect(await storage.exists("drawings/some")).toBe(true);
    await storage.remove("drawings/some");
    expect(await storage.exists("drawings/some")).toBe(false);
    await expect(storage.remove("drawings/some")).resolves.toBeUndefined();
  });

  it.each([
    ["shorter than a part", 1_000_000, 999_999],
    ["of several parts", 12 * 1024 * 1024, 11 * 1024 * 1024],
  ])("gives up a stream over the limit, %s, and leaves nothing", async (_case, length, limit) => {
    const { storage } = running.services;
    const key = `drawings/too-large-${length}`;
    const put = await storage.putStream(key, inChunks(noise(length, key), 100_000), "image/vnd.dxf", {
      sizeLimit: limit,
    });
    expect(put).toEqual({ ok: false, reason: "too-large", limit });
    expect(await storage.exists(key)).toBe(false);
  });

  it("takes a stream of exactly the limit", async () => {
    const bytes = noise(1_000_000, "exact");
    const put = await running.services.storage.putStream(
      "drawings/exact",
      inChunks(bytes, 9_999),
      "image/vnd.dxf",
      {
        sizeLimit: 1_000_000,
      },
    );
    expect(put).toEqual({ ok: true, size: 1_000_000 });
  });

  it.each([
    ["fails", new Error("cable pulled"), "cable pulled"],
    ["breaks off", undefined, "broke off"],
  ])("leaves nothing when the source %s half way", async (_case, error, words) => {
    const { storage } = running.services;
    const bytes = noise(8 * 1024 * 1024, "broken");
    let at = 0;
    const source = new Readable({
      read() {
        if (at >= bytes.length) {
          this.destroy(error);
          return;
        }
        this.push(bytes.subarray(at, at + 65_536));
        at += 65_536;
      },
    });
    await expect(storage.putStream("drawings/broken", source, "image/vnd.dxf")).rejects.toThrow(words);
    expect(await storage.exists("drawings/broken")).toBe(false);
  });

  it("leaves nothing when the caller gives up", async () => {
    const { storage } = running.services;
    const giveUp = new AbortController();
    const source = new Readable({ read: () => undefined });
    source.push(noise(6 * 1024 * 1024, "given up"));
    const put = storage.putStream("drawings/given-up", source, "image/vnd.dxf", { signal: giveUp.signal });
    setTimeout(() => giveUp.abort(), 50);
    await expect(put).rejects.toThrow("given up");
    expect(await storage.exists("drawings/given-up")).toBe(false);
  });

  it("tries again when the service asks to slow down", async () => {
    running.fakes.storage.failNext(1);
    await running.services.storage.put("drawings/second-try", Buffer.from("x"), "image/vnd.dxf");
    expect(await running.services.storage.exists("drawings/second-try")).toBe(true);
  });

  it("refuses whoever has no credentials", async () => {
    const { url, bucket } = running.fakes.storage;
    await running.services.storage.put("drawings/private", Buffer.from("private"), "image/vnd.dxf");
    const answer = await fetch(`${url}/${bucket}/drawings/private`);
    expect(answer.status).toBe(403);
    expect(await answer.text()).not.toContain("private");
  });

  it("answers the plain SDK too, and with its own words for what is missing", async () => {
    await expect(
      sdk().send(new GetObjectCommand({ Bucket: running.fakes.storage.bucket, Key: "drawings/nowhere" })),
    ).rejects.toMatchObject({ name: "NoSuchKey" });
  });

  it("fails loudly at requests it does not know", async () => {
    const Bucket = running.fakes.storage.bucket;
    await expect(sdk().send(new GetBucketTaggingCommand({ Bucket }))).rejects.toMatchObject({
      name: "NotImplemented",
    });
    await expect(sdk().send(new ListMultipartUploadsCommand({ Bucket }))).rejects.toMatchObject({
      name: "NotImplemented",
    });
    const seen = takeUnexpected(running.fakes);
    expect(seen.length).toBeGreaterThanOrEqual(2);
    expect(seen.some(({ path }) => path.includes("tagging"))).toBe(true);
    expect(seen.some(({ path }) => path.includes("uploads"))).toBe(true);
  });
});
