import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { ahead } from "../../src/sheet/calls/ahead";
import { bands } from "../../src/sheet/calls/bands";
import { model } from "../../src/sheet/calls/model";
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

  it("fits likelihoods there too, past blank cells, and fills what is built on the block", async () => {
    await sheet.type("Data", "T30", '=COMOVE.MODEL(B4:D160,1,"fit=likelihood; ma=1; gaps=allow")');
    await sheet.type("Data", "T50", '=COMOVE.AHEAD(B4:D160,3,T30#,"gaps=allow")');
    const block = await sheet.until("Data!T30:W40", (cells) => typeof cells[10][3] === "number", 60);
    const path = await sheet.until("Data!T50:V53", (cells) => typeof cells[3][2] === "number", 60);

    const data = await sheet.read("Data!B4:D160");
    const options = "fit=likelihood; ma=1; gaps=allow";
    const expected = ask(model, { series: data, model: 1, options });
    // two engines round exponentials differently, and a search carries that on: the last digits may differ
    const labels = (cells: readonly (readonly unknown[])[]) =>
      cells.map(([label]) => String(label).replace(/sum=.*/, ""));
    expect(labels(block)).toEqual(labels(expected));
    close(
      block.slice(1).map((row) => row.slice(1)) as number[][],
      expected.slice(1).map((row) => row.slice(1)) as number[][],
      { rtol: 1e-6 },
    );
    const forecast = ask(ahead, { series: data, horizon: 3, model: expected, options: "gaps=allow" });
    close(path.slice(1) as number[][], forecast.slice(1) as number[][], { rtol: 1e-6 });
    expect(openedWorkers().length).toBe(1);
    expect(sheet.complaints).toEqual([]);
  }, 120_000);
});
