import { Button } from "../button";
import { plainField } from "../field";
import { Measure } from "../measure";
import { SelectField } from "../select-field";
import { TextField } from "../text-field";
import type { ShownPart } from "./order-view";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

const GRAIN = [
  { value: "along-x", label: "Grain along its width, as drawn" },
  { value: "along-y", label: "Grain along its height, as drawn" },
  { value: "free", label: "Grain does not matter: it may be turned" },
];

/** The chosen part of a draft: its name and the direction of its grain. */
export function PartChoice({ part, after }: { readonly part: ShownPart; readonly after: number }) {
  const { Form, pending, refusal } = useAct("part");
  return (
    <Form
      key={`${part.label} ${part.name} ${part.grain}`}
      method="post"
      className="mt-3 space-y-3 border-t border-line pt-3 print:hidden"
    >
      <RefusalNotice refusal={refusal} />
      <p>
        Part {part.label}: <Measure length={part.width} /> by <Measure length={part.height} />
        {part.mirrorOf && `, the mirror of ${part.mirrorOf}`}
      </p>
      <input type="hidden" name="intent" value="part" />
      <input type="hidden" name="after" value={after} />
      <input type="hidden" name="sha256" value={part.fileSha} />
      <input type="hidden" name="letter" value={part.letter} />
      <TextField
        field={plainField("name", { id: "part-name", value: part.name === part.letter ? "" : part.name })}
        label="What you call it"
        maxLength={60}
      />
      <SelectField
        field={plainField("grain", { id: "part-grain", value: part.grain })}
        label="Grain"
        choices={GRAIN}
      />
      <Button size="small" pending={pending}>
        Keep for part {part.label}
      </Button>
    </Form>
  );
}
