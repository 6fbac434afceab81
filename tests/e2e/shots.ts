/**
 * `npm run shots [-- role ...]`: a picture of every page as every role, 1440 and 390 px wide, light and dark, with the
 * demonstration's data, into `.shots/`, and one contact sheet a role. The build must be there.
 */
import { mkdirSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { type Browser, chromium } from "@playwright/test";
import { freePorts, startProduct } from "../../app/commands/product.mjs";
import { addressOf, PAGES, PEOPLE, signIn, type WhoLooks } from "./pages";

const WIDTHS = [1440, 390] as const;
const THEMES = ["light", "dark"] as const;
const OUT = ".shots";

interface Shot {
  readonly title: string;
  readonly file: string;
}

async function shoot(browser: Browser, url: string, who: WhoLooks): Promise<Shot[]> {
  const shots: Shot[] = [];
  for (const width of WIDTHS) {
    const context = await browser.newContext({
      viewport: { width, height: width > 1000 ? 900 : 844 },
      reducedMotion: "reduce",
    });
    const page = await context.newPage();
    if (who !== "visitor") await signIn(page, url, who);
    for (const theme of THEMES) {
      await page.emulateMedia({ colorScheme: theme });
      for (const shown of PAGES[who]) {
        await page.goto(await addressOf(url, shown), { waitUntil: "load" });
        await page.waitForTimeout(400);
        const file = path.join(OUT, who, `${shown.name.replace(/[^a-z0-9]+/gi, "-")}-${width}-${theme}.png`);
        await page.screenshot({ path: file, fullPage: true });
        shots.push({ title: `${shown.name} · ${width} · ${theme}`, file });
      }
    }
    await context.close();
  }
  return shots;
}

async function contactSheet(browser: Browser, who: WhoLooks, shots: readonly Shot[]): Promise<string> {
  const page = await browser.newPage({ viewport: { width: 2000, height: 1200 } });
  const figures = shots.map(({ title, file }) => {
    const source = `data:image/png;base64,${readFileSync(file).toString("base64")}`;
    return `<figure><img src="${source}" alt=""><figcaption>${title}</figcaption></figure>`;
  });
  await page.setContent(
    `<style>body{margin:16px;font:14px sans-serif;display:grid;grid-template-columns:repeat(5,1fr);gap:14px;align-items:start}
    figure{margin:0}img{width:100%;max-height:620px;object-fit:cover;object-position:top;border:1px solid #999}</style>${figures.join("")}`,
  );
  const file = path.join(OUT, `${who}.png`);
  await page.screenshot({ path: file, fullPage: true });
  await page.close();
  return file;
}

const asked = process.argv.slice(2);
const people = PEOPLE.filter((who) => asked.length === 0 || asked.includes(who));
const directory = mkdtempSync(path.join(tmpdir(), "kerfpost-shots-"));
const product = await startProduct({ directory, ports: await freePorts() });
process.env.KERFPOST_DATABASE_URL = product.environment.DATABASE_URL;
const browser = await chromium.launch({
  executablePath: "/usr/bin/chromium",
  args: ["--no-sandbox", "--disable-gpu"],
});
try {
  for (const who of people) {
    mkdirSync(path.join(OUT, who), { recursive: true });
    const shots = await shoot(browser, product.url, who);
    process.stdout.write(`${who}: ${shots.length} pictures, ${await contactSheet(browser, who, shots)}\n`);
  }
} finally {
  await browser.close();
  await product.stop();
  rmSync(directory, { recursive: true, force: true });
}
