import { describe, expect, it } from "vitest";
import { createCarrier } from "~/services/carrier.server";
import { measure, refusalOf } from "~fakes/carrier/tariff";
import { listen, readBody, sendJson } from "~fakes/local-server";
import { fakesForTests, serviceConfigs, takeUnexpected } from "../../support/fakes";

const running = fakesForTests();

const shop = {
  name: "Alder Ferry Panelworks",
  line1: "2 Slipway Road",
  city: "Marrow Point",
  region: "OR",
  postalCode: "97101",
  country: "US",
} as const;
const builder = {
  name: "Ines Varga",
  line1: "14 Quay Street",
  line2: "APT 3",
  city: "Lower Weir",
  region: "MN",
  postalCode: "55021-1234",
  country: "US",
} as const;

const inches = (weightKg: number, l: number, w: number, h: number) => ({
  weightKg,
  lengthMm: l * 25.4,
  widthMm: w * 25.4,
  heightMm: h * 25.4,
});

describe("the carrier's measures", () => {
  // Worked example of the private carriers' rule in force since 18 August 2025 (design notes SHP-001 to 003):
  // 11.1 x 8.5 x 6.2 in -> 12 x 9 x 7 = 756 in3 -> 756 / 139 = 5.4 -> 6 lb.
  it("rounds sides up to whole inches before dividing by 139", () => {
    expect(measure(inches(1, 11.1, 8.5, 6.2))).toMatchObject({ sides: [12, 9, 7], billedPounds: 6 });
  });

  it("keeps whole inches whole and lets real weight govern when it is more", () => {
    // 10 kg = 22.05 lb -> 23 lb; 40 x 20 x 2 = 1600 in3 -> 11.5 lb.
    expect(measure(inches(10, 40, 20, 2))).toMatchObject({
      sides: [40, 20, 2],
      billedPounds: 23,
      girthInches: 84,
    });
  });

  // Limits: 150 lb, 108 in long, 165 in length plus girth. Flat square packs 2 in thick pass 165 in up to a side of
  // 53.7 in (design notes SHP-007, SHP-008); sides here are whole inches.
  it.each([
    [inches(68.03, 40, 20, 2), undefined],
    [inches(68.05, 40, 20, 2), "heavier than 150 lb"],
    [inches(20, 108, 10, 2), undefined],
    [inches(20, 108.1, 10, 2), "longer than 108 in"],
    [inches(20, 53, 53, 2), undefined],
    [inches(20, 54, 54, 2), "length plus girth over 165 in"],
  ])("takes or refuses %o", (parcel, why) => {
    expect(refusalOf(measure(parcel))).toBe(why);
  });
});

describe("rates", () => {
  it("price each service by billed weight and zone, with surcharges", async () => {
    const found = await running.services.carrier.rates({
      from: shop,
      to: builder,
      parcels: [inches(10, 40, 20, 2), inches(25, 50, 20, 3)],
    });
    // Zone 9 - 5 = 4. First: 23 lb. Second: 25 kg = 55.1 lb -> 56 lb; longer than 48 in and over 50 lb.
    // Ground: 895 + 62 x 23 x 1.4 = 2891.4 -> 2891; 895 + 62 x 56 x 1.4 = 5755.8 -> 5756, + 1850 + 2600 = 10206.
    // Swift: 2450 + 148 x 23 x 1.4 = 7215.6 -> 7216; 2450 + 148 x 56 x 1.4 = 14053.2 -> 14053, + 4450 = 18503.
    expect(found).toEqual({
      ok: true,
      value: {
        refused: [],
        rates: [
          { service: "towpath-ground", name: "Towpath Ground", amount: 13_097, currency: "usd", days: 3 },
          { service: "towpath-swift", name: "Towpath Swift", amount: 25_719, currency: "usd", days: 2 },
        ],
      },
    });
  });

  it("are none when a parcel is over a limit, and the parcel is named", async () => {
    const found = await running.services.carrier.rates({
      from: shop,
      to: builder,
      parcels: [inches(10, 40, 20, 2), inches(10, 120, 20, 2)],
    });
    expect(found).toEqual({
      ok: true,
      value: { rates: [], refused: [{ parcel: 1, why: "longer than 108 in" }] },
    });
  });
});

