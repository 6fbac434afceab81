import { sizeInWords } from "./size-in-words";

/** What may be uploaded, said before it is tried. */
export const limitWords = ({
  maxBytes,
  maxFiles,
}: {
  readonly maxBytes: number;
  readonly maxFiles: number;
}) =>
  `DXF, text form, up to ${sizeInWords(maxBytes).replace(".0 ", " ")} a file, ${maxFiles} files at a time.`;
