import { attachmentKey, type KeptFile } from "~/models/attachments.server";
import { storage } from "~/services/clients.server";
import { attachmentType, SNIFFED_BYTES } from "./attachment-type";
import { hashOf, plainName, streamOf } from "./stored-file";
import { refuse, type Verdict } from "./verdict";

export interface KeepAttachmentOptions {
  readonly fileName: string;
  /** The whole file, its size checked while it arrived. */
  readonly file: Blob;
}

/** Keeps a file for a message by the hash of its bytes. The same bytes twice are one object. */
export async function keepAttachment(options: KeepAttachmentOptions): Promise<Verdict<{ kept: KeptFile }>> {
  const { file } = options;
  const fileName = plainName(options.fileName, "attachment");
  const type = attachmentType(new Uint8Array(await file.slice(0, SNIFFED_BYTES).arrayBuffer()));
  if (!type.ok) return refuse("invalid", `${fileName}: ${type.reason}`);
  const sha256 = await hashOf(file);
  const key = attachmentKey(sha256);
  try {
    if (!(await storage.exists(key))) {
      const stored = await storage.putStream(key, streamOf(file), type.contentType);
      if (!stored.ok || stored.size !== file.size) throw new Error(`The storage kept ${key} not as it is.`);
    }
  } catch (error) {
    console.error("An attachment could not be stored:", error);
    return refuse("unavailable", "The file could not be stored just now. Send it again in a while.");
  }
  return { ok: true, kept: { fileName, contentType: type.contentType, size: file.size, sha256 } };
}
