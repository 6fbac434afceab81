import { Button } from "../button";
import { RefusalNotice } from "./refusal-notice";
import { useAct } from "./use-act";

/** Takes the last change of the choices back; pressed again it brings it back. */
export function UndoChoice({ after }: { readonly after: number }) {
  const { Form, pending, refusal } = useAct("undo");
  if (after < 2) return null;
  return (
    <Form method="post" className="print:hidden">
      <RefusalNotice refusal={refusal} />
      <input type="hidden" name="intent" value="undo" />
      <input type="hidden" name="after" value={after} />
      <Button size="small" pending={pending}>
        Undo the last change
      </Button>
    </Form>
  );
}
