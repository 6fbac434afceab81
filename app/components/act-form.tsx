import type { ReactNode } from "react";
import { Form, useNavigation } from "react-router";
import { Notice } from "./notice";

interface ActFormProps {
  readonly intent: string;
  /** What goes with it unseen: versions, ids, the request's own id. */
  readonly fields: Readonly<Record<string, string | number>>;
  readonly children: ReactNode | ((pending: boolean) => ReactNode);
  readonly label?: string;
}

/** The form of one act on a page of several. */
export function ActForm({ intent, fields, children, label }: ActFormProps) {
  const { formData } = useNavigation();
  const key = fields.key ?? fields.requestId;
  const pending =
    formData?.get("intent") === intent &&
    (key === undefined || [formData.get("key"), formData.get("requestId")].includes(String(key)));
  return (
    <Form method="post" aria-label={label} className="min-w-0">
      <input type="hidden" name="intent" value={intent} />
      {Object.entries(fields).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      {typeof children === "function" ? children(pending) : children}
    </Form>
  );
}

interface ActNoticeProps {
  readonly reply:
    | { readonly ok: true; readonly words: string | null }
    | {
        readonly ok: false;
        readonly words: string | null;
        readonly reason: string | null;
        readonly result: {
          readonly error?: Readonly<Record<string, readonly string[] | null>> | null;
        } | null;
      }
    | undefined;
  /** What happened meanwhile, where somebody else was quicker. */
  readonly meanwhile?: ReactNode;
}

/** What came of the act just sent, when it was not simply done. */
export function ActNotice({ reply, meanwhile }: ActNoticeProps) {
  if (!reply) return null;
  if (reply.ok)
    return reply.words === null ? null : (
      <Notice live tone="note">
        {reply.words}
      </Notice>
    );
  const faults = Object.values(reply.result?.error ?? {}).flatMap((errors) => errors ?? []);
  const words = reply.words ?? faults.join(" ");
  if (reply.reason !== "changed")
    return (
      <Notice live title="Not done">
        {words}
      </Notice>
    );
  return (
    <Notice live title="Somebody was quicker">
      {words}
      {meanwhile && <p className="mt-1">{meanwhile}</p>}
    </Notice>
  );
}
