import { expect, type Page, test } from "@playwright/test";
import { answerQuestions, ORDER_PAGE, payByCard, pickUp, upload } from "./builder-steps";
import { drawnFile } from "./drawn-file";
import { signedInAs } from "./signed-in";

const as = signedInAs(["builder", "operator", "clerk", "owner"]);

const write = async (page: Page, words: string) => {
  const thread = page.getByRole("region", { name: "Thread" });
  await thread.getByRole("textbox").fill(words);
  await thread.getByRole("button", { name: "Send" }).click();
  await expect(thread.getByText(words)).toBeVisible();
};

/** Nests the order's waiting pieces, locks the nest and marks them cut. */
async function nestAndCut(operator: Page, staffPage: string): Promise<void> {
  await operator.goto(staffPage);
  await operator.getByRole("link", { name: /^Nest 1 piece of/ }).click();
  await operator.getByRole("button", { name: /^Lock \d+ sheet/ }).click();
  await expect(operator.getByRole("heading", { level: 1 })).toHaveText(/^Nest N-\d+$/);
  await operator.goto(staffPage);
  await operator.getByRole("button", { name: "Mark 1 piece cut without a run" }).click();
  await expect(operator.getByRole("button", { name: /^Tabs off: all/ })).toBeVisible();
}

test("four people carry one order: a question, a remake, a pick-up and a partial refund", async () => {
  test.setTimeout(240_000);
  const builder = await as("builder");
  const operator = await as("operator");
  const clerk = await as("clerk");
  const owner = await as("owner");

  // The builder: draws, chooses, asks, pays.
  await upload(builder, [drawnFile("fan-panel")]);
  await answerQuestions(builder, "9 mm birch");
  await pickUp(builder);
  await builder.getByRole("button", { name: "Get a firm quote" }).click();
  await expect(builder.getByRole("button", { name: /^Pay \$/ })).toBeVisible();
  await write(builder, "Is the fan opening cut to the line as drawn?");
  const orderPage = builder.url();
  const id = new URL(orderPage).pathname.split("/")[2] ?? "";
  expect(orderPage).toMatch(ORDER_PAGE);
  const staffPage = `/shop/orders/${id}`;

  // The operator answers; the builder sees it without asking.
  await operator.goto(staffPage);
  await expect(operator.getByText("Is the fan opening cut to the line as drawn?")).toBeVisible();
  await write(operator, "Yes: the cutter runs inside the line.");
  await expect(builder.getByText("Yes: the cutter runs inside the line.")).toBeVisible();

  await builder.getByLabel(/I have checked the part list/).check();
  await builder.getByRole("button", { name: /^Pay \$/ }).click();
  await payByCard(builder, "4242 4242 4242 4242");
  await expect(builder.getByRole("heading", { name: "Paid", exact: true })).toBeVisible();

  // The operator: receives, nests, cuts; a piece is spoiled and made again.
  await operator.goto(staffPage);
  await operator.getByRole("button", { name: /^Receive/ }).click();
  await expect(operator.getByRole("link", { name: /^Nest 1 piece of/ })).toBeVisible();
  await nestAndCut(operator, staffPage);
  await operator.getByText("A piece is spoiled or missing").click();
  await operator.getByLabel("Piece", { exact: true }).selectOption({ index: 1 });
  await operator.getByLabel("Cause").fill("A splinter along the opening.");
  await operator.getByRole("button", { name: "Mark it and make it again" }).click();
  await expect(operator.getByRole("link", { name: /^Nest 1 piece of/ })).toBeVisible();
  await nestAndCut(operator, staffPage);
  await operator.getByRole("button", { name: /^Tabs off: all/ }).click();

  // The clerk: counts the pile, tells the builder, has it signed for.
  await clerk.goto(`/shipping/${id}`);
  await clerk.getByRole("button", { name: "All that are ready are here" }).click();
  await expect(clerk.getByText("1 of 1 counted.")).toBeVisible();
  await clerk.goto(`/shipping/${id}?step=leave`);
  await clerk.getByRole("button", { name: "Tell the builder it is ready" }).click();
  await expect(clerk.getByText(/^Told /)).toBeVisible();
  await clerk.getByLabel("Name of who takes it").fill("Petra Linsdale");
  const pad = clerk.getByRole("img", { name: "Sign here" });
  const box = await pad.boundingBox();
  if (!box) throw new Error("There is nothing to sign on.");
  await clerk.mouse.move(box.x + 60, box.y + box.height / 2);
  await clerk.mouse.down();
  await clerk.mouse.move(box.x + 160, box.y + box.height / 3, { steps: 5 });
  await clerk.mouse.move(box.x + 240, box.y + box.height / 2, { steps: 5 });
  await clerk.mouse.up();
  await expect(clerk.getByRole("img", { name: "Signed" })).toBeVisible();
  await clerk.getByRole("button", { name: "Picked up and signed for" }).click();
  await expect(clerk.getByText("Picked up since")).toBeVisible();

  // The owner gives a part back; the builder sees it all.
  await owner.goto(staffPage);
  const payments = owner.getByRole("heading", { name: "Payments" }).locator("xpath=ancestor::section");
  await payments.getByText("Refund", { exact: true }).click();
  await payments.getByLabel("Amount").fill("10.00");
  await payments.getByLabel("Why; the builder is told").fill("For the wait.");
  await payments.getByRole("button", { name: "Give it back" }).click();
  await expect(payments.getByText("$10.00", { exact: true })).toBeVisible();

  await builder.goto(orderPage);
  await expect(builder.getByRole("img", { name: /^Stage shipped/ })).toBeVisible();
  await expect(builder.getByText("$10.00").first()).toBeVisible();

  // Every step was told by mail.
  const inbox = await builder.request.get(
    `${process.env.KERFPOST_INBOX_URL}/api/messages?to=builder@kerfpost.example`,
  );
  const reference =
    (
      await builder
        .getByText(/KP-\d+/)
        .first()
        .textContent()
    )?.match(/KP-\d+/)?.[0] ?? "";
  const subjects = JSON.stringify(await inbox.json());
  expect(subjects).toContain(reference);
});
