import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { requireAct } from "~/auth/guards.server";
import { SettingsForm } from "~/components/owner/settings-form";
import { settingsFormOf, settingsFormSchema, settingsOf } from "~/components/owner/settings-schema";
import { PageHeader } from "~/components/page-header";
import { Sheet } from "~/components/sheet";
import { db } from "~/db/client.server";
import { saveSettings } from "~/flows/save-settings.server";
import { REFUSAL_STATUS } from "~/flows/verdict";
import { findSettings } from "~/models/settings.server";
import type { Route } from "./+types/settings";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "settings.edit");
  const found = await findSettings(db);
  if (!found) throw data({ words: "The shop is not set up yet." }, { status: 404 });
  return { version: found.version, values: settingsFormOf(found.content, found.version) };
}

export async function action(args: Route.ActionArgs) {
  const actor = await requireAct(args, "settings.edit");
  const submission = parseWithZod(await args.request.formData(), { schema: settingsFormSchema });
  if (submission.status !== "success") return data(submission.reply(), { status: 400 });
  const saved = await saveSettings({
    actor,
    version: submission.value.version,
    content: settingsOf(submission.value),
  });
  if (!saved.ok)
    return data(submission.reply({ formErrors: [saved.words] }), { status: REFUSAL_STATUS[saved.reason] });
  throw redirect("/owner/settings");
}

export const meta: Route.MetaFunction = () => [{ title: "Settings · Kerfpost" }];

export default function Settings({ loaderData, actionData }: Route.ComponentProps) {
  const { version, values } = loaderData;
  return (
    <>
      <PageHeader
        eyebrow={`saved ${version} ${version === 1 ? "time" : "times"}`}
        title="Settings"
        lead="For quotes and dates from now on. What was quoted keeps what it was quoted with."
      />
      <Sheet padded>
        <SettingsForm values={values} lastResult={actionData} />
      </Sheet>
    </>
  );
}
