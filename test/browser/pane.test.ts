import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { SheetPage } from "./sheet-page";

let sheet: SheetPage;
beforeAll(async () => {
  sheet = await SheetPage.open();
});
afterAll(() => sheet.close());

const pane = () => sheet.page.locator("#pane");
const button = () => pane().getByRole("button", { name: "Write the forecast here" });

describe("the pane beside the embedded sheet", () => {
  it("begins with the demo series: names, pictures, rows, nothing to mend", async () => {
    await pane().getByText("4 series, 156 rows").waitFor();
    expect(await pane().locator(".name").allTextContents()).toEqual([
      "landings",
      "ice",
      "electricity",
      "trips",
    ]);
    expect(await pane().locator(".sparkline path").count()).toBe(4);
    await pane().getByText("Nothing to mend.").waitFor();
  });

  it("proposes a place that is free, and writes the forecast there with one button", async () => {
    expect(await pane().getByLabel("First cell").inputValue()).toBe("M4");
    await button().click();
    await pane().getByText("The formula stands in M4 and fills 13 rows of 4 columns.").waitFor();
    const block = await sheet.until("Data!M4:P16", (cells) => typeof cells[12][3] === "number");
    expect(block[0]).toEqual(["landings", "ice", "electricity", "trips"]);
    expect(await sheet.page.evaluate(() => (globalThis as any).comovePage.host.selectedAddress())).toBe(
      "Data!M4",
    );
    // turning to another sheet does not move the place there
    await sheet.select("Leads", "B7");
    expect(await pane().getByLabel("First cell").inputValue()).toBe("M4");
    await sheet.select("Data", "M4");
    await sheet.shot("pane-written");
  });

  it("is taken back by one undo", async () => {
    await sheet.page.evaluate(() => (globalThis as any).comovePage.grid.api.undo());
    await sheet.until("Data!M4:P16", (cells) => cells.flat().every((cell) => cell === null));
  });

  it("takes a selected cell outside the block for the place, and refuses where something is in the way", async () => {
    await sheet.select("Data", "G30");
    expect(await pane().getByLabel("First cell").inputValue()).toBe("G30");
    await sheet.select("Data", "G10");
    await button().click();
    await pane()
      .getByText(/^\d+ cells would be in the way, the first at G10/)
      .waitFor();
    expect((await sheet.read("Data!G10"))[0][0]).toBe(46062 - 7 * 1);
  });

  it("refuses to cover the data it reads, and says what is wrong with a field", async () => {
    await pane().getByLabel("First cell").fill("C150");
    await button().click();
    await pane().getByText("The forecast would cover the data it reads.").waitFor();
    await pane().getByLabel("First cell").fill("somewhere");
    await button().click();
    await pane().getByText("'somewhere' is not a cell.").waitFor();
    await pane().getByLabel("Rows ahead").fill("0");
    await button().click();
    await pane().getByText("Rows ahead must be a whole number from 1 to 10,000.").waitFor();
  });

  it("can be used by keyboard alone, and shows the formula before it is written", async () => {
    await pane().getByLabel("Rows ahead").fill("6");
    await pane().getByLabel("Rows ahead").focus();
    const press = (key: string) => sheet.page.keyboard.press(key);
    await press("Tab");
    await press("Control+A");
    await sheet.page.keyboard.type("G40");
    await press("Tab");
    await sheet.page.keyboard.type("52");
    await press("Tab");
    await sheet.page.keyboard.type("1");
    expect(await pane().locator(".formula").textContent()).toBe(
      '=COMOVE.AHEAD(B4:E160,6,,"cycle=52; waves=1")',
    );
    await press("Tab");
    await press("Enter");
    const block = await sheet.until("Data!G40:J46", (cells) => typeof cells[6][3] === "number");
    // the same model as the demo's own formula
    expect(block.slice(1)).toEqual((await sheet.read("Data!H5:K10")).slice(0, 6));
  });

  it("lists what is wrong with a blemished block, leads to the cells, and sees when they are mended", async () => {
    await sheet.select("Blemishes", "B4:E160");
    await pane().getByText("3 things to mend first").waitFor();
    expect(await pane().locator(".problems li").allTextContents()).toEqual([
      "C27Series ice, row 24 is blank. Fill it or shorten the range.",
      "D52Series electricity, row 49: text 'n/a' is not a number. Correct the cell.",
      expect.stringMatching(/^B85Series landings, row 82: text '[\d.]+' is not a number/),
    ]);
    expect(await button().isVisible()).toBe(false);
    await pane().getByText("hand a blank cell to a formula as 0").waitFor();
    await sheet.shot("pane-problems");

    await pane().getByRole("button", { name: "Go to C27" }).click();
    await expect
      .poll(() => sheet.page.evaluate(() => (globalThis as any).comovePage.host.selectedAddress()))
      .toBe("Blemishes!C27");
    await sheet.type("Blemishes", "C27", "108.5");
    await pane().getByText("2 things to mend first").waitFor();
    expect(await pane().getByText("hand a blank cell to a formula as 0").count()).toBe(0);
  });

  it.each([
    [320, 1200],
    [450, 1800],
  ])("fits a pane of %i px without sideways scrolling", async (width, window) => {
    await sheet.page.setViewportSize({ width: window, height: 1000 });
    const aside = sheet.page.getByRole("complementary", { name: "Comove" });
    expect(Math.round((await aside.boundingBox())!.width)).toBe(width);
    for (const [name, address] of [
      ["clean", "Data!B4:E160"],
      ["blemished", "Blemishes!B4:E160"],
    ]) {
      const [target, cells] = address.split("!");
      await sheet.select(target, cells);
      expect(await aside.evaluate((element) => element.scrollWidth - element.clientWidth)).toBe(0);
      await sheet.shot(`pane-${width}-${name}`);
    }
  });

  it("was quiet: no console errors, no refused content, no request to another host", () => {
    expect(sheet.complaints).toEqual([]);
  });
});
