import { type PointerEvent, useRef, useState } from "react";
import { SIGNATURE_FIELD, signaturePath } from "~/documents/signature";
import { Button } from "../button";

type Stroke = [number, number][];

/** A field to sign in with a finger, a pen or a mouse; the strokes go with the form it stands in. */
export function SignaturePad({ name }: { readonly name: string }) {
  const [strokes, setStrokes] = useState<Stroke[]>([]);
  const drawing = useRef(false);
  const pointOf = (event: PointerEvent<SVGSVGElement>): [number, number] => {
    const box = event.currentTarget.getBoundingClientRect();
    return [
      Math.round(((event.clientX - box.left) / box.width) * SIGNATURE_FIELD.width),
      Math.round(((event.clientY - box.top) / box.height) * SIGNATURE_FIELD.height),
    ];
  };
  return (
    <div>
      <p className="mb-1 text-small font-medium">Signature</p>
      <input type="hidden" name={name} value={JSON.stringify(strokes)} />
      <svg
        role="img"
        aria-label={strokes.length > 0 ? "Signed" : "Sign here"}
        viewBox={`0 0 ${SIGNATURE_FIELD.width} ${SIGNATURE_FIELD.height}`}
        className="block w-full max-w-[37.5rem] touch-none rounded-sheet border border-edge bg-sheet"
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          drawing.current = true;
          const point = pointOf(event);
          setStrokes((before) => [...before, [point]]);
        }}
        onPointerMove={(event) => {
          if (!drawing.current) return;
          const point = pointOf(event);
          setStrokes((before) => [...before.slice(0, -1), [...(before.at(-1) ?? []), point]]);
        }}
        onPointerUp={() => {
          drawing.current = false;
        }}
        onPointerCancel={() => {
          drawing.current = false;
        }}
      >
        <path d="M40 160H560" strokeWidth="1" className="stroke-line" />
        <path
          d={signaturePath(strokes)}
          fill="none"
          strokeWidth="3"
          strokeLinecap="round"
          strokeLinejoin="round"
          className="stroke-ink"
        />
      </svg>
      <Button type="button" variant="quiet" size="small" onClick={() => setStrokes([])}>
        Begin again
      </Button>
    </div>
  );
}
