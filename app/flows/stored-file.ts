import { createHash } from "node:crypto";
import { Readable } from "node:stream";

const LONGEST_NAME = 120;

/** The bytes of a file as a Node stream, read once from its start. */
export const streamOf = (file: Blob): Readable => Readable.from(chunksOf(file));

async function* chunksOf(file: Blob): AsyncGenerator<Uint8Array> {
  const reader = file.stream().getReader();
  for (let read = await reader.read(); !read.done; read = await reader.read()) yield read.value;
}

/** SHA-256 of a file's bytes, in hex: the name it is kept under. */
export async function hashOf(file: Blob): Promise<string> {
  const hash = createHash("sha256");
  for await (const chunk of chunksOf(file)) hash.update(chunk);
  return hash.digest("hex");
}

/** The last part of whatever path a browser sent, without control characters; `unnamed` when nothing is left. */
export function plainName(fileName: string, unnamed: string): string {
  const last = fileName.split(/[/\\]/).at(-1) ?? "";
  return last.replace(/\p{C}/gu, "").trim().slice(-LONGEST_NAME) || unnamed;
}
