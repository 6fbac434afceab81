import type { Role, ShipTo } from "~/domain/orders";

export interface DemoPerson {
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
  readonly shownUnit: "mm" | "in";
  readonly taxExempt: boolean;
  readonly addresses: readonly ShipTo[];
}

/** Everybody of the demonstration signs in with it; it is printed on the terminal and used nowhere else. */
export const DEMO_PASSWORD = "marrow-point-demo";

const home = (recipient: string, line1: string, city: string, region: string, postcode: string): ShipTo => ({
  recipient,
  line1,
  city,
  region,
  postcode,
  country: "US",
  residential: true,
});

/** Invented people, streets and towns; the addresses of their mail are under a name reserved for examples. */
export const DEMO_PEOPLE = {
  owner: {
    name: "Tilda Varnholt",
    email: "owner@kerfpost.example",
    roles: ["owner"],
    shownUnit: "mm",
    taxExempt: false,
    addresses: [],
  },
  operator: {
    name: "Osker Brennick",
    email: "operator@kerfpost.example",
    roles: ["operator"],
    shownUnit: "mm",
    taxExempt: false,
    addresses: [],
  },
  clerk: {
    name: "Ines Callowmere",
    email: "clerk@kerfpost.example",
    roles: ["clerk"],
    shownUnit: "in",
    taxExempt: false,
    addresses: [],
  },
  relief: {
    name: "Dunstan Oakrill",
    email: "relief@kerfpost.example",
    roles: ["operator", "clerk"],
    shownUnit: "mm",
    taxExempt: false,
    addresses: [],
  },
  builder: {
    name: "Petra Linsdale",
    email: "builder@kerfpost.example",
    roles: ["builder"],
    shownUnit: "mm",
    taxExempt: false,
    addresses: [
      {
        ...home("Petra Linsdale", "Slip 9, 220 Harbor Walk", "Marrow Point", "WA", "98399"),
        phone: "(360) 555-0117",
      },
    ],
  },
  library: {
    name: "Jonah Akerwell",
    email: "jonah@kerfpost.example",
    roles: ["builder"],
    shownUnit: "in",
    taxExempt: true,
    addresses: [
      {
        ...home("Jonah Akerwell", "401 Orchard Row DOCK B", "Tamarack Falls", "OR", "97599"),
        company: "Rolling Shelf Library",
        residential: false,
        phone: "(541) 555-0163",
      },
    ],
  },
  kiosk: {
    name: "Wilhelmina Tuckett",
    email: "wilhelmina@kerfpost.example",
    roles: ["builder"],
    shownUnit: "in",
    taxExempt: false,
    addresses: [
      {
        ...home("Wilhelmina Tuckett", "77 Lantern Court APT 3", "Saltgrass", "CA", "95599"),
        company: "Third Steep Tea Kiosk",
      },
    ],
  },
  trailer: {
    name: "Marek Dovrin",
    email: "marek@kerfpost.example",
    roles: ["builder"],
    shownUnit: "mm",
    taxExempt: false,
    addresses: [home("Marek Dovrin", "1830 Old Quarry Road", "Fennel Gap", "ID", "83899")],
  },
  chandler: {
    name: "Sunniva Reyholt",
    email: "sunniva@kerfpost.example",
    roles: ["builder"],
    shownUnit: "mm",
    taxExempt: false,
    addresses: [
      home("Sunniva Reyholt", "5 Cooper's Landing", "Marrow Point", "WA", "98399"),
      {
        ...home("Sunniva Reyholt", "Boat shed 2, 19 Tideline Way", "Kestrel Bay", "WA", "98599"),
        residential: false,
      },
    ],
  },
} as const satisfies Record<string, DemoPerson>;

export type DemoPersonName = keyof typeof DEMO_PEOPLE;

/** One sign-in for every role. */
export const SIGN_INS = [
  "builder",
  "operator",
  "clerk",
  "owner",
] as const satisfies readonly DemoPersonName[];
