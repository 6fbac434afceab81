/** TextDecoder labels of the `$DWGCODEPAGE` names met in drawings (DXF Reference, HEADER variables). */
const ENCODING_OF_CODE_PAGE: Readonly<Record<string, string>> = {
  ansi_874: "windows-874",
  ansi_932: "shift_jis",
  ansi_936: "gbk",
  ansi_949: "euc-kr",
  ansi_950: "big5",
  ansi_1250: "windows-1250",
  ansi_1251: "windows-1251",
  ansi_1252: "windows-1252",
  ansi_1253: "windows-1253",
  ansi_1254: "windows-1254",
  ansi_1255: "windows-1255",
  ansi_1256: "windows-1256",
  ansi_1257: "windows-1257",
  ansi_1258: "windows-1258",
  dos866: "ibm866",
  "utf-8": "utf-8",
};

/** From this version on text is UTF-8 (AC1021 is the 2007 format). */
const FIRST_UTF8_VERSION = "AC1021";

/** The header stands within this many bytes: code page and version are looked for here only. */
const HEADER_REACH = 1 << 16;

export interface DecodedText {
  readonly text: string;
  readonly notes: readonly string[];
}

function isAscii(bytes: Uint8Array): boolean {
  for (let i = 0; i < bytes.length; i++) if (bytes[i] >= 0x80) return false;
  return true;
}

function decodeStrictly(bytes: Uint8Array, encoding: string): string | null {
  try {
    return new TextDecoder(encoding, { fatal: true }).decode(bytes);
  } catch {
    return null;
  }
}

/**
 * The text of a DXF file: UTF-8 or UTF-16 by its byte order mark, UTF-8 from the 2007 format on, else the code page the
 * header names. Bytes that do not fit are replaced, and a note says which encoding was taken for granted.
 */
export function decodeText(bytes: Uint8Array): DecodedText {
  if (bytes[0] === 0xff && bytes[1] === 0xfe)
    return { text: new TextDecoder("utf-16le").decode(bytes), notes: [] };
  if (bytes[0] === 0xfe && bytes[1] === 0xff)
    return { text: new TextDecoder("utf-16be").decode(bytes), notes: [] };
  const isMarkedUtf8 = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf;
  if (isMarkedUtf8 || isAscii(bytes)) return { text: new TextDecoder().decode(bytes), notes: [] };

  const head = new TextDecoder("windows-1252").decode(bytes.subarray(0, HEADER_REACH));
  const version = /\$ACADVER\s+1\s+(AC\d+)/.exec(head)?.[1] ?? "";
  const codePage = /\$DWGCODEPAGE\s+3\s+(\S+)/.exec(head)?.[1]?.toLowerCase() ?? "";
  const named = ENCODING_OF_CODE_PAGE[codePage];
  const asUtf8 = decodeStrictly(bytes, "utf-8");

  if (version >= FIRST_UTF8_VERSION && asUtf8 !== null) return { text: asUtf8, notes: [] };
  if (version < FIRST_UTF8_VERSION && named) return { text: new TextDecoder(named).decode(bytes), notes: [] };
  if (asUtf8 !== null) {
    return { text: asUtf8, notes: ["The file does not say how its letters are coded; UTF-8 was assumed."] };
  }
  const assumed = named ?? "windows-1252";
  return {
    text: new TextDecoder(assumed).decode(bytes),
    notes: [`The file does not say how its letters are coded; ${assumed} was assumed.`],
  };
}
