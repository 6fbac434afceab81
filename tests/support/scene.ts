/** Rows and people that flow tests start from: real database, real fakes, real flows. */
import { afterAll, beforeAll } from "vitest";
import { db, transact } from "~/db/client.server";
import { lots, machines, materials, newId, priceBookVersions, userRoles, users } from "~/db/schema";
import type { Interpretation, Role, ShopSettings } from "~/domain/orders";
import type { PriceBook } from "~/domain/pricing";
import { orderInterpretation } from "~/flows/order-interpretation.server";
import { saveInterpretation } from "~/flows/save-interpretation.server";
import { uploadDrawing } from "~/flows/upload-drawing.server";
import { jobHandlers } from "~/jobs/handlers.server";
import { closePool } from "~/jobs/pool.server";
import { runDueJobs } from "~/jobs/run-job.server";
import { findOrder, type Order } from "~/models/orders.server";
import { insertSettings } from "~/models/settings.server";
import { putClients } from "~/services/clients.server";
import { freshDatabase } from "./database";
import { shelvesDxf } from "./drawings";
import { fakesForTests } from "./fakes";

export interface TestPerson {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
  readonly shownUnit: "mm" | "in";
  readonly emailVerified: boolean;
}

/**
 * A fresh database, fakes on free ports, and the services' clients pointed at them, for this test file. Call once at
 * its top.
 */
export function freshScene(): ReturnType<typeof fakesForTests> {
  freshDatabase();
  const running = fakesForTests();
  beforeAll(() => putClients(running.services));
  afterAll(() => {
    putClients(undefined);
    closePool();
  });
  return running;
}

let people = 0;

/** A person with a verified address and these roles; a builder if not said otherwise. */
export async function makePerson(
  given: Partial<Omit<TestPerson, "id">> & { roles?: readonly Role[] } = {},
): Promise<TestPerson> {
  people += 1;
  const person: TestPerson = {
    id: newId(),
    name: `Person ${people}`,
    email: `person-${people}@kerfpost.example`,
    roles: ["builder"],
    shownUnit: "mm",
    emailVerified: true,
    ...given,
  };
  const { roles, ...row } = person;
  await transact(async (tx) => {
    await tx.insert(users).values(row);
    for (const role of roles) await tx.insert(userRoles).values({ userId: person.id, role });
  });
  return person;
}

export const SETTINGS: ShopSettings = {
  shop: {
    name: "Alder Ferry Panelworks",
    email: "desk@alder-ferry.example",
    phone: "555-0100",
    address: ["4 Ferry Lane", "Marrow Point, WA 98399"],
    timeZone: "America/Los_Angeles",
    currency: "usd",
  },
  tax: { regions: [{ region: "WA", rate: 0.085, freightTaxable: true }], homeRegion: "WA" },
  review: { cap: 500_000 },
  quote: { validDays: 14 },
  upload: { maxBytes: 32 * 1024 * 1024, maxFiles: 20 },
  lead: { cutOffHour: 14, bufferDays: 1, transitDays: 3, holidays: [] },
  nesting: { spacing: 12, margin: 15, plannedYield: 0.7 },
  fit: {
    smallestTool: 3.175,
    bridge: 0.2,
    bridgeAsk: 0.5,
    smallestHeldArea: 2_500,
    smallestHeldWidth: 25,
    thinFloor: 2,
    thinnestFloor: 0.8,
  },
  retention: { abandonedDraftDays: 90 },
  terms: "Design responsibility stays with the builder.",
};

export const PRICE_BOOK: PriceBook = {
  currency: "usd",
  materialMarkUp: 0.2,
  machineHour: 12_000,
  benchHour: 4_800,
  setUp: 3_500,
  setUpPerFurtherStock: 1_500,
  cutSpeeds: [
    { upToThickness: 9.5, speed: 6_000, passes: 1 },
    { upToThickness: 20, speed: 5_000, passes: 2 },
    { upToThickness: 40, speed: 4_000, passes: 3 },
  ],
  secondsPerHole: 4,
  minutesPerSheet: 6,
  toolChangeMinutes: 1,
  tabSpacing: 300,
  secondsPerTab: 12,
  sanding: { none: 0, arrises: 20, "grit-150": 45 },
  packing: { perOrder: 900, perPiece: 75 },
  freight: {
    perParcel: 1_200,
    perKilogram: 95,
    maxParcelKilograms: 30,
    perPallet: 14_500,
    palletPerKilogram: 60,
    maxPalletKilograms: 900,
  },
  minimumOrder: 6_000,
};

