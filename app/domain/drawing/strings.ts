/** `\U+00E9` escapes of characters outside the file's code page (DXF Reference, group code value types). */
export const unescapeCharacters = (text: string): string =>
  text.includes("\\U+")
    ? text.replace(/\\U\+([0-9A-Fa-f]{4})/g, (_, hex: string) =>
        String.fromCharCode(Number.parseInt(hex, 16)),
      )
    : text;

const CONTROL_CODES: Readonly<Record<string, string>> = { d: "°", p: "±", c: "⌀", "%": "%" };

/** A TEXT string as read by a person: `%%d`, `%%p`, `%%c` and character numbers resolved, underlining dropped. */
export const plainText = (text: string): string =>
  unescapeCharacters(text)
    .replace(/%%(\d{3})/g, (_, code: string) => String.fromCharCode(Number(code)))
    .replace(/%%[uok]/gi, "")
    .replace(/%%([dpc%])/gi, (_, code: string) => CONTROL_CODES[code.toLowerCase()]);

/** An MTEXT string without its formatting: paragraphs become line breaks, stacked fractions `a/b`. */
export function plainParagraphs(text: string): string {
  const stripped = text
    .replace(/\\\\/g, "\u0000")
    .replace(/\\S([^;\\]*)[#^]([^;\\]*);/g, "$1/$2")
    .replace(/\\S([^;\\]*);/g, "$1")
    .replace(/\\[ACFHQTWacfpqtw][^;\\{}]*;/g, "")
    .replace(/\\[PXN]/g, "\n")
    .replace(/\\~/g, " ")
    .replace(/\\[LlOoKk]/g, "")
    .replace(/(?<!\\)[{}]/g, "")
    .replace(/\\([{}])/g, "$1");
  return plainText(stripped.replaceAll("\u0000", "\\")).trim();
}
