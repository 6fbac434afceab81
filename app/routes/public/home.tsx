import { redirect } from "react-router";
import { homeOf } from "~/auth/areas";
import { currentPerson } from "~/auth/session.server";
import { ButtonLink } from "~/components/button-link";
import { PageHeader } from "~/components/page-header";
import { Sheet } from "~/components/sheet";
import { TextLink } from "~/components/text-link";
import { db } from "~/db/client.server";
import { findSettings } from "~/models/settings.server";
import type { Route } from "./+types/home";
import { HomeDrawing } from "./home-drawing";

const PROMISES = [
  {
    title: "Every part found",
    words:
      "Send a DXF from your CAD program. Parts are counted and measured, and what was not read is listed.",
  },
  {
    title: "Trouble seen before the router",
    words:
      "Open outlines, thin webs, loose mortises: each is pinned on your drawing with its measure and its limit.",
  },
  {
    title: "A price that explains itself",
    words:
      "Sheets, machine minutes, bench work, freight, tax. Each line says how it came about, with a date.",
  },
];

export async function loader({ context }: Route.LoaderArgs) {
  const person = await currentPerson(context);
  if (person) throw redirect(homeOf(person.roles));
  return { shop: (await findSettings(db))?.content.shop.name ?? null };
}

export const meta: Route.MetaFunction = () => [
  { title: "Kerfpost: send a drawing, get back parts" },
  {
    name: "description",
    content:
      "The order desk between builders who draw their own parts and the shop that routs them from sheets.",
  },
];

export default function Home({ loaderData }: Route.ComponentProps) {
  return (
    <>
      <PageHeader
        eyebrow={loaderData.shop ?? "The order desk of a routing shop"}
        title="Send a drawing, get back parts that fit"
        right={
          <>
            <ButtonLink to="/sign-in" variant="plain">
              Sign in
            </ButtonLink>
            <ButtonLink to="/sign-up" variant="primary">
              Make an account
            </ButtonLink>
          </>
        }
      />
      <Sheet label="A drawing as it is read">
        <div className="overflow-hidden">
          <HomeDrawing />
        </div>
      </Sheet>
      <ul className="grid gap-x-8 gap-y-5 md:grid-cols-3">
        {PROMISES.map(({ title, words }) => (
          <li key={title}>
            <h2 className="text-body font-semibold">{title}</h2>
            <p className="mt-1 text-small text-soft">{words}</p>
          </li>
        ))}
      </ul>
      <p className="text-small text-soft">
        The design stays yours, and so does the care for it:{" "}
        <TextLink to="/terms">terms and cautions</TextLink>.
      </p>
    </>
  );
}