export interface TestShop {
  readonly material: typeof materials.$inferSelect;
  readonly lot: typeof lots.$inferSelect;
  readonly machine: typeof machines.$inferSelect;
  readonly priceBook: typeof priceBookVersions.$inferSelect;
}

const only = <Row>(rows: Row[]): Row => {
  const [row] = rows;
  if (!row) throw new Error("A row that the scene needs was not written.");
  return row;
};

/** A shop with settings, 18 mm birch with one measured lot of twenty sheets, a machine and a published price book. */
export async function makeShop(): Promise<TestShop> {
  return transact(async (tx) => {
    await insertSettings(tx, SETTINGS);
    const material = only(
      await tx
        .insert(materials)
        .values({
          code: "BB-18",
          name: "Birch plywood 18 mm",
          kind: "birch-plywood",
          nominalThickness: 18,
          sheetLength: 2440,
          sheetWidth: 1220,
          density: 680,
          sheetPrice: 9_800,
        })
        .returning(),
    );
    const lot = only(
      await tx
        .insert(lots)
        .values({
          materialId: material.id,
          code: "L-1801",
          sheetsOnHand: 20,
          thicknessMin: 17.6,
          thicknessMean: 17.8,
          thicknessMax: 18,
          measuredAt: new Date("2026-11-02T17:00:00Z"),
        })
        .returning(),
    );
    const machine = only(
      await tx
        .insert(machines)
        .values({
          name: "North",
          bedLength: 3050,
          bedWidth: 1525,
          rapid: 20_000,
          acceleration: 1_500,
          toolChangeMinutes: 1,
          sheetHandlingMinutes: 6,
          calendar: {
            shifts: [1, 2, 3, 4, 5].map((weekday) => ({ weekday, from: "08:00", to: "16:30" })),
            closed: [],
          },
        })
        .returning(),
    );
    const priceBook = only(
      await tx
        .insert(priceBookVersions)
        .values({ number: 1, content: PRICE_BOOK, status: "published", publishedAt: new Date() })
        .returning(),
    );
    return { material, lot, machine, priceBook };
  });
}

/** Runs queued readings now. */
export const runReadings = (): Promise<number> => runDueJobs(jobHandlers);

/** A draft order made by uploading one drawing, which is read. */
export async function makeDraftOrder(
  person: TestPerson,
  bytes: Uint8Array = shelvesDxf(),
  fileName = "shelves.dxf",
): Promise<Order> {
  const uploaded = await uploadDrawing({
    actor: person,
    orderId: null,
    fileName,
    file: new Blob([new Uint8Array(bytes)]),
  });
  if (!uploaded.ok) throw new Error(uploaded.words);
  await runReadings();
  return orderAsIs(uploaded.orderId);
}

/** The order's row as it is now. */
export async function orderAsIs(orderId: string): Promise<Order> {
  const order = await findOrder(db, orderId, { kind: "staff" });
  if (!order) throw new Error("There is no such order.");
  return order;
}

/** Saves choices for every file of an order: millimetres and the given stock, and whatever else is changed. */
export async function chooseStock(
  person: TestPerson,
  order: Order,
  materialId: string,
  change: (content: Interpretation) => Interpretation = (content) => content,
): Promise<Interpretation> {
  const { number, content } = await orderInterpretation(db, order);
  const chosen = change({
    ...content,
    files: content.files.map((file) => ({ ...file, unit: file.unit ?? "mm", materialId })),
  });
  const saved = await saveInterpretation({
    actor: person,
    orderId: order.id,
    after: number,
    content: chosen,
  });
  if (!saved.ok) throw new Error(saved.words);
  return chosen;
}
