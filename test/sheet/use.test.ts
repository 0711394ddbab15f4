import { describe, expect, it } from "vitest";
import { ahead } from "../../src/sheet/calls/ahead";
import { bands } from "../../src/sheet/calls/bands";
import { leadlag } from "../../src/sheet/calls/leadlag";
import { model } from "../../src/sheet/calls/model";
import { response } from "../../src/sheet/calls/response";
import { shockpast } from "../../src/sheet/calls/shockpast";
import { shockshare } from "../../src/sheet/calls/shockshare";
import { simulate } from "../../src/sheet/calls/simulate";
import { steps } from "../../src/sheet/calls/steps";
import { whatif } from "../../src/sheet/calls/whatif";
import { close } from "../support/close";
import { frozen } from "../support/frozen";
import { inventedSeries } from "../support/invented";
import { ask, errorOf, withHeader } from "../support/sheet";

const rows = frozen(inventedSeries(60, 3));
const names = ["landings", "trips", "ice"];
const series = frozen(withHeader(names, rows));
const block = frozen(ask(model, { series, model: 2 }));
const numbers = (table: readonly (readonly unknown[])[]): number[][] => table.map((row) => row.map(Number));

describe("WHATIF", () => {
  const plan = frozen([[null, 21, ""], [undefined, null, null], [9, null, 33]]); // prettier-ignore

  it("answers like AHEAD: header in, header out, one row per row of the plan", () => {
    const table = ask(whatif, { series, plan, model: 2 });
    expect(table[0]).toEqual(names);
    expect(table.length).toBe(4);
    expect([table[1][1], table[3][0], table[3][2]]).toEqual([21, 9, 33]);
    expect(ask(whatif, { series: rows, plan, model: 2 })).toEqual(table.slice(1));
    expect(ask(whatif, { series, plan, model: 2, options: "labels=no" })).toEqual(table.slice(1));
  });

  it("blank rows of the plan count at the top, in between and at the bottom", () => {
    const blanks = [[null, null, null], ["", " ", null]]; // prettier-ignore
    const free = [...blanks, ...blanks];
    expect(ask(whatif, { series, plan: free, model: 2 })).toEqual(ask(ahead, { series, horizon: 4, model: 2 }));
    expect(ask(whatif, { series, plan: [...blanks, [9, null, null], ...blanks], model: 2 }).length).toBe(6);
  }); // prettier-ignore

  it("the plan may carry the names, and the result of AHEAD is a plan", () => {
    expect(ask(whatif, { series, plan: [names, ...plan], model: 2 })).toEqual(
      ask(whatif, { series, plan, model: 2 }),
    );
    const forecast = ask(ahead, { series, horizon: 5, model: block });
    expect(ask(whatif, { series, plan: forecast, model: block })).toEqual(forecast);
  });

  it("uses a block's numbers", () => {
    const edited = block.map((row, i) => (i === 1 ? [row[0], 30, row[2], row[3]] : row));
    expect(ask(whatif, { series, plan, model: edited })).not.toEqual(
      ask(whatif, { series, plan, model: block }),
    );
  });

  it.each([
    [[[1, 2]], "#VALUE! The range for plan has 2 columns; 3 are needed, one per series."],
    [[["trips", "landings", "ice"], [1, 2, 3]], "#VALUE! The plan is headed trips, landings and ice; the series are landings, trips and ice. Use the same names in the same order."],
    [[[1, "soon", 3]], "#VALUE! Plan trips, row 1: text 'soon' is not a number. Correct the cell."],
    [[names], "#VALUE! The plan has 0 rows under its names; 1 to 10,000 are needed, one per row ahead. Blank cells are free."],
    [Array.from({ length: 10_001 }, () => [null, null, null]), "#VALUE! The plan has 10,001 rows under its names; 1 to 10,000 are needed, one per row ahead. Blank cells are free."],
    [null, "#VALUE! Nothing is given for plan. Point at a range or write a value."],
  ])("refuses in words: plan %#", (bad, words) =>
    expect(errorOf(whatif, { series, plan: bad, model: 1 })).toBe(words)); // prettier-ignore

  it("says which cell of a logged series cannot be", () =>
    expect(errorOf(whatif, { series, plan: [[null, null, null], [null, -4, null]], model: 1, options: "steps=log" })).toBe(
      "#VALUE! Plan trips, row 2 ahead: -4 has no logarithm, which the steps of this series take. Impose a value above 0, or choose other steps.",
    )); // prettier-ignore

  it("asks for drivers in all rows of the plan", () => {
    const drivers = rows.map((_, t) => [Math.sin(t)]);
    expect(errorOf(whatif, { series: rows, plan, model: 1, drivers })).toMatch(
      /63 are needed, 3 of them ahead/,
    );
  });
});

