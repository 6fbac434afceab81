import { Button } from "../button";
import { ConfirmButton } from "../confirm-button";
import { plainField } from "../field";
import { SelectField } from "../select-field";
import { LayersPanel } from "./layers-panel";
import type { DraftFile, StockChoice } from "./order-view";
import { RefusalNotice } from "./refusal-notice";
import { sizeInWords } from "./size-in-words";
import { stockLabel } from "./stock-label";
import { useAct } from "./use-act";

interface FileSheetProps {
  readonly orderId: string;
  readonly version: number;
  readonly after: number;
  readonly file: DraftFile;
  readonly stocks: readonly StockChoice[];
  readonly alone: boolean;
}

const UNITS = [
  { value: "mm", label: "millimetres" },
  { value: "in", label: "inches" },
  { value: "cm", label: "centimetres" },
  { value: "m", label: "metres" },
  { value: "ft", label: "feet" },
];

/** One drawing of a draft: its file, unit and stock, what its layers mean, and what of it is not cut. */
export function FileSheet({ orderId, version, after, file, stocks, alone }: FileSheetProps) {
  return (
    <section id={`file-${file.number}`} className="scroll-mt-4 space-y-4 px-4 py-4 text-small sm:px-6">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-2">
        <h3 className="min-w-0 text-body font-semibold break-words">
          {!alone && <span className="measure text-soft">{file.number} </span>}
          {file.fileName}
        </h3>
        <div className="flex flex-wrap items-center gap-x-5 gap-y-2 print:hidden">
          <span className="measure text-soft">{sizeInWords(file.size)}</span>
          <a
            href={`/api/orders/${orderId}/drawings/${file.drawingId}`}
            download
            className="text-blue hover:underline"
          >
            Download<span className="sr-only"> {file.fileName}</span>
          </a>
          <TakeOut file={file} version={version} />
        </div>
      </div>
      {file.state === "queued" && <p className="text-soft">Being read. It appears by itself.</p>}
      {file.state === "failed" && (
        <p className="border-l-4 border-amber bg-amber-wash px-4 py-3">{file.words}</p>
      )}
      {file.state === "read" && (
        <>
          {file.unit !== null && file.materialId !== null && (
            <FileChoice file={file} after={after} stocks={stocks} />
          )}
          {file.kinds === 0 && (
            <p className="border-l-4 border-amber bg-amber-wash px-4 py-3">
              No part was found in it: there is no closed outline. What it holds is listed under “Not cut”.
            </p>
          )}
          {file.layers.length > 0 && (
            <details open={alone} className="group">
              <summary className="inline-flex min-h-7 items-center gap-2 pointer-coarse:min-h-11">
                <h4 className="font-semibold">Layers</h4>
                <span className="text-soft">{layerWords(file)}</span>
                <span className="text-blue group-open:hidden">show</span>
              </summary>
              <LayersPanel file={file} after={after} />
            </details>
          )}
          <div>
            <h4 className="font-semibold">Not cut</h4>
            {file.leftOut.length === 0 ? (
              <p className="text-soft">Everything in the file becomes a part.</p>
            ) : (
              <ul className="mt-1 list-disc space-y-0.5 pl-4 text-soft">
                {file.leftOut.map((line) => (
                  <li key={line}>{line}</li>
                ))}
              </ul>
            )}
          </div>
        </>
      )}
    </section>
  );
}

function layerWords({ layers }: DraftFile): string {
  const guessed = layers.filter((layer) => layer.guessed).length;
  return `${layers.length}, ${guessed === 0 ? "as you said" : `${guessed} guessed`}`;
}

function FileChoice({ file, after, stocks }: Pick<FileSheetProps, "file" | "after" | "stocks">) {
  const { Form, pending, refusal } = useAct("file", file.sha256);
  return (
    <Form key={`${file.materialId} ${file.unit}`} method="post" className="space-y-2 print:hidden">
      <RefusalNotice refusal={refusal} />
      <input type="hidden" name="intent" value="file" />
      <input type="hidden" name="after" value={after} />
      <input type="hidden" name="sha256" value={file.sha256} />
      <div className="grid items-end gap-3 sm:grid-cols-[minmax(0,1fr)_10rem_auto]">
        <SelectField
          field={plainField("materialId", { id: `stock-${file.number}`, value: file.materialId ?? "" })}
          label="Stock"
          choices={stocks.map((stock) => ({ value: stock.id, label: stockLabel(stock) }))}
        />
        <SelectField
          field={plainField("unit", { id: `unit-${file.number}`, value: file.unit ?? "mm" })}
          label="Drawn in"
          choices={UNITS}
        />
        <Button pending={pending}>Save</Button>
      </div>
    </Form>
  );
}

function TakeOut({ file, version }: { readonly file: DraftFile; readonly version: number }) {
  const { Form, pending, refusal } = useAct("take-out", file.drawingId);
  return (
    <Form method="post" className="min-w-0">
      <RefusalNotice refusal={refusal} />
      <input type="hidden" name="intent" value="take-out" />
      <input type="hidden" name="version" value={version} />
      <input type="hidden" name="drawingId" value={file.drawingId} />
      <ConfirmButton
        label="Remove"
        variant="quiet"
        size="small"
        question={`${file.fileName} is taken out of the order with its parts.`}
        confirm="Remove it"
        pending={pending}
      />
    </Form>
  );
}
