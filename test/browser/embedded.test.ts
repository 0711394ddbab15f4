import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { isError, SheetPage } from "./sheet-page";

let sheet: SheetPage;
beforeAll(async () => {
  sheet = await SheetPage.open();
});
afterAll(() => sheet.close());

const NAMES = ["landings", "ice", "electricity", "trips"];
const LEFT = (cells: string) => `'Left over'!${cells}`;
const FORECAST = '=COMOVE.AHEAD(B4:E160,12,,"cycle=52; waves=1")';

describe("the embedded sheet", () => {
  it("shows the demo forecast, 12 rows of 4 series under their names, filled by one formula", async () => {
    const block = await sheet.read("Data!H4:K16");
    expect(block[0]).toEqual(["landings", "ice", "electricity", "trips"]);
    expect(
      block
        .slice(1)
        .flat()
        .every((v) => typeof v === "number" && Number.isFinite(v)),
    ).toBe(true);
    expect(await sheet.read("Data!L4:L17")).toEqual(Array.from({ length: 14 }, () => [null]));
    await sheet.shot("data");
  });

  it("lets the forecast follow when a data cell is changed by keyboard", async () => {
    const [[before]] = await sheet.read("Data!H5");
    await sheet.type("Data", "B160", "300");
    const [[after]] = await sheet.until("Data!H5", ([[v]]) => v !== before);
    expect(after as number).toBeGreaterThan(before as number);
  });

  it("spills a typed LAGCORR, and MODEL feeds AHEAD through its spill reference", async () => {
    await sheet.type("Data", "G24", "=COMOVE.LAGCORR(B4:E160,1)");
    const lags = await sheet.until("Data!G24:M32", (cells) => typeof cells[8][5] === "number");
    expect(lags[0]).toEqual(["lag", "series", "landings", "ice", "electricity", "trips", "bound"]);
    expect(lags[1][2]).toBe(1);

    await sheet.type("Data", "N4", '=comove.model(B4:E160,2,"cycle=52; waves=1")');
    const model = await sheet.until("Data!N4:R19", (cells) => typeof cells[15][4] === "number");
    expect(String(model[0][0])).toMatch(/^comove model p=2; .*series=4; n=156; sum=[0-9a-f]{8}$/);
    await sheet.type("Data", "T4", "=COMOVE.AHEAD(B4:E160,12,N4#)");
    const ahead = await sheet.until("Data!T4:W16", (cells) => typeof cells[12][3] === "number");
    await sheet.type("Data", "Y4", '=COMOVE.AHEAD(B4:E160,12,2,"cycle=52; waves=1")');
    const direct = await sheet.until("Data!Y4:AB16", (cells) => typeof cells[12][3] === "number");
    expect(ahead).toEqual(direct);
  });

  it("follows through a chain of spills when the data change", async () => {
    const [[before]] = await sheet.read("Data!T5");
    await sheet.type("Data", "B160", "180");
    await sheet.until("Data!T5", ([[v]]) => typeof v === "number" && v !== before);
  });

  it("answers #SPILL! when something is in the way, and recovers", async () => {
    await sheet.type("Data", "U10", "in the way");
    await sheet.until("Data!T4", ([[v]]) => isError(v, "#SPILL!"));
    await sheet.clear("Data", "U10");
    await sheet.until(
      "Data!T4:W16",
      (cells) => cells[0][0] === "landings" && typeof cells[12][3] === "number",
    );
  });

  it("keeps dependants of a spill that shrank from going stale", async () => {
    await sheet.type("Data", "AD4", "=COUNT(AF4:AF40)");
    await sheet.type("Data", "AF4", '=COMOVE.STEPS(B4:B24,"none")');
    await sheet.until("Data!AD4", ([[v]]) => v === 20);
    await sheet.type("Data", "AF4", '=COMOVE.STEPS(B4:B9,"none")');
    await sheet.until("Data!AD4", ([[v]]) => v === 5);
  });

  it("tells in words why a cell holds an error, while that cell is selected", async () => {
    await sheet.type("Data", "G40", "=COMOVE.AHEAD(B4:E160,0)");
    await sheet.until("Data!G40", ([[v]]) => isError(v, "#VALUE!"));
    await sheet.select("Data", "G40");
    const message = sheet.page.locator("#message");
    await message.waitFor({ state: "visible" });
    expect(await message.textContent()).toBe(
      "G40For horizon, 0 will not do. Give a whole number from 1 to 10,000.",
    );
    await sheet.shot("error");
    await sheet.select("Data", "G41");
    await message.waitFor({ state: "hidden" });
  });

  it("explains #SPILL! too, and stays silent where a formula catches the error", async () => {
    await sheet.type("Data", "T30", "=COMOVE.AHEAD(B4:E160,2)");
    await sheet.type("Data", "U31", "in the way");
    await sheet.until("Data!T30", ([[v]]) => isError(v, "#SPILL!"));
    await sheet.select("Data", "T30");
    await sheet.page.locator("#message").getByText("something stands in it").waitFor();
    await sheet.clear("Data", "U31");
    await sheet.type("Data", "T30", '=IFERROR(COMOVE.AHEAD(B4:E160,0),"caught")');
    await sheet.until("Data!T30", ([[v]]) => v === "caught");
    await sheet.select("Data", "T30");
    await sheet.page.locator("#message").waitFor({ state: "hidden" });
  });

  it("puts the message beside the cell under the mouse", async () => {
    await sheet.select("Blemishes", "A1");
    const grid = (await sheet.page.locator("#grid").boundingBox())!;
    // G4: right of the row numbers and columns A to F, below the formula line, the column letters and three rows
    await sheet.page.mouse.move(
      grid.x + 46 + 96 + 88 + 88 + 94 + 88 + 20 + 40,
      grid.y + 28 + 20 + 38 + 26 + 24 + 14,
      { steps: 8 },
    );
    await sheet.page.getByText("Series ice, row 24 is blank.").waitFor();
    await sheet.shot("hover");
    await sheet.page.mouse.move(5, 5);
  });

  it("shows the function's description and arguments while a formula is typed", async () => {
    await sheet.type("Data", "G34", "=COMOVE.AH", { enter: false });
    await sheet.page.getByText("COMOVE.AHEAD", { exact: true }).first().waitFor({ state: "visible" });
    await sheet.page.keyboard.type("EAD(");
    const help = (words: string) => sheet.page.getByText(words).first().waitFor({ state: "visible" });
    await help("Forecasts all series together, in original units");
    await help("Range of series, one per column");
    expect(await sheet.page.getByText("Rows to forecast, 1 to 10,000.").first().isVisible()).toBe(false);
    await sheet.page.keyboard.type("B4:E160,");
    await help("Rows to forecast, 1 to 10,000.");
    await sheet.page.waitForTimeout(400);
    await sheet.shot("typing");
    await sheet.page.keyboard.press("Escape");
    await sheet.page.keyboard.press("Escape");
  });

  it("hands over blanks as nothing or as 0, as the switch says", async () => {
    await sheet.type("Data", "AH4", "=COMOVE.LAGCOV(AJ4:AJ8,0)");
    for (const [row, value] of ["3", "5", "", "4", "9"].entries()) {
      if (value !== "") await sheet.type("Data", `AJ${row + 4}`, value);
    }
    await sheet.until("Data!AH4", ([[v]]) => isError(v, "#VALUE!"));
    await sheet.page.getByLabel("0, as on some older clients").check();
    // 3, 5, 0, 4, 9: mean 4.2, squares 131 / 5 − 17.64
    const [[v]] = await sheet.until("Data!AH4", ([[value]]) => typeof value === "number");
    expect(v as number).toBeCloseTo(8.56, 10);
    await sheet.page.getByLabel("nothing", { exact: true }).check();
    await sheet.until("Data!AH4", ([[value]]) => isError(value, "#VALUE!"));
  });

  it("hands over a text of no length as text, never as 0: what STEPS leaves blank stays blank", async () => {
    await sheet.type("Data", "AP4", '=COMOVE.STEPS(B4:B24,"diff")');
    await sheet.type("Data", "AR4", "=COMOVE.LAGCOV(AP4#,0)");
    const [[value]] = await sheet.until("Data!AT5", ([[v]]) => typeof v === "number");
    await sheet.page.getByLabel("0, as on some older clients").check();
    await sheet.page.waitForTimeout(500);
    expect((await sheet.read("Data!AT5"))[0][0]).toBe(value);
    await sheet.page.getByLabel("nothing", { exact: true }).check();
  });

  it("shows spilled numbers without a format at equal decimals and keeps all digits in the cells", async () => {
    const column = (await sheet.read("Data!I25:I32")).flat() as number[];
    expect(String(column[1]).length).toBeGreaterThan(12);
    const shown = await Promise.all(column.map((_, i) => sheet.shown("Data", `I${25 + i}`)));
    expect(shown).toEqual(column.map((value) => value.toFixed(5)));
    // a number that was typed keeps the digits it was typed with
    expect(await sheet.shown("Data", "B5")).toBe("155.8");
  });

  it("fills the sheets that walk the job", async () => {
    const leads = await sheet.until("Leads!A4:G24", (cells) => typeof cells[20][6] === "number");
    // trips now against landings two weeks earlier: lag 2, row trips, column landings
    const [, , landings] = leads.find((row) => row[0] === 2 && row[1] === "trips")!;
    expect(landings as number).toBeGreaterThan(2 * (leads[1][6] as number));
    expect((await sheet.read("Model!A4"))[0][0]).toMatch(/^comove model p=2/);
    const roots = await sheet.until("Model!G4:K12", (cells) => typeof cells[8][0] === "number");
    expect(roots[0]).toEqual(["modulus", "real", "imaginary", "period (rows)", "reading"]);
    await sheet.until("Model!G16:P22", (cells) => typeof cells[6][1] === "number");
    const partial = await sheet.until("Model!G25:N37", (cells) => typeof cells[12][5] === "number");
    expect(partial[0]).toEqual([
      "lag",
      "series",
      "landings",
      "ice",
      "electricity",
      "trips",
      "statistic",
      "p-value",
    ]);
    // the data were invented with two lags
    expect([1, 5, 9].map((row) => (partial[row][7] as number) < 0.05)).toEqual([true, true, false]);
    const implied = await sheet.until("Model!G41:L49", (cells) => typeof cells[8][5] === "number");
    expect(implied[0]).toEqual(["lag", "series", "landings", "ice", "electricity", "trips"]);
    expect(implied[1][3]).toBeCloseTo(implied[2][2] as number, 8);
    const pairs = await sheet.until("Leads!B27:H39", (cells) => typeof cells[12][5] === "number");
    expect(pairs[0]).toEqual(["leader", "follower", "lag", "correlation", "bound", "p-value", "reading"]);
    expect(pairs.map((row) => row[6])).toContain("trips follow landings by 2 rows");
    const helps = await sheet.until("Helps!A4:E8", (cells) => typeof cells[4][1] === "number");
    expect(helps[0]).toEqual(["effect", "landings", "ice", "electricity", "trips"]);
    // trips follow landings; landings follow nothing
    expect(helps[4][1] as number).toBeLessThan(0.001);
    expect(Math.min(...(helps[1].slice(2) as number[]))).toBeGreaterThan(0.05);
    await sheet.until("Helps!A12:H56", (cells) => typeof cells[44][7] === "number");
    const bands = await sheet.until("Forecast!B4:M16", (cells) => typeof cells[12][11] === "number");
    for (const row of bands.slice(1) as number[][]) {
      for (let k = 0; k < 12; k += 3) expect(row[k] < row[k + 1] && row[k + 1] < row[k + 2]).toBe(true);
    }
    expect(isError((await sheet.read("Blemishes!G4"))[0][0], "#VALUE!")).toBe(true);
    for (const name of ["Leads", "Model", "Helps", "Left over", "Forecast", "Blemishes"]) {
      await sheet.select(name, "A1");
      await sheet.page.waitForTimeout(300);
      await sheet.shot(name.toLowerCase().replace(" ", "-"));
    }
  });

  it("estimates 11 coefficients of each of the 4 series: a constant, two halves of a wave, two lags of each", async () => {
    const [head, ...rows] = (await sheet.read("Helps!A12:H57")).filter(([equation]) => equation !== null);
    expect(head).toEqual([
      "equation",
      "regressor",
      "coefficient",
      "low",
      "high",
      "std error",
      "t",
      "p-value",
    ]);
    expect(rows.map(([equation]) => equation)).toEqual(NAMES.flatMap((name) => Array(11).fill(name)));
    for (const [, , coefficient, low, high] of rows as number[][])
      expect(low < coefficient && coefficient < high).toBe(true);
  });

  it("asks five questions of what the model leaves over, and answers each in words", async () => {
    const block = await sheet.until(LEFT("A4:I23"), (cells) => typeof cells[19][8] === "string");
    const [head, ...tests] = block;
    expect(head).toEqual([
      "question", "about", "method", "lags", "statistic", "df", "df 2", "p-value", "reading",
    ]); // prettier-ignore
    // 19 rows and no more: each question in turn, some of all series together, some of each
    const asked = (about: string) => tests.filter((row) => row[1] === about).map(([question]) => question);
    expect(asked("all series")).toEqual([
      ...Array(4).fill("anything left to predict?"),
      "does the spread change?",
      ...Array(3).fill("is the shape normal?"),
      ...Array(3).fill("fit to use?"),
    ]);
    for (const name of NAMES)
      expect(asked(name)).toEqual(["anything left to predict?", "did the equation change?"]);
    expect((await sheet.read(LEFT("A24:I24")))[0]).toEqual(Array(9).fill(null));
    for (const row of tests) {
      expect(typeof row[4]).toBe("number");
      expect(row[8]).toMatch(/^[a-z][a-z0-9 ,.:]{10,90}$/);
    }
    const p = tests.map((row) => row[7]).filter((value) => value !== null) as number[];
    expect(p).toHaveLength(16);
    expect(p.every((value) => value > 0 && value < 1)).toBe(true);
  });

  it("splits every week into what the model expected and what is left over", async () => {
    const weeks = await sheet.read(LEFT("K4:Y160"));
    expect(weeks[0]).toEqual(["week", ...NAMES, null, ...NAMES, null, ...NAMES]);
    expect(weeks.map((row) => row.slice(0, 5))).toEqual(await sheet.read("Data!A4:E160"));
    // the model looks back two weeks
    for (const row of weeks.slice(1, 3)) expect(row.slice(5)).toEqual(Array(10).fill(null));
    for (const row of weeks.slice(3) as number[][]) {
      for (let k = 0; k < NAMES.length; k++) expect(row[6 + k] + row[11 + k]).toBeCloseTo(row[1 + k], 9);
    }
    // with a constant in every equation what is left over sums to zero
    const left = weeks.slice(3).map((row) => row[11] as number);
    expect(left.reduce((sum, value) => sum + value)).toBeCloseTo(0, 6);
    expect(Math.max(...left.map(Math.abs))).toBeGreaterThan(1);
    expect((await sheet.read(LEFT("K161:Y161")))[0]).toEqual(Array(15).fill(null));
    const everything = (await sheet.read(LEFT("A1:Z170"))).flat();
    expect(everything.filter((cell) => typeof cell === "object" && cell !== null)).toEqual([]);
  });

  it("was quiet: no console errors, no refused content, no request to another host", () => {
    expect(sheet.complaints).toEqual([]);
  });

  it("holds the formula it promises", async () => {
    const formula = await sheet.page.evaluate(() =>
      (globalThis as any).comovePage.grid.api
        .getActiveWorkbook()
        .getSheetByName("Data")
        .getRange("H4")
        .getFormula(),
    );
    expect(formula).toBe(FORECAST);
  });
});
