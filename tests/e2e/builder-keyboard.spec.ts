import { expect, type Locator, type Page, test } from "@playwright/test";
import { asBuilder, upload } from "./builder-steps";
import { drawnFile } from "./drawn-file";

const signedIn = asBuilder();
/** More stops than any of these pages has. */
const MOST_STOPS = 250;

/** Presses Tab until the element has the focus, as somebody without a mouse would. */
async function tabTo(page: Page, element: Locator): Promise<void> {
  for (let stop = 0; stop < MOST_STOPS; stop += 1) {
    if (await element.evaluate((one) => one === document.activeElement)) return;
    await page.keyboard.press("Tab");
  }
  throw new Error(`The Tab key does not reach ${element}.`);
}

async function press(page: Page, element: Locator, key = "Enter"): Promise<void> {
  await element.waitFor();
  await tabTo(page, element);
  await page.keyboard.press(key);
}

test("an order is priced, chosen, quoted and released by keyboard alone", async () => {
  const page = await signedIn();
  await upload(page, [drawnFile("fan-panel")]);

  const stock = page.getByLabel("What is it cut from?");
  await tabTo(page, stock);
  await page.keyboard.type("9 mm birch");
  await expect(stock.locator("option:checked")).toContainText("9 mm birch");
  await press(page, page.getByRole("button", { name: "Yes, go on" }));

  const part = page.getByRole("button", { name: "A", exact: true });
  await press(page, part);
  await expect(page).toHaveURL(/\?part=A/);
  await expect(page.getByLabel("What you call it")).toBeVisible();

  const delivery = page.getByRole("radio", { name: /Ship to/ }).first();
  await tabTo(page, delivery);
  // Pick-up is the last of the choices, however many addresses stand before it: one step back from the first.
  await page.keyboard.press("ArrowUp");
  await expect(page.getByLabel("I pick it up")).toBeChecked();
  await press(page, page.getByRole("button", { name: "Use this", exact: true }));
  await expect(page.getByText("You pick it up at the shop.")).toBeVisible();

  await press(page, page.getByRole("button", { name: "Get a firm quote" }));
  await press(page, page.getByLabel(/I have checked the part list/), "Space");
  await press(page, page.getByRole("button", { name: /^Pay \$/ }));
  await page.waitForURL(/\/pay\//);
});

test("a part in the address is chosen on the drawing and in the list", async () => {
  const page = await signedIn();
  await upload(page, [drawnFile("galley-carcass")]);
  await page.goto(`${page.url()}?part=C`);
  await expect(page.getByRole("button", { name: "C", exact: true })).toHaveAttribute("aria-pressed", "true");
  await expect(page.getByRole("button", { name: /^Part C,/ })).toHaveAttribute("aria-pressed", "true");
});
