import { expect, test } from "@playwright/test";
import { orderIdOf, signIn } from "./pages";

const url = process.env.KERFPOST_URL ?? "";

test("the operator takes tabs off with a scanner, offline for a while, and takes the last act back", async ({
  page,
  context,
}) => {
  await signIn(page, url, "operator");
  await page.goto(`${url}/shop/bench/orders/${await orderIdOf("Cash drawer fronts")}`);
  const good = page.getByRole("button", { name: /^Good/ });
  await expect(good.first()).toBeVisible();
  await page.waitForLoadState("networkidle");
  const before = await good.count();
  const height = await good.first().evaluate((button) => button.getBoundingClientRect().height);
  expect(height).toBeGreaterThanOrEqual(56);

  await page.keyboard.type("A 1");
  await page.keyboard.press("Enter");
  await expect(good).toHaveCount(before - 1);
  await expect(page.getByRole("button", { name: /^Take back/ })).toBeVisible();

  await context.setOffline(true);
  await good.first().click();
  await expect(page.getByText("act waits for the line")).toBeVisible();
  await context.setOffline(false);
  await expect(page.getByText("act waits for the line")).toBeHidden();
  await page.getByRole("button", { name: /^Take back/ }).click();
  await expect(good).toHaveCount(before - 1);
});

test("the clerk counts, packs, labels and hands over an order in four steps", async ({ page }) => {
  await signIn(page, url, "clerk");
  const order = `${url}/shipping/${await orderIdOf("Engine room vent")}`;
  await page.goto(order);
  await page.getByRole("button", { name: "All that are ready are here" }).click();
  await expect(page.getByText(/\d+ of \d+ counted\./)).toBeVisible();
  await page.goto(`${order}?step=bundles`);
  await page.getByRole("button", { name: /^Close/ }).click();
  await expect(page.getByText(/parcels? closed\./)).toBeVisible();
  await page.goto(`${order}?step=label`);
  await page.getByRole("button", { name: /^Buy/ }).click();
  await expect(page.getByRole("img", { name: "Label of parcel 1 as it prints" })).toBeVisible();
  const href = await page.getByRole("link", { name: "Print the label" }).first().getAttribute("href");
  const printed = await page.request.get(`${url}${href}`);
  expect(printed.headers()["content-type"]).toBe("application/pdf");
  expect((await printed.body()).subarray(0, 5).toString()).toBe("%PDF-");
  await page.goto(`${order}?step=leave`);
  await page.getByText("Hand over to the carrier").first().click();
  await page.getByRole("button", { name: "The carrier has it" }).click();
  await expect(page.getByText("With the carrier since")).toBeVisible();
});
