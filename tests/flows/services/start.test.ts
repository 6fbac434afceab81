import { spawn } from "node:child_process";
import { once } from "node:events";
import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { readEnvironment } from "~/server/environment.server";
import { FAKE_PORTS, FREE_PORTS, startFakes } from "~fakes/all";
import { CARRIER_KEY } from "~fakes/carrier";
import { listen, sendJson } from "~fakes/local-server";
import { PAYMENTS_SECRET_KEY, PAYMENTS_WEBHOOK_SECRET } from "~fakes/payments";
import { STORAGE_ACCESS_KEY, STORAGE_BUCKET } from "~fakes/storage";
import { servicesFor } from "../../support/fakes";

let dataDirectory: string;

beforeEach(async () => {
  dataDirectory = await mkdtemp(join(tmpdir(), "fakes-"));
});

afterEach(() => rm(dataDirectory, { recursive: true }));

const address = {
  name: "Ines Varga",
  line1: "14 Quay Street",
  city: "Lower Weir",
  region: "MN",
  postalCode: "55021",
  country: "US",
} as const;

describe("all stand-ins together", () => {
  it("hold what they were given over a restart", async () => {
    const first = await startFakes({ ports: FREE_PORTS, dataDirectory });
    const before = servicesFor(first);
    await before.storage.put("drawings/kept", Buffer.from("0\nEOF\n"), "image/vnd.dxf");
    const label = await before.carrier.buyLabel({
      idempotencyKey: "kept",
      from: address,
      to: address,
      parcel: { weightKg: 5, lengthMm: 600, widthMm: 400, heightMm: 50 },
      service: "towpath-ground",
    });
    expect(label.ok).toBe(true);
    before.close();
    await first.stop();

    const second = await startFakes({ ports: FREE_PORTS, dataDirectory });
    const after = servicesFor(second);
    expect(Buffer.from((await after.storage.get("drawings/kept")) ?? []).toString()).toBe("0\nEOF\n");
    expect(await after.carrier.track(label.ok ? label.value.trackingNumber : "")).toMatchObject({
      ok: true,
      value: { status: "label-made" },
    });
    after.close();
    await second.stop();
    expect(second.unexpected()).toEqual([]);
  });

  it("hold by the keys and addresses that the application uses unless told otherwise", async () => {
    const settings = readEnvironment({});
    expect(settings).toMatchObject({
      S3_ENDPOINT: `http://127.0.0.1:${FAKE_PORTS.storage}`,
      S3_BUCKET: STORAGE_BUCKET,
      S3_ACCESS_KEY_ID: STORAGE_ACCESS_KEY,
      STRIPE_API_URL: `http://127.0.0.1:${FAKE_PORTS.payments}`,
      STRIPE_SECRET_KEY: PAYMENTS_SECRET_KEY,
      STRIPE_WEBHOOK_SECRET: PAYMENTS_WEBHOOK_SECRET,
      SMTP_URL: `smtp://127.0.0.1:${FAKE_PORTS.smtp}`,
      CARRIER_URL: `http://127.0.0.1:${FAKE_PORTS.carrier}`,
      CARRIER_KEY,
    });
  });

  it("do not start by halves when a port is taken", async () => {
    const taken = await listen(async (_request, response) => sendJson(response, 200, {}), { port: 0 });
    const free = await listen(async (_request, response) => sendJson(response, 200, {}), { port: 0 });
    await free.stop();
    await expect(
      startFakes({ ports: { ...FREE_PORTS, storage: free.port, carrier: taken.port } }),
    ).rejects.toMatchObject({ code: "EADDRINUSE", port: taken.port });
    await taken.stop();
    await expect(fetch(free.url)).rejects.toThrow();
  });

  it("start from a terminal, say where they are and stop cleanly on SIGTERM", async () => {
    const environment = {
      FAKE_STORAGE_PORT: "0",
      FAKE_PAYMENTS_PORT: "0",
      FAKE_SMTP_PORT: "0",
      FAKE_INBOX_PORT: "0",
      FAKE_CARRIER_PORT: "0",
      FAKE_DATA_DIRECTORY: dataDirectory,
    };
    const child = spawn(process.execPath, ["--import", "tsx", "fakes/start.ts"], {
      env: { ...process.env, ...environment },
      stdio: ["ignore", "pipe", "ignore"],
    });
    const ended = once(child, "exit");
    let said = "";
    for await (const chunk of child.stdout) {
      said += String(chunk);
      if (said.includes("carrier ")) break;
    }
    const inbox = /inbox\s+(\S+)/.exec(said)?.[1] ?? "";
    expect(await (await fetch(`${inbox}/api/messages`)).json()).toEqual([]);
    child.kill("SIGTERM");
    expect(await ended).toEqual([0, null]);
  });
});
