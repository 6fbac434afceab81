import { expect, type Page, test } from "@playwright/test";
import { signIn } from "./pages";

const url = process.env.KERFPOST_URL ?? "";
/** Told apart from what an earlier run left in the same database. */
const mark = Date.now().toString(36).slice(-5).toUpperCase();

const go = (page: Page, path: string) => page.goto(`${url}${path}`);

test("a stack comes in, is measured, and is flagged where it is beyond EN 315", async ({ page }) => {
  await signIn(page, url, "operator");
  await page.getByRole("link", { name: "Lots", exact: true }).click();
  await expect(page.getByRole("heading", { name: "Stock" })).toBeVisible();
  await expect(page.getByRole("link", { name: "Price book" })).toHaveCount(0);
  await page.getByRole("link", { name: "Add a lot of 18 mm birch" }).click();
  await page.getByLabel("Code of the lot").fill(`BB-18/${mark}`);
  await page.getByLabel("Sheets on hand").fill("14");
  const first = page.getByRole("group", { name: "The first sheet measured" });
  const points = [
    "corner 1",
    "long edge 1",
    "corner 2",
    "short edge 1",
    "corner 3",
    "long edge 2",
    "corner 4",
  ];
  for (const point of points) await first.getByLabel(point).fill("17.40");
  await page.getByRole("button", { name: "Add the lot" }).click();
  await expect(page.getByRole("alert")).toContainText("measured at all 8 points");
  await expect(page.getByLabel("Code of the lot")).toHaveValue(`BB-18/${mark}`);
  await first.getByLabel("short edge 2").fill("17.01");
  await page.getByRole("button", { name: "Add the lot" }).click();
  await expect(page.getByRole("heading", { name: `Lot BB-18/${mark}` })).toBeVisible();
  /* 18 − (0.4 + 0.03 × 18) = 17.06: MAT-014, EN 315. */
  await expect(page.getByText("Thinnest 17.01 mm is under 17.06 mm")).toBeVisible();
  await page
    .getByRole("group", { name: "Retire" })
    .or(page.getByText("Retire", { exact: true }))
    .first()
    .click();
  await page.getByRole("button", { name: `Retire BB-18/${mark}` }).click();
  await expect(page.getByText("This lot is retired")).toBeVisible();
});

test("the owner drafts prices, sees what they do, and throws them away", async ({ page }) => {
  await signIn(page, url, "owner");
  await go(page, "/owner/price-book");
  const draft = page.getByRole("button", { name: "Draft other prices" });
  if (await draft.isVisible()) await draft.click();
  else await page.getByRole("link", { name: /Go on with draft/ }).click();
  await expect(page.getByRole("heading", { name: /Draft of version/ })).toBeVisible();
  await page.getByLabel("Machine, an hour").fill("180");
  await page.getByRole("button", { name: "Save the draft" }).click();
  const tried = page.getByRole("region", { name: "What it would do" });
  await expect(tried.getByText(/lines? differs?/).first()).toBeVisible();
  await tried
    .getByText(/lines? differs?/)
    .first()
    .click();
  await expect(tried.getByRole("row", { name: /Router|Machine/ }).first()).toBeVisible();
  await page.getByText("Throw the draft away").click();
  await page.getByRole("button", { name: "Throw it away" }).click();
  await expect(page.getByRole("button", { name: "Draft other prices" })).toBeVisible();
});

test("of two owners who change the settings the second is told", async ({ browser }) => {
  const pages: Page[] = [];
  for (let who = 0; who < 2; who++) {
    const page = await (await browser.newContext()).newPage();
    await signIn(page, url, "owner");
    await go(page, "/owner/settings");
    pages.push(page);
  }
  const [one, other] = pages;
  if (!one || !other) throw new Error("Two pages are needed.");
  const holds = one.getByLabel("A quote holds");
  const next = (await holds.inputValue()) === "14" ? "15" : "14";
  await holds.fill(next);
  await one.getByRole("button", { name: "Save the settings" }).click();
  await expect(one.getByText(/^saved \d+ times$/)).toBeVisible();
  await other.getByLabel("On the road").fill("9");
  await other.getByRole("button", { name: "Save the settings" }).click();
  await expect(other.getByRole("alert")).toContainText("Somebody saved other settings");
  await expect(other.getByLabel("On the road")).toHaveValue("9");
  await go(other, "/owner/settings");
  await expect(other.getByLabel("A quote holds")).toHaveValue(next);
  await expect(other.getByLabel("On the road")).not.toHaveValue("9");
  await go(other, "/owner/audit?act=settings.change");
  await expect(other.getByText(/quote\.validDays: 1\d → 1\d/).first()).toBeVisible();
});

test("a machine's week is changed, and a shift that overlaps is refused in words", async ({ page }) => {
  await signIn(page, url, "owner");
  await go(page, "/owner/machines");
  await page.getByRole("link", { name: "North" }).click();
  // The same fields stand empty for another machine until North's are there.
  await expect(page.getByRole("textbox", { name: "Name", exact: true })).toHaveValue("North");
  const saturday = page.getByRole("textbox", { name: "Saturday" });
  await saturday.fill("08:00-12:00, 11:00-13:00");
  await page.getByRole("button", { name: "Save" }).click();
  await expect(page.getByText("11:00 is before 12:00.").first()).toBeVisible();
  await saturday.fill("08:00-12:00");
  await page.getByRole("button", { name: "Save" }).click();
  await expect(page.getByRole("img", { name: "Saturday: 08:00–12:00" })).toBeVisible();
});
