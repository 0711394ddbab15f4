import { readFileSync } from "node:fs";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, it } from "vitest";
import { launchBrowser } from "./launch";
import { serveDist } from "./serve";

let browser: Browser;
let site: Awaited<ReturnType<typeof serveDist>>;
beforeAll(async () => {
  [browser, site] = await Promise.all([launchBrowser(), serveDist()]);
});
afterAll(async () => {
  await browser.close();
  await site.close();
});

it("the pane's own page lets the vendor's script run, and says where it belongs when opened outside Excel", async () => {
  const page = await browser.newPage({ viewport: { width: 360, height: 700 } });
  const refused: string[] = [];
  await page.addInitScript(() =>
    document.addEventListener("securitypolicyviolation", ({ violatedDirective, blockedURI, sourceFile }) => {
      // a library asks whether text can be run as code, and takes the refusal for its answer
      const asked = blockedURI === "eval" && sourceFile.endsWith("/functions.js");
      if (!asked) console.error(`refused ${violatedDirective} ${blockedURI} ${sourceFile}`);
    }),
  );
  page.on("console", (message) => {
    if (message.type() === "error" && /refused|Content Security/i.test(message.text()))
      refused.push(message.text());
  });
  // the vendor's library as it is published, served from the package instead of the network
  await page.route("https://appsforoffice.microsoft.com/**", (route) =>
    route.fulfill({
      contentType: "text/javascript",
      body: readFileSync(
        `node_modules/@microsoft/office-js/dist/${new URL(route.request().url()).pathname.split("/").at(-1)}`,
      ),
    }),
  );
  await page.goto(`${site.url}pane.html`);
  await page.getByText("This pane belongs inside Excel.").waitFor();
  expect(await page.evaluate(() => typeof CustomFunctions.associate)).toBe("function");
  expect(refused).toEqual([]);
});
