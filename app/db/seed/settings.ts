import type { ShopSettings } from "~/domain/orders";

const MEGABYTE = 1024 * 1024;

const TERMS = `You own the design and answer for its fitness, strength and safety. We check only whether it can be cut.

Your approval of the part list and sizes on the screen releases the order for cutting. Changes after that are quoted again. Lead time starts when the drawing is frozen and the payment has cleared.

Outlines are cut to 0.25 mm on stable sheets, holes are placed to 0.25 mm, and pockets are as deep as drawn to 0.25 mm from the face. Thickness, warp, colour and voids are the sheet's own and are not promised. Plywood moves with the moisture of the air.

Parts are made to your drawing and cannot be returned. Tell us of a shortage or damage within five working days, with a photograph; we cut the parts again or refund them.

Cut edges are sharp, panels are heavy, and sanding dust is harmful: wear gloves to carry, lift in pairs, and wear a mask to sand. Cabinets in boats and vehicles must be anchored to the structure. Gas, electrical and structural work follows local codes and belongs to licensed people.

Your drawings stay yours and are shown to nobody but you and the shop.`;

/** The invented shop's settings. Rates of tax are made up as well: an accountant sets the real ones. */
export const DEMO_SETTINGS: ShopSettings = {
  shop: {
    name: "Alder Ferry Panelworks",
    email: "desk@alderferry.example",
    phone: "(360) 555-0142",
    address: ["Alder Ferry Panelworks", "14 Ferry Slip Road", "Marrow Point, WA 98399"],
    timeZone: "America/Los_Angeles",
    currency: "usd",
  },
  tax: {
    regions: [
      { region: "WA", rate: 0.085, freightTaxable: true },
      { region: "ID", rate: 0.06, freightTaxable: false },
      { region: "CA", rate: 0.0725, freightTaxable: false },
    ],
    homeRegion: "WA",
  },
  review: { cap: 250_000 },
  quote: { validDays: 14 },
  upload: { maxBytes: 32 * MEGABYTE, maxFiles: 40 },
  lead: {
    cutOffHour: 12,
    bufferDays: 2,
    transitDays: 3,
    holidays: [
      "2026-11-26",
      "2026-12-25",
      "2027-01-01",
      "2027-05-31",
      "2027-07-05",
      "2027-09-06",
      "2027-11-25",
      "2027-12-24",
    ],
  },
  // The 9.5 mm cutter and 3 mm beside it; the planned share is what mixed cabinet parts reach (common practice, no source).
  nesting: { spacing: 12.5, margin: 10, plannedYield: 0.72 },
  fit: {
    smallestTool: 3.175,
    bridge: 0.2,
    bridgeAsk: 0.5,
    smallestHeldArea: 5_806,
    smallestHeldWidth: 38.1,
    thinFloor: 6.35,
    thinnestFloor: 2.5,
  },
  retention: { abandonedDraftDays: 90 },
  terms: TERMS,
};
