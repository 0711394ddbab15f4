import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { SheetPage } from "./sheet-page";

let sheet: SheetPage;
beforeAll(async () => {
  sheet = await SheetPage.open();
});
afterAll(() => sheet.close());

const pane = () => sheet.page.locator("#pane");

describe("the pane beside the embedded sheet", () => {
  it("reads the selected block: series, rows, no problems", async () => {
    await sheet.select("Data", "B4:E160");
    await pane().getByText("4 series: landings, ice, electricity, trips").waitFor();
    await pane().getByText("156 rows").waitFor();
    await pane().getByText("No problems found.").waitFor();
  });

  it("lists what is wrong with a blemished block, in words", async () => {
    await sheet.select("Blemishes", "B4:E160");
    await pane().getByText("3 problems to mend first").waitFor();
    const problems = await pane().locator("li").allTextContents();
    expect(problems).toEqual([
      "Series ice, row 24 is blank. Fill it or shorten the range.",
      "Series electricity, row 49: text 'n/a' is not a number. Correct the cell.",
      expect.stringMatching(/^Series landings, row 82: text '[\d.]+' is not a number/),
    ]);
    expect(await pane().getByRole("button", { name: "Write the forecast here" }).isVisible()).toBe(false);
    await sheet.shot("pane-problems");
  });

  it("writes a forecast with one button, and refuses where something is in the way", async () => {
    await sheet.select("Data", "B4:E160");
    const button = pane().getByRole("button", { name: "Write the forecast here" });
    await button.click();
    await pane()
      .getByText(/would be in the way, the first in G4/)
      .waitFor();
    await pane().getByLabel("Put it at").fill("P40");
    await pane().getByLabel("Rows ahead").fill("6");
    await button.click();
    await pane().getByText("=COMOVE.AHEAD(B4:E160,6) now stands in Data!P40.").waitFor();
    const block = await sheet.until("Data!P40:S46", (cells) => typeof cells[6][3] === "number");
    expect(block[0]).toEqual(["landings", "ice", "electricity", "trips"]);
  });

  it.each([
    [320, 1143],
    [450, 1607],
  ])("fits a pane of %i px without sideways scrolling", async (width, window) => {
    await sheet.page.setViewportSize({ width: window, height: 820 });
    const box = await sheet.page.getByRole("complementary", { name: "Comove" }).boundingBox();
    expect(Math.round(box!.width)).toBe(width);
    const overflow = await sheet.page
      .getByRole("complementary", { name: "Comove" })
      .evaluate((aside) => aside.scrollWidth - aside.clientWidth);
    expect(overflow).toBe(0);
    await sheet.shot(`pane-${width}`);
  });
});
