import { Form, redirect } from "react-router";
import { auth } from "~/auth/auth.server";
import { deviceWords } from "~/auth/device-words";
import { requireAct } from "~/auth/guards.server";
import { Button } from "~/components/button";
import { DateTime } from "~/components/date-time";
import { Sheet } from "~/components/sheet";
import { Cell, HeadCell, RowHead, Table, TableHead, TableRow } from "~/components/table";
import { db } from "~/db/client.server";
import { endOtherSessions, endSession } from "~/models/accounts.server";
import type { Route } from "./+types/sessions";
import { AccountTabs } from "./account-tabs";

export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "account.edit");
  const { headers } = args.request;
  const here = (await auth().api.getSession({ headers }))?.session.id;
  const sessions = await auth().api.listSessions({ headers });
  return {
    sessions: sessions
      .map(({ id, userAgent, createdAt }) => ({
        id,
        device: deviceWords(userAgent),
        since: createdAt,
        here: id === here,
      }))
      .sort((one, other) => Number(other.here) - Number(one.here) || +other.since - +one.since),
  };
}

export async function action(args: Route.ActionArgs) {
  const person = await requireAct(args, "account.edit");
  const { headers } = args.request;
  const ended = (await args.request.formData()).get("session");
  const here = (await auth().api.getSession({ headers }))?.session.id;
  if (ended === "others" && here) await endOtherSessions(db, person.id, here);
  else if (typeof ended === "string") await endSession(db, person.id, ended);
  throw redirect("/account/sessions");
}

export const meta: Route.MetaFunction = () => [{ title: "Signed in at · Kerfpost" }];

export default function Sessions({ loaderData }: Route.ComponentProps) {
  const { sessions } = loaderData;
  return (
    <>
      <AccountTabs at="/account/sessions" />
      <Sheet padded>
        <Table caption="Where you are signed in">
          <TableHead>
            <HeadCell>Place</HeadCell>
            <HeadCell>Since</HeadCell>
            <HeadCell>
              <span className="sr-only">Act</span>
            </HeadCell>
          </TableHead>
          <tbody>
            {sessions.map(({ id, device, since, here }) => (
              <TableRow key={id}>
                <RowHead>{device}</RowHead>
                <Cell whole>
                  <DateTime at={since} show="day-time" />
                </Cell>
                <Cell whole>
                  {here ? (
                    "here"
                  ) : (
                    <Form method="post">
                      <Button variant="quiet" size="small" name="session" value={id}>
                        Sign out
                        <span className="sr-only"> {device}</span>
                      </Button>
                    </Form>
                  )}
                </Cell>
              </TableRow>
            ))}
          </tbody>
        </Table>
      </Sheet>
      {sessions.length > 1 && (
        <Form method="post">
          <Button variant="plain" name="session" value="others">
            Sign out everywhere else
          </Button>
        </Form>
      )}
    </>
  );
}
