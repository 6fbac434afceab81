import type { ThreadAttachment } from "./thread-data";

/** Files of a message: pictures small in place, everything as a download. */
export function AttachmentList({ attachments }: { readonly attachments: readonly ThreadAttachment[] }) {
  if (attachments.length === 0) return null;
  return (
    <ul className="flex flex-wrap items-end gap-x-4 gap-y-2">
      {attachments.map(({ id, fileName, contentType, size, href }) => (
        <li key={id} className="max-w-full min-w-0 text-small">
          <a
            href={href}
            download={fileName}
            className="block min-w-0 text-blue underline decoration-1 underline-offset-[0.2em] hover:decoration-2 pointer-coarse:min-h-11"
          >
            {contentType.startsWith("image/") && contentType !== "image/vnd.dxf" && (
              <img
                src={href}
                alt=""
                loading="lazy"
                className="mb-1 max-h-40 max-w-full rounded-sheet border border-line bg-grain"
              />
            )}
            <span className="break-all">{fileName}</span>
          </a>
          <span className="measure text-caption text-soft">{sizeInWords(size)}</span>
        </li>
      ))}
    </ul>
  );
}

/** `340 kB`, `1.2 MB`: thousands, as the IEC has kB and MB. */
export function sizeInWords(bytes: number): string {
  if (bytes < 1_000) return `${bytes} B`;
  if (bytes < 999_500) return `${Math.round(bytes / 1_000)} kB`;
  return `${(bytes / 1_000_000).toFixed(1)} MB`;
}
