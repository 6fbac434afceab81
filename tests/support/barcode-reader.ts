/** An independent reader of what is printed: poppler draws the PDF, zbar reads the bar codes off the picture. */
import { spawnSync } from "node:child_process";
import { mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";

const run = (command: string, args: readonly string[]): string => {
  const { status, stdout, stderr } = spawnSync(command, args, { encoding: "utf8" });
  if (status !== 0) throw new Error(`${command} failed: ${stderr}`);
  return stdout;
};

/** `CODE-128:TP...` and `QR-Code:...` on every page of a PDF, drawn at a resolution in dots per inch, sorted. */
export function readBarcodes(pdf: Uint8Array, dotsPerInch: number): readonly string[] {
  const directory = mkdtempSync(path.join(tmpdir(), "kerfpost-barcodes-"));
  try {
    writeFileSync(path.join(directory, "page.pdf"), pdf);
    run("pdftoppm", [
      "-r",
      String(dotsPerInch),
      "-gray",
      "-png",
      `${directory}/page.pdf`,
      `${directory}/page`,
    ]);
    const pages = readdirSync(directory).filter((name) => name.endsWith(".png"));
    return pages
      .flatMap((page) =>
        run("zbarimg", [
          "-q",
          "--nodbus",
          "-Sdisable",
          "-Sqrcode.enable",
          "-Scode128.enable",
          path.join(directory, page),
        ]).split("\n"),
      )
      .filter(Boolean)
      .sort();
  } finally {
    rmSync(directory, { recursive: true });
  }
}

/** The words of a PDF in reading order, and its page sizes in points. */
export function readWords(pdf: Uint8Array): { readonly words: string; readonly pages: readonly string[] } {
  const directory = mkdtempSync(path.join(tmpdir(), "kerfpost-words-"));
  try {
    const file = path.join(directory, "page.pdf");
    writeFileSync(file, pdf);
    return {
      words: run("pdftotext", ["-layout", file, "-"]),
      pages: run("pdfinfo", ["-l", "999", file])
        .split("\n")
        .flatMap((line) => /^Page +\d+ size: +([\d.]+ x [\d.]+)/.exec(line)?.[1] ?? []),
    };
  } finally {
    rmSync(directory, { recursive: true });
  }
}
