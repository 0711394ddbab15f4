import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { bands } from "../../src/sheet/calls/bands";
import { close } from "../support/close";
import { ask } from "../support/sheet";
import { SheetPage } from "./sheet-page";

let sheet: SheetPage;
/** Workers that the page has opened so far. */
const opened: string[] = [];
beforeAll(async () => {
  sheet = await SheetPage.open(1500, (page) => {
    page.on("worker", (worker) => opened.push(worker.url()));
    return Promise.resolve();
  });
});
afterAll(() => sheet.close());

const running = () => sheet.page.workers().filter((worker) => worker.url().endsWith("/worker.js")).length;
const LONG = "bands=redrawn; draws=100000; coverage=0.9";
const SHORT = "bands=redrawn; draws=300; coverage=0.9";
const isFilled = (block: unknown[][]) => typeof block[3][11] === "number";

/** Waits until so many workers are at work. */
async function runningCount(wanted: number): Promise<void> {
  for (let waited = 0; running() !== wanted && waited < 20_000; waited += 100)
    await sheet.page.waitForTimeout(100);
  expect(running()).toBe(wanted);
}

/** A formula whose options stand in a cell, so that they can change while it runs. */
async function begin(formulaCell: string, optionsCell: string): Promise<void> {
  await sheet.type("Data", optionsCell, LONG);
  await sheet.type("Data", formulaCell, `=COMOVE.BANDS(B4:E160,3,2,${optionsCell})`);
  await runningCount(1);
}

describe("a call that takes long", () => {
  it("is given up when what it reads changes: the new result comes, and no cell tells of the old one", async () => {
    await begin("T4", "T2");
    await sheet.type("Data", "T2", SHORT);
    const cells = await sheet.until("Data!T4:AE7", isFilled, 60);
    const data = await sheet.read("Data!B4:E160");
    const expected = ask(bands, { series: data, horizon: 3, model: 2, options: SHORT });
    close(cells.slice(1) as number[][], expected.slice(1) as number[][], { rtol: 1e-9 });
    // the worker that was at it went with it, and another did the short work
    expect(opened.filter((url) => url.endsWith("/worker.js"))).toHaveLength(2);
    expect(sheet.complaints).toEqual([]);
  }, 120_000);

  it("is given up when its formula is deleted", async () => {
    await begin("T24", "T22");
    await sheet.select("Data", "T24");
    await sheet.page.keyboard.press("Delete");
    await sheet.page.waitForFunction(() => true);
    for (let waited = 0; running() > 0 && waited < 10_000; waited += 100)
      await sheet.page.waitForTimeout(100);
    expect(running()).toBe(0);
    expect((await sheet.read("Data!T24"))[0][0]).toBeNull();
  }, 120_000);

  it("goes on when something else in the sheet changes, which is calculated meanwhile", async () => {
    await sheet.type("Data", "T42", "bands=redrawn; draws=30000; coverage=0.9");
    await sheet.type("Data", "T44", "=COMOVE.BANDS(B4:E160,3,2,T42)");
    await runningCount(1);
    const before = opened.length;
    await sheet.type("Data", "T50", "=1+1");
    await sheet.until("Data!T44:AE47", isFilled, 90);
    expect((await sheet.read("Data!T50"))[0][0]).toBe(2);
    expect(opened.length).toBe(before);
    expect(sheet.complaints).toEqual([]);
  }, 120_000);
});
