import { getFormProps, useForm } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { useState } from "react";
import { formatInches, formatMillimetres, LENGTH_UNITS, type LengthUnit, MM_PER_UNIT } from "~/domain/units";
import { Button } from "../button";
import { FormErrors } from "../form-errors";
import { RadioField } from "../radio-field";
import { RailSection } from "../rail";
import { SelectField } from "../select-field";
import { startSchema } from "./order-acts";
import type { DraftFile, StockChoice, UnitQuestion } from "./order-view";
import { RefusalNotice } from "./refusal-notice";
import { SizeBeside } from "./size-beside";
import { stockLabel } from "./stock-label";
import { useAct } from "./use-act";

/** A part shorter or longer than this in some unit is not drawn in it; the declared unit is offered all the same. Millimetres. */
const SHORTEST = 10;
const LONGEST = 12_000;

const UNIT_NAMES: Readonly<Record<LengthUnit, string>> = {
  mm: "millimetres",
  cm: "centimetres",
  m: "metres",
  in: "inches",
  ft: "feet",
};

interface FirstQuestionsProps {
  readonly question: UnitQuestion | null;
  readonly files: readonly DraftFile[];
  readonly stocks: readonly StockChoice[];
  readonly after: number;
}

/** At most two questions of a new order: is the size right, and what is it cut from. Nothing when both are answered. */
export function FirstQuestions({ question, files, stocks, after }: FirstQuestionsProps) {
  const act = useAct("start");
  const stockless = files.filter(({ kinds, materialId }) => kinds > 0 && materialId === null);
  const [unit, setUnit] = useState<LengthUnit | null>(null);
  const [form, fields] = useForm({
    id: "first-questions",
    lastResult: act.result,
    shouldValidate: "onSubmit",
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: startSchema }),
  });
  if (!question && stockless.length === 0) return null;
  const looked = question ? (unit ?? question.declared ?? question.assumed) : null;
  return (
    <RailSection title={question && stockless.length > 0 ? "Two questions first" : "One question first"}>
      <act.Form method="post" {...getFormProps(form)} className="space-y-4">
        <FormErrors
          errors={form.errors}
          fields={[
            { id: fields.unit.id, label: "Size", errors: fields.unit.errors },
            { id: fields.materialId.id, label: "Stock", errors: fields.materialId.errors },
          ]}
        />
        <RefusalNotice refusal={act.refusal} />
        <input type="hidden" name="intent" value="start" />
        <input type="hidden" name="after" value={after} />
        {question && looked && (
          <div className="space-y-2">
            {question.shas.map((sha) => (
              <input key={sha} type="hidden" name="unitFor" value={sha} />
            ))}
            <SizeBeside question={question} unit={looked} />
            <RadioField
              field={fields.unit}
              label={questionWords(question, looked)}
              value={looked}
              onChange={(value) => setUnit(LENGTH_UNITS.find((one) => one === value) ?? null)}
              choices={readingsOf(question).map((reading) => ({
                value: reading,
                label: <span className="measure">{lengthIn(question, reading)}</span>,
                hint: `drawn in ${UNIT_NAMES[reading]}${reading === question.declared ? ", as the file says" : ""}`,
              }))}
            />
            {files.length > question.shas.length && (
              <p className="text-caption text-soft">For {question.fileNames.join(", ")}.</p>
            )}
          </div>
        )}
        {stockless.length > 0 && (
          <div>
            {stockless.map(({ sha256 }) => (
              <input key={sha256} type="hidden" name="stockFor" value={sha256} />
            ))}
            <SelectField
              field={fields.materialId}
              required
              label="What is it cut from?"
              hint="The fit is checked against the thickness measured on the rack, not the nominal one."
              placeholder="Choose a sheet"
              choices={stocks.map((stock) => ({ value: stock.id, label: stockLabel(stock) }))}
            />
          </div>
        )}
        <Button variant="primary" wide pending={act.pending}>
          {question ? "Yes, go on" : "Use this sheet"}
        </Button>
      </act.Form>
    </RailSection>
  );
}

const questionWords = (question: UnitQuestion, unit: LengthUnit): string =>
  `Your longest part is ${lengthIn(question, unit)}: right?`;

/** `1,830.0 mm / 72.05 in` */
function lengthIn({ longest }: UnitQuestion, unit: LengthUnit): string {
  const length = longest * MM_PER_UNIT[unit];
  return `${formatMillimetres(length)} mm / ${formatInches(length, 2)} in`;
}

/** The declared unit first, then what the size allows. */
function readingsOf({ declared, assumed, longest }: UnitQuestion): LengthUnit[] {
  const first = declared ?? assumed;
  const others: readonly LengthUnit[] = ["mm", "in", "cm", "m", "ft"];
  return [
    first,
    ...others.filter((unit) => {
      const length = longest * MM_PER_UNIT[unit];
      return unit !== first && length >= SHORTEST && length <= LONGEST;
    }),
  ];
}
