import { Readable } from "node:stream";

interface Download {
  readonly fileName: string;
  readonly contentType: string;
  /** Bytes. */
  readonly size: number;
  readonly body: Readable;
}

/** What somebody uploaded, only ever as a download under its own content type, never run as a page of this site. */
export const downloadResponse = ({ fileName, contentType, size, body }: Download): Response =>
  new Response(Readable.toWeb(body) as ReadableStream<Uint8Array>, {
    headers: {
      "Content-Type": contentType,
      "Content-Length": String(size),
      "Content-Disposition": attachment(fileName),
      "X-Content-Type-Options": "nosniff",
      "Content-Security-Policy": "sandbox",
      "Cache-Control": "private, no-store",
    },
  });

/** RFC 6266: a plain name for old clients, the whole name percent-encoded beside it (RFC 8187). */
function attachment(fileName: string): string {
  const plain = fileName.replace(/[^\w .()-]/g, "_");
  const encoded = encodeURIComponent(fileName).replace(
    /['()*]/g,
    (letter) => `%${letter.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `attachment; filename="${plain}"; filename*=UTF-8''${encoded}`;
}
