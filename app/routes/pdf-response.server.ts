import type { PrintedFile } from "~/flows/printed-file";

/** A printed file, opened beside the page; 404 when there is nothing to print. */
export function pdfResponse(file: PrintedFile | undefined): Response {
  if (!file) throw new Response("There is nothing to print here yet.", { status: 404 });
  return new Response(file.bytes.slice().buffer, {
    headers: {
      "Content-Type": "application/pdf",
      "Content-Disposition": `inline; filename="${file.fileName.replace(/[^\w.-]/g, "_")}"`,
      "X-Content-Type-Options": "nosniff",
      "Cache-Control": "private, no-store",
    },
  });
}
