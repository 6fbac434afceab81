import { type Browser, type Page, test } from "@playwright/test";
import { signIn, type WhoLooks } from "./pages";

type Person = Exclude<WhoLooks, "visitor">;
type State = Awaited<ReturnType<ReturnType<Page["context"]>["storageState"]>>;

/** Pages of people of the demonstration; each signed in once a file of tests, for sign-ins are limited. */
export function signedInAs<Who extends Person>(people: readonly Who[]): (who: Who) => Promise<Page> {
  const url = process.env.KERFPOST_URL ?? "";
  const states = new Map<Person, State>();
  let browserOfTest: Browser | undefined;
  test.beforeAll(async ({ browser }) => {
    browserOfTest = browser;
    for (const who of people) {
      const page = await browser.newPage();
      await signIn(page, url, who);
      states.set(who, await page.context().storageState());
      await page.context().close();
    }
  });
  return async (who) => {
    const storageState = states.get(who);
    if (!browserOfTest || !storageState) throw new Error(`The ${who} is not signed in.`);
    const context = await browserOfTest.newContext({
      storageState,
      baseURL: url,
      viewport: { width: 1440, height: 900 },
    });
    return context.newPage();
  };
}
