import { describe, expect, it } from "vitest";
import { estimates } from "../../src/sheet/calls/estimates";
import { granger } from "../../src/sheet/calls/granger";
import { impliedcov } from "../../src/sheet/calls/impliedcov";
import { model } from "../../src/sheet/calls/model";
import { fitted, residuals } from "../../src/sheet/calls/one-step";
import { partiallag } from "../../src/sheet/calls/partiallag";
import { frozen } from "../support/frozen";
import { inventedSeries } from "../support/invented";
import { ask, errorOf, withHeader } from "../support/sheet";

const rows = frozen(inventedSeries(60, 3));
const names = ["fish", "ice", "trips"];
const series = withHeader(names, rows);

describe("tables about a model", () => {
  it("ESTIMATES names equation and regressor as the block does", () => {
    const table = ask(estimates, { series, model: 1 });
    expect(table[0]).toEqual([
      "equation",
      "regressor",
      "coefficient",
      "low",
      "high",
      "std error",
      "t",
      "p-value",
    ]);
    expect(table.slice(1, 5).map((row) => row.slice(0, 2))).toEqual([
      ["fish", "constant"],
      ["fish", "fish, lag 1"],
      ["fish", "ice, lag 1"],
      ["fish", "trips, lag 1"],
    ]);
    const block = ask(model, { series, model: 1 });
    expect(table.slice(1, 5).map((row) => row[2])).toEqual(block.slice(1, 5).map((row) => row[1]));
  });

  it("GRANGER has effects in rows and causes in columns: trips follow ice, ice follows fish", () => {
    const table = ask(granger, { series: withHeader(names, inventedSeries(200, 3)), model: 1 });
    expect(table[0]).toEqual(["effect", ...names]);
    expect(table.map((row) => row[0])).toEqual(["effect", ...names]);
    expect([table[1][1], table[2][2], table[3][3]]).toEqual(["", "", ""]);
    expect(table[2][1] as number).toBeLessThan(0.001);
    expect(table[3][2] as number).toBeLessThan(0.001);
    expect(table[1][3] as number).toBeGreaterThan(0.01);
  });

  it("GRANGER corrected is never smaller, and bare without a header", () => {
    const plain = ask(granger, { series: rows, model: 2 });
    const adjusted = ask(granger, { series: rows, model: 2, options: "adjust=yes" });
    expect(plain).toHaveLength(3);
    plain.forEach((row, i) =>
      row.forEach((v, j) => i !== j && expect(adjusted[i][j] as number).toBeGreaterThanOrEqual(v as number)),
    );
  });

  it("FITTED and RESIDUALS keep the rows of the range, blanks at the top", () => {
    const padded = [...series, ["", "", ""]];
    for (const call of [fitted, residuals]) {
      const table = ask(call, { series: padded, model: 2, options: "steps=diff" });
      expect(table).toHaveLength(61);
      expect(table[0]).toEqual(names);
      expect(table.slice(1, 4).flat()).toEqual(new Array(9).fill(""));
      expect(
        table
          .slice(4)
          .flat()
          .every((v) => typeof v === "number"),
      ).toBe(true);
    }
  });

  it("RESIDUALS of a block use its numbers, edited or not", () => {
    const block = ask(model, { series, model: 1 }).map((row) => [...row]);
    const before = ask(residuals, { series, model: block });
    block[1][1] = (block[1][1] as number) + 2;
    const after = ask(residuals, { series, model: block });
    expect((before[5][0] as number) - (after[5][0] as number)).toBeCloseTo(2, 10);
    expect(after[5][1]).toBe(before[5][1]);
  });

  it("PARTIALLAG shows the test once per matrix, and IMPLIEDCOV stacks as LAGCOV does", () => {
    const partial = ask(partiallag, { series, lags: 2 });
    expect(partial[0]).toEqual(["lag", "series", ...names, "statistic", "p-value"]);
    expect(partial.slice(1).map((row) => typeof row[5])).toEqual([
      "number",
      "string",
      "string",
      "number",
      "string",
      "string",
    ]);
    const implied = ask(impliedcov, { model: ask(model, { series, model: 1 }), lags: 1 });
    expect(implied[0]).toEqual(["lag", "series", ...names]);
    expect(implied).toHaveLength(7);
  });

  it("header in, header out: the same numbers bare, or with labels as asked", () => {
    for (const call of [fitted, residuals, granger]) {
      const bare = ask(call, { series: rows, model: 1 });
      const labelled = ask(call, { series, model: 1 });
      const first = call === granger ? 1 : 0;
      expect(labelled.slice(1).map((row) => row.slice(first))).toEqual(bare);
      expect(ask(call, { series, model: 1, options: "labels=no" })).toEqual(bare);
      expect(ask(call, { series: rows, model: 1, options: "labels=yes" })[0].slice(first)).toEqual(["y1", "y2", "y3"]); // prettier-ignore
    }
    const bare = ask(partiallag, { series: rows, lags: 2 });
    expect(bare).toHaveLength(6);
    expect(ask(partiallag, { series, lags: 2 }).slice(1).map((row) => row.slice(2, 5))).toEqual(bare); // prettier-ignore
    // a table with words keeps its labels
    expect(ask(estimates, { series: rows, model: 1 })[2].slice(0, 2)).toEqual(["y1", "y1, lag 1"]);
    expect(errorOf(estimates, { series, model: 1, options: "labels=no" })).toMatch(/^#VALUE! This result is a table/); // prettier-ignore
  });

  it("FITTED plus RESIDUALS are the series, and the rows of what STEPS spends are blank", () => {
    const padded = [...Array.from({ length: 2 }, () => ["", "", ""]), ...rows];
    const levels = ask(fitted, { series: padded, model: 1 });
    const rest = ask(residuals, { series: padded, model: 1 });
    expect(levels).toHaveLength(60);
    levels.slice(1).forEach((row, t) =>
      row.forEach((v, k) => expect((v as number) + (rest[t + 1][k] as number)).toBeCloseTo(rows[t + 1][k], 10)),
    ); // prettier-ignore
  });

  it("ESTIMATES and GRANGER take a block's settings only: its edited numbers change nothing", () => {
    const block = ask(model, { series, model: 2 }).map((row) => [...row]);
    block[1][1] = (block[1][1] as number) + 5;
    for (const call of [estimates, granger])
      expect(ask(call, { series, model: block })).toEqual(ask(call, { series, model: 2 }));
  });

  it("limits of ESTIMATES widen with coverage and hold the coefficient between them", () => {
    const narrow = ask(estimates, { series, model: 1, options: "coverage=0.5" }).slice(1);
    const wide = ask(estimates, { series, model: 1, options: "coverage=0,99" }).slice(1);
    narrow.forEach(([, , b, low, high], i) => {
      expect(low as number).toBeLessThan(b as number);
      expect(high as number).toBeGreaterThan(b as number);
      expect(wide[i][3] as number).toBeLessThan(low as number);
    });
  });

  it("a refused option names each allowed one once", () => {
    const text = errorOf(granger, { series, model: 1, options: "draws=3" }) as string;
    const named = text.replace(/^.*Options here: /, "").match(/[a-z]+/g)!;
    expect(new Set(named).size).toBe(named.length);
    expect(named).toContain("spare");
  });

  it("what cannot be is refused in words", () => {
    const copied = rows.map(([a], t) => [a, t === 0 ? 9 : rows[t - 1][0]]);
    expect(errorOf(granger, { series: withHeader(["ice", "later ice"], copied), model: 1 })).toMatch(
      /^#N\/A Series later ice is predicted without any error/,
    );
    expect(errorOf(impliedcov, { model: [["comove model p=1"]], lags: 1 })).toMatch(
      /^#VALUE! This is one cell/,
    );
    const block = ask(model, { series, model: 1 }).map((row) => [...row]);
    block[2][1] = 1.5;
    expect(errorOf(impliedcov, { model: block, lags: 1 })).toMatch(/^#N\/A This model is not stable/);
    expect(errorOf(granger, { series: rows.map(([a]) => [a]), model: 1 })).toBe(
      "#N/A One series alone has no other to be led by. Point at two or more.",
    );
    expect(errorOf(granger, { series, model: 0 })).toMatch(/^#N\/A This model has order 0/);
    expect(errorOf(impliedcov, { model: 2, lags: 1 })).toMatch(/^#VALUE! A model block is needed here/);
    expect(errorOf(partiallag, { series, lags: 30 })).toMatch(/^#N\/A 30 lags of 3 series need/);
  });
});
