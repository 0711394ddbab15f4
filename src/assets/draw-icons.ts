/** Draws icon.svg at the sizes that the manifest names. Run with `npm run icons`. */
import { readFileSync, writeFileSync } from "node:fs";
import { launchBrowser } from "../../test/browser/launch";

const folder = new URL("./", import.meta.url);
const svg = readFileSync(new URL("icon.svg", folder), "utf8");
const browser = await launchBrowser();
const page = await browser.newPage();
for (const size of [16, 32, 64, 80]) {
  await page.setViewportSize({ width: size, height: size });
  await page.setContent(
    `<style>body{margin:0}svg{display:block;width:${size}px;height:${size}px}</style>${svg}`,
  );
  writeFileSync(new URL(`icon-${size}.png`, folder), await page.screenshot({ omitBackground: true }));
}
await browser.close();