describe("RESPONSE", () => {
  it("is labelled: shock, rows ahead from 0, then the responding series", () => {
    const table = ask(response, { model: block, horizon: 2 });
    expect(table[0]).toEqual(["shock to", "ahead", ...names]);
    expect(table.slice(1).map(([to, at]) => `${to} ${at}`)).toEqual(
      names.flatMap((name) => [0, 1, 2].map((at) => `${name} ${at}`)),
    );
    // in column order the first shock moves all, the last itself alone
    expect(table[1].slice(2).every((v) => v !== 0)).toBe(true);
    expect(table[7].slice(2, 4)).toEqual([0, 0]);
  });

  it("a unit shock is one unit of one series", () =>
    expect(ask(response, { model: block, horizon: 1, options: "shock=unit" })[3]).toEqual(["trips", 0, 0, 1, 0])); // prettier-ignore

  it("refuses what is no block, no horizon, no kind of shock", () => {
    expect(errorOf(response, { model: 2, horizon: 2 })).toMatch(/^#VALUE! A model block is needed here/);
    expect(errorOf(response, { model: block, horizon: 0 })).toMatch(/a whole number from 1 to 10,000/);
    expect(errorOf(response, { model: block, horizon: 2, options: "shock=hammer" })).toMatch(
      /Give orthogonal, unit or generalised/,
    );
    expect(errorOf(response, { model: block, horizon: 2, options: "labels=no" })).toMatch(/^#VALUE! /);
  });

  it("asks the covariance to be one, except for unit shocks", () => {
    const bad = block.map((row, i) => (i === block.length - 1 ? [row[0], row[1], row[2], -1] : row));
    expect(errorOf(response, { model: bad, horizon: 2 })).toMatch(/^#N\/A The innovation covariance is not/);
    expect(errorOf(response, { model: bad, horizon: 2, options: "shock=generalised" })).toMatch(/^#N\/A /);
    expect(ask(response, { model: bad, horizon: 2, options: "shock=unit" }).length).toBe(10);
  });
});

describe("SHOCKSHARE", () => {
  it("one row per series and row ahead, one column per shock", () => {
    const table = ask(shockshare, { model: block, horizon: 3 });
    expect(table[0]).toEqual(["series", "ahead", "due to landings", "due to trips", "due to ice"]);
    expect(table.slice(1).map(([name, at]) => `${name} ${at}`)).toEqual(
      names.flatMap((name) => [1, 2, 3].map((at) => `${name} ${at}`)),
    );
    expect(table[1].slice(2)).toEqual([1, 0, 0]);
  });
  it("results too large for a sheet are refused", () => {
    const wide = ask(model, { series: inventedSeries(60, 8), model: 1 });
    expect(errorOf(shockshare, { model: wide, horizon: 10_000 })).toMatch(
      /^#VALUE! The result would have 800,010 cells/,
    );
  });
});

describe("SHOCKPAST", () => {
  it("names the columns, one row per row used", () => {
    const table = ask(shockpast, { series, target: "trips", model: 2 });
    expect(table[0]).toEqual(["actual", "baseline", "due to landings", "due to trips", "due to ice"]);
    expect(table.length).toBe(59);
    close(
      numbers(table.slice(1)).map(([v]) => v),
      rows.slice(2).map((row) => row[1]),
    );
  });

  it("the target may be a name or a column number", () => {
    expect(ask(shockpast, { series, target: 2, model: 2 })).toEqual(
      ask(shockpast, { series, target: " trips ", model: 2 }),
    );
    for (const target of ["ponies", 0, 4, 1.5])
      expect(errorOf(shockpast, { series, target, model: 2 })).toMatch(
        /^#VALUE! For target, .* will not do\. Give the name of a series or a column number from 1 to 3\.$/,
      );
    expect(errorOf(shockpast, { series, target: null, model: 2 })).toBe(
      "#VALUE! Nothing is given for target. Point at a range or write a value.",
    );
  });
});

describe("SIMULATE", () => {
  it("is labelled, and the seed decides", () => {
    const table = ask(simulate, { model: block, rows: 6 });
    expect(table[0]).toEqual(names);
    expect(table.length).toBe(7);
    expect(ask(simulate, { model: block, rows: 6, options: "seed=1" })).toEqual(table);
    expect(ask(simulate, { model: block, rows: 6, options: "seed=2" })).not.toEqual(table);
  });

  it("starts from the result of STEPS, blanks at its top left out", () => {
    const stepped = ask(model, { series, model: 2, options: "steps=diff" });
    const start = ask(steps, { series, steps: "diff" });
    const drawn = ask(simulate, { model: stepped, rows: 3, start });
    expect(ask(simulate, { model: stepped, rows: 3, start: start.slice(-2) })).toEqual(drawn);
    expect(ask(simulate, { model: stepped, rows: 3 })).not.toEqual(drawn);
  });

  it("refuses a start that does not fit, and says what an unstable model needs", () => {
    expect(errorOf(simulate, { model: block, rows: 3, start: [[1, 2]] })).toMatch(/The range for start has 2 columns; 3/); // prettier-ignore
    expect(errorOf(simulate, { model: block, rows: 3, start: [[1, 2, 3]] })).toMatch(/looks back 2 rows/);
    const turned = [["ice", "trips", "landings"], ...rows.slice(0, 3)];
    expect(errorOf(simulate, { model: block, rows: 3, start: turned })).toMatch(/The model block is for/);
    const wild = block.map((row, i) => (i === 2 ? [row[0], 3, row[2], row[3]] : row));
    expect(errorOf(simulate, { model: wild, rows: 3 })).toMatch(
      /^#N\/A This model is not stable: .* Give the rows before the draw as start\.$/,
    );
    expect(ask(simulate, { model: wild, rows: 3, start: rows.slice(0, 2) }).length).toBe(4);
    const drivers = rows.map((_, t) => [Math.sin(t * t)]);
    const driven = ask(model, { series: rows, model: 1, drivers });
    expect(errorOf(simulate, { model: driven, rows: 3 })).toBe(
      "#VALUE! This model uses the drivers x1, and SIMULATE has no place for them. Fit a block without drivers.",
    );
    expect(errorOf(simulate, { model: block, rows: 100_000 })).toMatch(/300,003 cells/);
    expect(errorOf(simulate, { model: block, rows: 3, options: "seed=-1" })).toMatch(/seed/);
  });
});

describe("LEADLAG", () => {
  // trips follow landings by two rows, ice moves against them
  const { length } = rows;
  const noise = inventedSeries(length + 2, 3, 99).map((row, t) =>
    row.map((_, k) => Math.sin((t + 1) ** 2 * (k + 3))),
  );
  const led = Array.from({ length }, (_, t) => [
    noise[t + 2][0],
    5 + noise[t][0] + 0.2 * noise[t][1],
    -noise[t + 1][0] + 0.2 * noise[t][2],
  ]); // prettier-ignore
  const table = ask(leadlag, { series: withHeader(names, led), lags: 4 });

  it("has one row per ordered pair under its headings", () => {
    expect(table[0]).toEqual(["leader", "follower", "lag", "correlation", "bound", "p-value", "reading"]);
    expect(table.length).toBe(7);
  });

  it("says who follows whom by how many rows", () => {
    const said = (leader: string, follower: string) =>
      table.find((row) => row[0] === leader && row[1] === follower)!.at(-1);
    expect(said("landings", "trips")).toBe("trips follow landings by 2 rows");
    expect(said("landings", "ice")).toBe("ice follows landings by 1 row, with opposite sign");
    expect(said("trips", "landings")).toBe("nothing that chance would not show");
  });

  it("says so when two series move in the same row", () => {
    const same = led.map(([a], t) => [a, 3 - a + 0.1 * noise[t][1]]);
    const [, first] = ask(leadlag, { series: same, lags: 2 });
    expect(first.at(-1)).toMatch(/^y[12] moves against y[12] in the same row$/);
  });

  it("refuses one series, and labels=no", () => {
    expect(errorOf(leadlag, { series: led.map(([a]) => [a]), lags: 2 })).toMatch(/^#N\/A One series alone/);
    expect(errorOf(leadlag, { series, lags: 2, options: "labels=no" })).toMatch(/^#VALUE! This result/);
    expect(errorOf(leadlag, { series, lags: 80 })).toMatch(/^#VALUE! Lag 80 reaches beyond/);
  });
});

describe("BANDS, redrawn", () => {
  const redrawn = "bands=redrawn; draws=50";

  it("uses a block's settings, not its numbers", () => {
    const edited = block.map((row, i) => (i === 1 ? [row[0], 30, row[2], row[3]] : row));
    const args = { series, horizon: 3, options: redrawn };
    expect(ask(bands, { ...args, model: edited })).toEqual(ask(bands, { ...args, model: 2 }));
  });

  it("draws and seed belong to it alone", () => {
    for (const key of ["draws", "seed"])
      expect(errorOf(bands, { series, horizon: 3, model: 1, options: `${key}=50` })).toBe(
        `#VALUE! The option ${key} needs bands=redrawn beside it. Add bands=redrawn, or leave ${key} out.`,
      );
  });

  it("says when it would take minutes", () =>
    expect(errorOf(bands, { series, horizon: 5000, model: 1, options: "bands=redrawn; draws=100000" })).toBe(
      "#VALUE! 100,000 draws of this size would take minutes. Use fewer draws, fewer lags or series, or a shorter horizon.",
    )); // prettier-ignore
});
