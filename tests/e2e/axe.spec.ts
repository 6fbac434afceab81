import AxeBuilder from "@axe-core/playwright";
import { expect, test } from "@playwright/test";
import { addressOf, PAGES, PEOPLE, signIn } from "./pages";

const url = process.env.KERFPOST_URL ?? "";

for (const who of PEOPLE)
  test(`every page a ${who} can open has no serious accessibility violation`, async ({ page }) => {
    test.setTimeout(180_000);
    if (who !== "visitor") await signIn(page, url, who);
    const found: string[] = [];
    for (const shown of PAGES[who]) {
      await page.goto(await addressOf(url, shown));
      for (const scheme of ["light", "dark"] as const) {
        await page.emulateMedia({ colorScheme: scheme, reducedMotion: "reduce" });
        const builder = new AxeBuilder({ page });
        /* Only colours differ in the dark. */
        const { violations } = await (scheme === "dark"
          ? builder.withRules(["color-contrast"])
          : builder
        ).analyze();
        for (const { id, impact, nodes } of violations)
          if (impact === "serious" || impact === "critical")
            found.push(`${shown.name} (${scheme}): ${id} at ${nodes[0]?.target.join(" ")}`);
      }
    }
    expect(found).toEqual([]);
  });

test("every page is as wide as a narrow phone and no wider", async ({ page }) => {
  test.setTimeout(180_000);
  await page.setViewportSize({ width: 360, height: 740 });
  const wide: string[] = [];
  for (const who of PEOPLE) {
    await page.context().clearCookies();
    if (who !== "visitor") await signIn(page, url, who);
    for (const shown of PAGES[who]) {
      await page.goto(await addressOf(url, shown));
      const width = await page.evaluate(() => document.documentElement.scrollWidth);
      if (width > 360) wide.push(`${who}, ${shown.name}: ${width} px`);
    }
  }
  expect(wide).toEqual([]);
});
