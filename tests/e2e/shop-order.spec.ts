import { expect, type Page, test } from "@playwright/test";
import { orderIdOf } from "./pages";
import { signedInAs } from "./signed-in";

const as = signedInAs(["operator", "clerk", "owner", "builder"]);

/** The stage that the history's newest move led to. */
const newestMove = (page: Page) =>
  page.getByRole("heading", { name: "History" }).locator("xpath=ancestor::section").locator("li").first();

/** What the page says of the act just done. */
const said = (page: Page, words: string | RegExp) =>
  expect(page.getByRole("status").filter({ hasText: words })).toBeVisible();

test("an order goes from the money to the packing bench, one step taken back on the way", async () => {
  const name = "Galley carcass, port side";
  const id = await orderIdOf(name);
  const operator = await as("operator");

  await operator.goto("/shop");
  const row = operator.getByRole("listitem").filter({ hasText: name }).last();
  await row.getByRole("button", { name: /^Receive/ }).click();
  await said(operator, "is received");

  await operator.goto(`/shop/orders/${id}`);
  await expect(newestMove(operator)).toContainText("paid → received");
  await operator.getByRole("link", { name: /^Nest \d+ pieces/ }).click();
  await expect(operator.getByRole("heading", { level: 1 })).toContainText("not locked yet");
  await operator.getByRole("button", { name: /^Lock \d+ sheet/ }).click();
  await expect(operator.getByRole("heading", { level: 1 })).toHaveText(/^Nest N-\d+$/);
  const nest = (await operator.getByRole("heading", { level: 1 }).textContent())?.replace("Nest ", "") ?? "";

  await operator.getByRole("link", { name: "Schedule its sheets" }).click();
  await expect(operator.getByRole("heading", { level: 1, name: "Schedule" })).toBeVisible();
  const loose = operator.getByRole("listitem").filter({ hasText: `${nest}·` });
  const sheets = await loose.count();
  expect(sheets).toBeGreaterThan(0);
  const put = loose.getByRole("button", { name: "Put it on" });
  for (let left = sheets; left > 0; left -= 1) {
    await loose.getByLabel("Even if the day is full").first().check();
    await put.first().click();
    await expect(put).toHaveCount(left - 1);
  }

  await operator.goto(`/shop/orders/${id}`);
  for (let sheet = 1; sheet <= sheets; sheet += 1) {
    await operator.getByRole("button", { name: "Start cutting" }).first().click();
    await operator.getByLabel("It took").fill("12.5");
    await operator.getByRole("button", { name: "Finish" }).click();
    await said(operator, "The sheet is cut");
  }
  await expect(newestMove(operator)).toContainText("nested → cut");

  await operator.getByRole("button", { name: /^Tabs off: all/ }).click();
  await expect(newestMove(operator)).toContainText("cut → tabs-removed");
  await operator.getByText("Undo the last step").click();
  await operator.getByLabel("Why it is taken back").fill("Two edges still have their tabs.");
  await operator.getByRole("button", { name: "Take it back" }).click();
  await expect(newestMove(operator)).toContainText("tabs-removed → cut");
  await expect(newestMove(operator)).toContainText("Two edges still have their tabs.");
  await operator.getByRole("button", { name: /^Tabs off: all/ }).click();
  await expect(newestMove(operator)).toContainText("cut → tabs-removed");

  const clerk = await as("clerk");
  await clerk.goto("/shipping");
  await clerk.getByRole("link", { name }).click();
  await expect(clerk.getByRole("heading", { level: 1, name })).toBeVisible();
});

test("who comes second is told what happened meanwhile", async () => {
  const id = await orderIdOf("Cockpit locker doors");
  const operator = await as("operator");
  const owner = await as("owner");
  await operator.goto(`/shop/orders/${id}`);
  await owner.goto(`/shop/orders/${id}`);
  await operator.getByRole("button", { name: /^Tabs off: all/ }).click();
  await said(operator, "Tabs are off");

  await owner.getByText("Hold", { exact: true }).click();
  await owner.getByLabel("Why it is held").fill("The lot is measured again.");
  await owner.getByRole("button", { name: "Hold it" }).click();
  await said(owner, "Somebody was quicker");
  await said(owner, "tabs off");
  await said(owner, "Osker Brennick");
  await expect(newestMove(owner)).toContainText("cut → tabs-removed");
});

test("the owner gives a part of the money back, and never more than is left", async () => {
  const name = "Roof fan panel";
  const owner = await as("owner");
  await owner.goto(`/shop/orders/${await orderIdOf(name)}`);
  const payments = owner.getByRole("heading", { name: "Payments" }).locator("xpath=ancestor::section");
  await payments.getByText("Refund", { exact: true }).click();
  await payments.getByLabel("Amount").fill("12.25");
  await payments.getByLabel("Why; the builder is told").fill("One corner is bruised.");
  await payments.getByRole("button", { name: "Give it back" }).click();
  await expect(payments.getByText("$12.25", { exact: true })).toBeVisible();

  await payments.getByText("Refund", { exact: true }).click();
  await payments.getByLabel("Amount").fill("99999.00");
  await payments.getByLabel("Why; the builder is told").fill("More than was paid.");
  await payments.getByRole("button", { name: "Give it back" }).click();
  await said(owner, "is left to give back");

  await owner.goto("/owner/refunds");
  await expect(owner.getByRole("row").filter({ hasText: name })).toContainText("$12.25");
});

test("a spoiled piece is made again, and shipping waits for it", async () => {
  const name = "Light locker panels";
  const id = await orderIdOf(name);
  const operator = await as("operator");
  await operator.goto(`/shop/orders/${id}`);
  await operator.getByText("A piece is spoiled or missing").click();
  await operator.getByLabel("Piece", { exact: true }).selectOption({ index: 1 });
  await operator.getByLabel("Cause").fill("It moved on the vacuum.");
  await operator.getByRole("button", { name: "Mark it and make it again" }).click();
  await expect(newestMove(operator)).toContainText("marked for a remake");
  await expect(operator.getByRole("link", { name: /^Nest 1 piece of/ })).toBeVisible();
});

test("the shop's pages are closed to builders, and the clerk has no nest desk", async () => {
  const builder = await as("builder");
  for (const path of ["/shop", "/shop/nest", "/shop/schedule", "/shipping", "/owner/refunds"])
    expect((await builder.goto(path))?.status(), path).toBe(403);
  const clerk = await as("clerk");
  expect((await clerk.goto("/shop"))?.status()).toBe(200);
  for (const path of ["/shop/nest", "/shop/schedule", "/owner/refunds"])
    expect((await clerk.goto(path))?.status(), path).toBe(403);
});
