import { useEffect, useRef, useState } from "react";
import { type Interpretation, SANDING_LEVELS, type Sanding } from "~/domain/orders";
import { Button } from "../button";
import { CheckboxField } from "../checkbox-field";
import { plainField } from "../field";
import { RadioField } from "../radio-field";
import { TextField } from "../text-field";
import type { DraftFile } from "./order-view";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

/** How long the form rests before a change is saved, so that a row of quick ones is saved once. */
const REST_MS = 500;

const SANDING: Readonly<Record<Sanding, { label: string; hint: string }>> = {
  none: { label: "As cut", hint: "edges straight from the router" },
  arrises: { label: "Arrises eased", hint: "sharp edges taken off by hand" },
  "grit-150": { label: "Edges sanded to 150", hint: "ready for a first coat" },
};

interface ChoicesPanelProps {
  readonly saved: Interpretation;
  readonly files: readonly DraftFile[];
  readonly after: number;
  /** Told at once what is chosen, for the price; saved a moment later. */
  readonly onAhead: (content: Interpretation) => void;
}

/** How many of everything, and what is done to it after the router. Every change is priced at once and saved. */
export function ChoicesPanel({ saved, files, after, onAhead }: ChoicesPanelProps) {
  const act = useAct("choices");
  const form = useRef<HTMLFormElement>(null);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const dirty = useRef(false);
  const sent = useRef(wordsOf(saved));
  const [round, setRound] = useState(0);
  const { pending, submit, refusal } = act;
  const savedWords = wordsOf(saved);

  useEffect(() => () => clearTimeout(timer.current), []);

  const save = () => {
    clearTimeout(timer.current);
    timer.current = setTimeout(() => {
      if (!form.current?.checkValidity()) return;
      dirty.current = false;
      sent.current = wordsOf(chosenIn(new FormData(form.current), saved));
      void submit(form.current, { method: "post" });
    }, REST_MS);
  };
  const latest = useRef(save);
  latest.current = save;
  /* A change made while another was on its way is saved from the number that one got. */
  useEffect(() => {
    if (!pending && dirty.current) latest.current();
  }, [pending]);
  /* What was changed elsewhere, by undo or in another window, is shown; what was refused here stays to be seen. */
  useEffect(() => {
    if (dirty.current || refusal || savedWords === sent.current) return;
    sent.current = savedWords;
    setRound((last) => last + 1);
  }, [savedWords, refusal]);

  const change = () => {
    if (!form.current?.checkValidity()) return;
    onAhead(chosenIn(new FormData(form.current), saved));
    dirty.current = true;
    if (!pending) save();
  };

  return (
    <act.Form ref={form} method="post" onChange={change} className="space-y-4 text-small">
      <RefusalNotice refusal={refusal} />
      <input type="hidden" name="intent" value="choices" />
      <input type="hidden" name="after" value={after} />
      <Fields key={round} saved={saved} files={files} />
      <noscript>
        <Button size="small">Save the choices</Button>
      </noscript>
    </act.Form>
  );
}

function Fields({ saved, files }: Pick<ChoicesPanelProps, "saved" | "files">) {
  return (
    <>
      {files.map((file, index) => (
        <div key={file.sha256}>
          <input type="hidden" name={`sets[${index}].sha256`} value={file.sha256} />
          <TextField
            field={plainField(`sets[${index}].sets`, { id: `sets-${file.number}`, value: String(file.sets) })}
            label={files.length > 1 ? `Sets of ${file.fileName}` : "Sets"}
            hint={index === 0 ? "how many of everything drawn" : undefined}
            type="number"
            min={1}
            max={999}
            required
            measured
          />
        </div>
      ))}
      <RadioField
        field={plainField("sanding", { id: "sanding", value: saved.sanding })}
        label="Edges"
        choices={SANDING_LEVELS.map((level) => ({ value: level, ...SANDING[level] }))}
      />
      <CheckboxField
        field={plainField("leaveTabs", { id: "leave-tabs", value: saved.leaveTabs ? "on" : "" })}
        label="Leave the tabs on"
        hint="you cut the parts out of their last wood bridges yourself; it saves the bench time"
      />
    </>
  );
}

/** What this form can say of an interpretation, to tell whether two agree. */
const wordsOf = ({ sanding, leaveTabs, files }: Interpretation): string =>
  JSON.stringify([sanding, leaveTabs, files.map(({ sha256, sets }) => [sha256, sets])]);

/** The choices as the form has them now. */
function chosenIn(form: FormData, content: Interpretation): Interpretation {
  const sets = new Map(
    content.files.map((_, index) => [
      form.get(`sets[${index}].sha256`),
      Number(form.get(`sets[${index}].sets`)),
    ]),
  );
  return {
    ...content,
    sanding: SANDING_LEVELS.find((level) => level === form.get("sanding")) ?? content.sanding,
    leaveTabs: form.get("leaveTabs") !== null,
    files: content.files.map((file) => ({ ...file, sets: sets.get(file.sha256) ?? file.sets })),
  };
}
