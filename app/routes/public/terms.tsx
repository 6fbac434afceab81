import { PageHeader } from "~/components/page-header";
import { Sheet } from "~/components/sheet";
import { db } from "~/db/client.server";
import { findSettings } from "~/models/settings.server";
import type { Route } from "./+types/terms";

/** Cautions that stand whatever the owner writes. */
const CAUTIONS = [
  {
    title: "The design is yours",
    words:
      "The shop cuts what you drew and approved. Whether it fits, holds and is strong enough stays your responsibility. A fit report measures; it does not engineer.",
  },
  {
    title: "What carries people or moves",
    words:
      "Cabinets in vehicles and boats must be anchored to structure, and their latches must hold on the move. Gas, electrical and structural work follows your local codes and belongs to licensed practice.",
  },
  {
    title: "Wood dust",
    words:
      "Sanding and cutting make dust that harms lungs and burns. Wear a mask and collect it at the tool.",
  },
  {
    title: "Edges and splinters",
    words: "Routed edges are sharp until they are eased. Wear gloves when you unpack and take tabs off.",
  },
  {
    title: "Weight",
    words: "Panels and parcels are heavy. Lift with two people and look where you put your feet.",
  },
  {
    title: "Machine programs",
    words: "A program made here is reviewed by the operator and run dry before it cuts.",
  },
];

export async function loader(_: Route.LoaderArgs) {
  const settings = (await findSettings(db))?.content;
  return {
    shop: settings?.shop ?? null,
    paragraphs: settings?.terms.split(/\n\s*\n/).filter((words) => words.trim() !== "") ?? [],
  };
}

export const meta: Route.MetaFunction = () => [{ title: "Terms and cautions · Kerfpost" }];

export default function Terms({ loaderData }: Route.ComponentProps) {
  const { shop, paragraphs } = loaderData;
  return (
    <div className="mx-auto w-full max-w-3xl space-y-5">
      <PageHeader
        title="Terms and cautions"
        lead={shop ? `${shop.name}, ${shop.address.join(", ")}` : undefined}
      />
      <Sheet padded>
        <div className="max-w-prose space-y-6">
          {paragraphs.length > 0 && (
            <section className="space-y-3">
              <h2 className="text-lead font-semibold">The shop's terms</h2>
              {paragraphs.map((words) => (
                <p key={words}>{words}</p>
              ))}
            </section>
          )}
          {CAUTIONS.map(({ title, words }) => (
            <section key={title}>
              <h2 className="text-lead font-semibold">{title}</h2>
              <p className="mt-1">{words}</p>
            </section>
          ))}
        </div>
      </Sheet>
    </div>
  );
}
