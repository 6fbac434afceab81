import { type Browser, expect, type Page, test } from "@playwright/test";
import type { DrawnFile } from "./drawn-file";
import { signIn } from "./pages";

const url = process.env.KERFPOST_URL ?? "";
export const ORDER_PAGE = /\/orders\/[0-9a-f]{32}(\?|$)/;

/** A page signed in as the demonstration's builder; signed in once a file of tests, for sign-ins are limited. */
export function asBuilder(): () => Promise<Page> {
  let state: Awaited<ReturnType<ReturnType<Page["context"]>["storageState"]>> | undefined;
  let browserOfTest: Browser | undefined;
  test.beforeAll(async ({ browser }) => {
    browserOfTest = browser;
    const page = await browser.newPage();
    await signIn(page, url, "builder");
    state = await page.context().storageState();
    await page.context().close();
  });
  return async () => {
    const context = await browserOfTest?.newContext({
      ...(state ? { storageState: state } : {}),
      baseURL: url,
      viewport: { width: 1440, height: 900 },
    });
    if (!context) throw new Error("No browser was given.");
    return context.newPage();
  };
}

/** Sends drawings on the page for new ones and waits for the order's own page. */
export async function upload(page: Page, files: readonly DrawnFile[]): Promise<void> {
  await page.goto("/orders/new");
  await page.locator("input[type=file]").setInputFiles([...files]);
  await page.waitForURL(ORDER_PAGE);
}

/** Says that the size is right as declared and chooses the stock whose name begins so. */
export async function answerQuestions(page: Page, stock: string): Promise<void> {
  const select = page.getByLabel("What is it cut from?");
  await select.waitFor();
  const label = (await select.locator("option").allTextContents()).find((one) => one.startsWith(stock));
  if (label === undefined) throw new Error(`No stock begins with ${stock}.`);
  await select.selectOption(label);
  await page.getByRole("button", { name: "Yes, go on" }).click();
  await expect(page.getByRole("heading", { name: "Two questions first" })).toHaveCount(0);
}

export async function pickUp(page: Page): Promise<void> {
  await page.getByLabel("I pick it up").check();
  await page.getByRole("button", { name: "Use this", exact: true }).click();
  await expect(page.getByText("You pick it up at the shop.")).toBeVisible();
}

/** The large figure of the price or of the quote, in cents. */
export async function shownTotal(page: Page): Promise<number> {
  const words = await page.locator("aside .text-price").textContent();
  return Math.round(Number(words?.replace(/[$,]/g, "")) * 100);
}

/** Fills the pay page's card and presses its button. */
export async function payByCard(page: Page, number: string): Promise<void> {
  await page.waitForURL(/\/pay\//, { waitUntil: "commit" });
  await page.getByLabel("Card number").fill(number);
  await page.getByLabel("Expiry (MM/YY)").fill("12/34");
  await page.getByLabel("CVC").fill("123");
  await page.getByRole("button", { name: /^Pay/ }).click();
}

/** From an uploaded drawing to a quote that waits for its payment. */
export async function toQuote(page: Page, file: DrawnFile, stock: string): Promise<void> {
  await upload(page, [file]);
  await answerQuestions(page, stock);
  await pickUp(page);
  await page.getByRole("button", { name: "Get a firm quote" }).click();
  await expect(page.getByRole("button", { name: /^Pay \$/ })).toBeVisible();
}
