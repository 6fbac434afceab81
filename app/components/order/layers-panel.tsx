import { getFormProps, useForm } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { useState } from "react";
import { INCH_IN_MM } from "~/domain/units";
import { Button } from "../button";
import { plainField } from "../field";
import { FormErrors } from "../form-errors";
import { SelectField } from "../select-field";
import { useShownUnit } from "../shown-unit";
import { TextField } from "../text-field";
import { layersSchema, takesDepth } from "./order-acts";
import type { DraftFile, ShownLayer } from "./order-view";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

const KINDS = [
  { value: "outside", label: "Outside profile" },
  { value: "cut-through", label: "Cut through" },
  { value: "pocket", label: "Pocket" },
  { value: "drill", label: "Drill" },
  { value: "engrave", label: "Engrave" },
  { value: "set-aside", label: "Set aside, do not cut" },
];
const HOW = [
  { value: "through", label: "all through" },
  { value: "depth", label: "deep from the top" },
  { value: "leave", label: "left under it" },
];

interface LayersPanelProps {
  readonly file: DraftFile;
  readonly after: number;
}

/** What is done with each layer of a drawing: guessed from names and shapes, corrected here once, remembered. */
export function LayersPanel({ file, after }: LayersPanelProps) {
  const act = useAct("layers", file.sha256);
  const unit = useShownUnit();
  const [form] = useForm({
    id: `layers-${file.number}`,
    lastResult: act.result,
    shouldValidate: "onSubmit",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: layersSchema }),
  });
  const errorsOf = (index: number) => form.allErrors[`layers[${index}].value`];
  return (
    <act.Form
      key={`${unit} ${JSON.stringify(file.layers)}`}
      method="post"
      {...getFormProps(form)}
      className="space-y-3"
    >
      <FormErrors
        errors={form.errors}
        fields={file.layers.map(({ name }, index) => ({
          id: depthId(file, index),
          label: name,
          errors: errorsOf(index),
        }))}
      />
      <RefusalNotice refusal={act.refusal} />
      <input type="hidden" name="intent" value="layers" />
      <input type="hidden" name="after" value={after} />
      <input type="hidden" name="sha256" value={file.sha256} />
      <input type="hidden" name="shown" value={unit} />
      <ul className="divide-y divide-line">
        {file.layers.map((layer, index) => (
          <LayerLine
            key={layer.name}
            layer={layer}
            index={index}
            id={depthId(file, index)}
            unit={unit}
            errors={errorsOf(index)}
          />
        ))}
      </ul>
      <Button size="small" pending={act.pending}>
        Save the layers
      </Button>
    </act.Form>
  );
}

const depthId = (file: DraftFile, index: number) => `depth-${file.number}-${index}`;

interface LayerLineProps {
  readonly layer: ShownLayer;
  readonly index: number;
  readonly id: string;
  readonly unit: "mm" | "in";
  readonly errors: string[] | undefined;
}

function LayerLine({ layer, index, id, unit, errors }: LayerLineProps) {
  const { name, rule, guessed, count, hidden } = layer;
  const [kind, setKind] = useState<string>(rule?.kind ?? "by-shape");
  const depth = rule?.depth ?? null;
  const [how, setHow] = useState(depth === null ? "through" : "leave" in depth ? "leave" : "depth");
  const length = depth === null ? null : "leave" in depth ? depth.leave : depth.depth;
  const field = (part: string, value?: string) => plainField(`layers[${index}].${part}`, { value });
  return (
    <li className="grid items-end gap-x-3 gap-y-2 py-2.5 sm:grid-cols-[minmax(9rem,1fr)_11rem_11rem_7.5rem]">
      <div className="min-w-0 self-center">
        <p className="measure break-words">{name}</p>
        <p className="text-caption text-soft">
          {count} {count === 1 ? "line" : "lines"}
          {hidden && ", hidden in the file"}
          {guessed && ` · ${rule ? "guessed from its name" : "guessed from its shapes"}`}
        </p>
        <input type="hidden" name={`layers[${index}].layer`} value={name} />
      </div>
      <SelectField
        field={field("kind")}
        label={`Layer ${name}`}
        labelHidden
        value={kind}
        onChange={(event) => setKind(event.currentTarget.value)}
        choices={[{ value: "by-shape", label: rule === null ? "By its shapes" : "As guessed" }, ...KINDS]}
      />
      {takesDepth(kind) ? (
        <>
          <SelectField
            field={field("how")}
            label={`Depth on ${name}`}
            labelHidden
            value={how}
            onChange={(event) => setHow(event.currentTarget.value)}
            choices={HOW}
          />
          {how === "through" ? (
            <span />
          ) : (
            <TextField
              field={{ ...field("value", shownLength(length, unit)), id, errors }}
              label={`How much on ${name}`}
              labelHidden
              measured
              inputMode="decimal"
              unit={unit}
            />
          )}
        </>
      ) : (
        <span className="hidden sm:col-span-2 sm:block" />
      )}
    </li>
  );
}

const shownLength = (length: number | null, unit: "mm" | "in"): string | undefined =>
  length === null
    ? undefined
    : unit === "in"
      ? String(Number((length / INCH_IN_MM).toFixed(4)))
      : String(Number(length.toFixed(3)));
