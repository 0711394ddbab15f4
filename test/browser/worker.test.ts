import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { bands } from "../../src/sheet/calls/bands";
import { close } from "../support/close";
import { ask } from "../support/sheet";
import { SheetPage } from "./sheet-page";

let sheet: SheetPage;
beforeAll(async () => {
  sheet = await SheetPage.open();
});
afterAll(() => sheet.close());

const openedWorkers = () =>
  sheet.page
    .workers()
    .map((worker) => worker.url())
    .filter((url) => url.endsWith("/worker.js"));

describe("heavy work in the page", () => {
  it("is done by the worker beside functions.js, with the numbers that Node has", async () => {
    expect(openedWorkers()).toEqual([]);
    const options = "bands=redrawn; draws=4000; coverage=0.9";
    await sheet.type("Data", "T4", `=COMOVE.BANDS(B4:E160,3,2,"${options}")`);
    const cells = await sheet.until("Data!T4:AE7", (block) => typeof block[3][11] === "number", 60);
    expect(openedWorkers().length).toBe(1);

    const data = await sheet.read("Data!B4:E160");
    const expected = ask(bands, { series: data, horizon: 3, model: 2, options });
    expect(cells[0]).toEqual(expected[0]);
    close(cells.slice(1) as number[][], expected.slice(1) as number[][], { rtol: 1e-9 });
    expect(sheet.complaints).toEqual([]);
  }, 120_000);

  it("that the worker refuses is told as elsewhere", async () => {
    await sheet.type(
      "Data",
      "T24",
      '=COMOVE.BANDS(B4:E160,3000,2,"bands=redrawn; draws=4000; coverage=0.9")',
    );
    await sheet.until("Data!T24", ([[v]]) => typeof v === "object" && v?.basicValue === "#VALUE!", 30);
    expect(openedWorkers().length).toBe(1);
  });
});
