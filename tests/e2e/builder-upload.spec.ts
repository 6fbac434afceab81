import { expect, test } from "@playwright/test";
import { asBuilder, ORDER_PAGE, upload } from "./builder-steps";
import { drawnFile, textFile } from "./drawn-file";

const signedIn = asBuilder();

test("each file has its own verdict, and the order goes on with those that were taken", async () => {
  const page = await signedIn();
  await page.goto("/orders/new");
  await expect(page.getByText("up to 32 MB a file", { exact: false })).toBeVisible();
  await page
    .locator("input[type=file]")
    .setInputFiles([drawnFile("locker-doors"), textFile("plan.dxf", "%PDF-1.7\n1 0 obj")]);
  const files = page.getByRole("list", { name: "Files" }).getByRole("listitem");
  await expect(files.nth(1)).toContainText("This is a PDF. Export the drawing as DXF");
  await page.getByRole("link", { name: "Go on with 1 of 2" }).click();
  await page.waitForURL(ORDER_PAGE);
  await expect(page.getByText("· 1 drawing")).toBeVisible();
});

test("a file over the limit is refused before it is sent", async () => {
  const page = await signedIn();
  const sent: string[] = [];
  page.on("request", (request) => {
    if (request.url().includes("/api/uploads")) sent.push(request.url());
  });
  await page.goto("/orders/new");
  await page.locator("input[type=file]").setInputFiles({
    name: "everything.dxf",
    mimeType: "application/octet-stream",
    buffer: Buffer.alloc(33 * 1024 * 1024, "0"),
  });
  await expect(page.getByRole("alert")).toContainText("a file may have 32.0 MB");
  expect(sent).toEqual([]);
});

test("a drawing without a part says so and is taken out; another joins the order", async () => {
  const page = await signedIn();
  const line = [
    "0",
    "SECTION",
    "2",
    "ENTITIES",
    "0",
    "LINE",
    "8",
    "0",
    "10",
    "0",
    "20",
    "0",
    "11",
    "90",
    "21",
    "0",
  ];
  await upload(page, [
    drawnFile("locker-doors"),
    textFile("one-line.dxf", `${[...line, "0", "ENDSEC", "0", "EOF"].join("\n")}\n`),
  ]);
  await expect(
    page.getByRole("link", { name: "No part in one-line.dxf: remove or replace it" }),
  ).toBeVisible();
  const sheet = page
    .locator("section")
    .filter({ has: page.getByRole("heading", { name: "one-line.dxf" }) })
    .last();
  await expect(sheet).toContainText("1 open line");
  await sheet.getByText("Remove", { exact: true }).click();
  await sheet.getByRole("button", { name: "Remove it" }).click();
  await expect(page.getByText("· 1 drawing")).toBeVisible();
  await expect(page.getByRole("link", { name: /No part in/ })).toHaveCount(0);

  await page.getByLabel("Add a drawing").setInputFiles([drawnFile("drawer-fronts")]);
  await expect(page.getByText("· 2 drawings")).toBeVisible();
  await expect(page.getByRole("button", { name: "2A" })).toBeVisible();
});

test("what lies in an order comes back byte for byte", async () => {
  const page = await signedIn();
  const file = drawnFile("serving-tray");
  await upload(page, [file]);
  const link = page.getByRole("link", { name: `Download ${file.name}` });
  const response = await page.request.get((await link.getAttribute("href")) ?? "");
  expect(response.headers()["content-disposition"]).toContain("attachment");
  expect(Buffer.compare(await response.body(), file.buffer)).toBe(0);
});
