import { createRequire } from "node:module";
import PDFDocument from "pdfkit";
import type { Mark, Page } from "./page";

const resolve = createRequire(import.meta.url).resolve;
const FACES = {
  plain: "@fontsource/roboto-mono/files/roboto-mono-latin-400-normal.woff",
  bold: "@fontsource/roboto-mono/files/roboto-mono-latin-600-normal.woff",
} as const;

/** Points in a millimetre. */
const POINTS = 72 / 25.4;

export interface PrintOptions {
  readonly title: string;
  /** When what is printed came to be: the same facts print the same bytes, whenever they are printed. */
  readonly at: Date;
}

/** Pages as a PDF, black on white, fonts embedded. */
export async function printPages(pages: readonly Page[], { title, at }: PrintOptions): Promise<Uint8Array> {
  const document = new PDFDocument({
    autoFirstPage: false,
    info: { Title: title, CreationDate: at, ModDate: at, Producer: "Kerfpost", Creator: "Kerfpost" },
  });
  const chunks: Buffer[] = [];
  const ended = new Promise<Uint8Array>((done, failed) => {
    document.on("data", (chunk: Buffer) => chunks.push(chunk));
    document.on("end", () => done(new Uint8Array(Buffer.concat(chunks))));
    document.on("error", failed);
  });
  document.registerFont("plain", resolve(FACES.plain));
  document.registerFont("bold", resolve(FACES.bold));
  for (const page of pages) {
    document.addPage({ size: [page.width * POINTS, page.height * POINTS], margin: 0 });
    document.save().scale(POINTS);
    for (const mark of page.marks) draw(document, mark);
    document.restore();
  }
  document.end();
  return ended;
}

function draw(document: PDFKit.PDFDocument, mark: Mark): void {
  switch (mark.kind) {
    case "text":
      write(document, mark);
      return;
    case "line":
      document.lineWidth(mark.width);
      if (mark.dashed) document.dash(1, { space: 1 });
      else document.undash();
      document
        .moveTo(...mark.from)
        .lineTo(...mark.to)
        .stroke("black");
      return;
    case "box":
      document.undash().rect(mark.x, mark.y, mark.width, mark.height);
      if (mark.edge === undefined) document.fill("black");
      else document.lineWidth(mark.edge).stroke("black");
      return;
    case "bars": {
      let x = mark.x;
      for (const [index, run] of mark.runs.entries()) {
        if (index % 2 === 0) document.rect(x, mark.y, run * mark.module, mark.height);
        x += run * mark.module;
      }
      document.fill("black");
      return;
    }
    case "squares":
      for (const [row, dots] of mark.rows.entries())
        for (const { start, length } of darkRuns(dots))
          document.rect(
            mark.x + start * mark.module,
            mark.y + row * mark.module,
            length * mark.module,
            mark.module,
          );
      document.fill("black");
  }
}

function write(
  document: PDFKit.PDFDocument,
  { x, y, size, words, bold, align = "left" }: Extract<Mark, { kind: "text" }>,
): void {
  document.font(bold ? "bold" : "plain", size).fillColor("black");
  const width = document.widthOfString(words);
  const left = align === "left" ? x : align === "right" ? x - width : x - width / 2;
  document.text(words, left, y, { lineBreak: false, baseline: "alphabetic" });
}

/** Dark dots side by side in a row, joined so that no seam shows between them. */
export function darkRuns(dots: string): readonly { readonly start: number; readonly length: number }[] {
  return [...dots.matchAll(/1+/g)].map((found) => ({ start: found.index, length: found[0].length }));
}
