/**
 * Measures what is promised and writes the figures into DEVELOPERS.md between its markers. `npm run measure` builds first.
 */
import { spawn } from "node:child_process";
import { readFileSync, statSync, writeFileSync } from "node:fs";
import { gzipSync } from "node:zlib";
import { SheetPage } from "../browser/sheet-page";

const OPEN = "<!-- measurements -->";
const CLOSE = "<!-- /measurements -->";

const kilobytes = (file: string): string =>
  `${(gzipSync(readFileSync(file), { level: 9 }).length / 1000).toFixed(0)} kB`;
const median = (values: number[]): number => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];

/** Seconds from `npm start` to the address answering. */
async function startSeconds(): Promise<number> {
  const port = "3917";
  const begun = performance.now();
  const server = spawn("node", ["src/cli/start.mjs"], {
    env: { ...process.env, PORT: port },
    stdio: "ignore",
  });
  try {
    for (;;) {
      const answered = await fetch(`http://127.0.0.1:${port}/`).then(
        ({ ok }) => ok,
        () => false,
      );
      if (answered) return (performance.now() - begun) / 1000;
      await new Promise((wait) => setTimeout(wait, 100));
    }
  } finally {
    server.kill();
  }
}

/** Milliseconds from the Enter key to the last cell of a forecast of 12 rows on 156 × 4. */
async function spillMilliseconds(sheet: SheetPage): Promise<number> {
  const times: number[] = [];
  for (let i = 0; i < 9; i++) {
    // each formula differs, so that no result comes from the cache
    await sheet.type("Data", `T${30 + 20 * i}`, `=COMOVE.AHEAD(B4:E160,12,2,"cycle=52; waves=${i + 1}")`, {
      enter: false,
    });
    times.push(
      await sheet.page.evaluate(
        async ([row]) => {
          const { host } = (globalThis as any).comovePage;
          const begun = performance.now();
          const input = document.activeElement!;
          input.dispatchEvent(
            new KeyboardEvent("keydown", { key: "Enter", code: "Enter", keyCode: 13, bubbles: true }),
          );
          for (;;) {
            const [[cell]] = await host.readBlock(`Data!W${row + 12}`);
            if (typeof cell === "number") return performance.now() - begun;
            if (performance.now() - begun > 10_000) throw new Error("the forecast did not come");
            await new Promise((wait) => setTimeout(wait, 1));
          }
        },
        [30 + 20 * i],
      ),
    );
  }
  return median(times.slice(2));
}

const dist = kilobytes("dist/functions.js");
const grid = kilobytes("dist/embedded.js");
const loading = performance.now();
const sheet = await SheetPage.open();
const loaded = (performance.now() - loading) / 1000;
const spill = await spillMilliseconds(sheet);
await sheet.close();
const start = await startSeconds();
statSync("dist/index.html");

const table = [
  "",
  "| what | measured | promised |",
  "| --- | --- | --- |",
  `| \`functions.js\`, gzipped | ${dist} | ≤ 150 kB |`,
  `| the grid of the embedded sheet, gzipped | ${grid} | |`,
  `| \`npm start\` until the address answers | ${start.toFixed(1)} s | ≤ 30 s |`,
  `| browser started, page open, demo forecast filled | ${loaded.toFixed(1)} s | |`,
  `| Enter to the last cell of \`AHEAD\` on 156 × 4, median of 7 | ${spill.toFixed(0)} ms | < 300 ms |`,
  "",
  "",
].join("\n");
console.log(table);
const page = readFileSync("DEVELOPERS.md", "utf8");
const from = page.indexOf(OPEN) + OPEN.length;
writeFileSync("DEVELOPERS.md", page.slice(0, from) + `\n${table}` + page.slice(page.indexOf(CLOSE)));