describe("labels", () => {
  const wanted = (idempotencyKey: string) => ({
    idempotencyKey,
    from: shop,
    to: builder,
    parcel: inches(10, 40, 20, 2),
    service: "towpath-ground",
    reference: "K-1001/1",
  });

  it("are bought once per key", async () => {
    const { carrier } = running.services;
    const first = await carrier.buyLabel(wanted("label-1"));
    expect(first).toMatchObject({
      ok: true,
      value: { amount: 2_891, days: 3, status: "label-made", reference: "K-1001/1" },
    });
    expect(await carrier.buyLabel(wanted("label-1"))).toEqual(first);
    expect(await carrier.buyLabel({ ...wanted("label-1"), reference: "K-1002/1" })).toMatchObject({
      ok: false,
      reason: "conflict",
    });
    expect(running.fakes.carrier.labels().filter(({ reference }) => reference === "K-1001/1")).toHaveLength(
      1,
    );
  });

  it("lead to the parcel's events", async () => {
    const { carrier } = running.services;
    const label = await carrier.buyLabel(wanted("label-2"));
    const number = label.ok ? label.value.trackingNumber : "";
    const scanned = await fetch(`${running.fakes.carrier.url}/_fake/advance/${number}`, { method: "POST" });
    expect(await scanned.json()).toEqual({ status: "collected" });
    for (const status of ["in-transit", "out-for-delivery", "delivered"])
      expect(running.fakes.carrier.advance(number)).toBe(status);
    const tracked = await carrier.track(number);
    expect(tracked.ok && tracked.value.events.map(({ status, place }) => `${status} ${place}`)).toEqual([
      "label-made Marrow Point",
      "collected Marrow Point",
      "in-transit Marrow Point",
      "out-for-delivery Lower Weir",
      "delivered Lower Weir",
    ]);
    expect(await carrier.track("TP00000000000")).toMatchObject({ ok: false, reason: "not-found" });
  });

  it("are void when asked in time, twice alike, and not after a scan", async () => {
    const { carrier } = running.services;
    const early = await carrier.buyLabel(wanted("label-3"));
    const id = early.ok ? early.value.id : "";
    expect(await carrier.voidLabel(id)).toMatchObject({ ok: true, value: { id, status: "void" } });
    expect(await carrier.voidLabel(id)).toMatchObject({ ok: true, value: { id, status: "void" } });
    const late = await carrier.buyLabel(wanted("label-4"));
    running.fakes.carrier.advance(late.ok ? late.value.trackingNumber : "");
    expect(await carrier.voidLabel(late.ok ? late.value.id : "")).toMatchObject({
      ok: false,
      reason: "already-scanned",
    });
  });

  it("are refused over a limit and for an address that is none", async () => {
    const { carrier } = running.services;
    expect(await carrier.buyLabel({ ...wanted("label-5"), parcel: inches(80, 40, 20, 2) })).toMatchObject({
      ok: false,
      reason: "over-limit",
    });
    expect(
      await carrier.buyLabel({ ...wanted("label-6"), to: { ...builder, postalCode: "5502" } }),
    ).toMatchObject({ ok: false, reason: "refused" });
  });
});

describe("when something is wrong", () => {
  it("says unavailable while the service is out of order, and where nobody answers", async () => {
    running.fakes.carrier.failNext(1);
    expect(await running.services.carrier.track("TP1")).toMatchObject({ ok: false, reason: "unavailable" });
    const nobody = createCarrier({ apiUrl: "http://127.0.0.1:9", key: "any" });
    expect(await nobody.track("TP1")).toMatchObject({ ok: false, reason: "unavailable" });
  });

  it("says misconfigured with a wrong key", async () => {
    const stranger = createCarrier({ ...serviceConfigs(running.fakes).carrier, key: "other" });
    expect(await stranger.track("TP1")).toMatchObject({ ok: false, reason: "misconfigured" });
  });

  it("does not believe an answer of another shape", async () => {
    const odd = await listen(
      async (request, response) => {
        await readBody(request);
        sendJson(response, 200, {
          rates: [{ service: "x", name: "x", amount: "12.50", currency: "usd", days: 1 }],
        });
      },
      { port: 0 },
    );
    const found = await createCarrier({ apiUrl: odd.url, key: "any" }).rates({
      from: shop,
      to: builder,
      parcels: [inches(10, 40, 20, 2)],
    });
    await odd.stop();
    expect(found).toMatchObject({ ok: false, reason: "unavailable" });
    expect(found.ok ? "" : found.message).toContain("not as agreed");
  });

  it("fails loudly at requests the stand-in does not know", async () => {
    const { url, key } = running.fakes.carrier;
    const answer = await fetch(`${url}/v1/pickups`, {
      method: "POST",
      headers: { Authorization: `Bearer ${key}` },
    });
    expect(answer.status).toBe(501);
    expect(await answer.json()).toMatchObject({ error: { code: "unknown-request" } });
    expect(takeUnexpected(running.fakes)).toHaveLength(1);
  });
});
