import { expect, test } from "@playwright/test";
import { signedInAs } from "./signed-in";

const as = signedInAs(["operator"]);

test("the queue is moved through by keys alone", async () => {
  const page = await as("operator");
  await page.goto("/shop");
  const rows = page.locator("[data-row]");
  await expect(rows.first()).toBeVisible();
  await page.keyboard.press("j");
  await expect(rows.nth(0)).toBeFocused();
  await page.keyboard.press("j");
  await expect(rows.nth(1)).toBeFocused();
  await page.keyboard.press("k");
  await expect(rows.nth(0)).toBeFocused();
  await page.keyboard.press("?");
  await expect(page.getByRole("dialog", { name: "Keys" })).toBeVisible();
  await page.keyboard.press("Escape");
  await expect(page.getByRole("dialog", { name: "Keys" })).toBeHidden();
  await page.keyboard.press("/");
  await expect(page.getByRole("searchbox")).toBeFocused();
  await page.keyboard.type("j");
  await expect(page.getByRole("searchbox")).toHaveValue("j");
  await page.getByRole("searchbox").fill("");
  await page.getByRole("searchbox").blur();
  await page.keyboard.press("ArrowDown");
  const name = await rows.nth(0).textContent();
  await page.keyboard.press("Enter");
  await expect(page.getByRole("heading", { level: 1 })).toHaveText(name ?? "");
});

test("the queue is searched and parted by stage and stock", async () => {
  const page = await as("operator");
  await page.goto("/shop");
  await page.getByRole("searchbox").fill("Tuckett");
  await page.getByRole("button", { name: "Find" }).click();
  await expect(page).toHaveURL(/words=Tuckett/);
  const names = page.locator("[data-row]");
  await expect(names.first()).toBeVisible();
  for (const row of await page.locator("li", { has: page.locator("[data-row]") }).all())
    await expect(row).toContainText("Wilhelmina Tuckett");

  await page.goto("/shop");
  await page.getByRole("link", { name: /^needs an answer/ }).click();
  await expect(page.getByText("Bunk side, pair")).toBeVisible();
  await expect(page.getByText("held: The boards in this lot are warped")).toBeVisible();

  await page.goto("/shop?words=no-such-order");
  await expect(page.getByText("No order here has this stock and these words.")).toBeVisible();
});
