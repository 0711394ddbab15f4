import { describe, expect, it } from "vitest";
import { type Issue } from "../../src/core/issue";
import type { OutTable } from "../../src/sheet/cell";
import {
  CELL_LIMIT,
  checkTable,
  numberRows,
  orBlank,
  requireCells,
  requireLabels,
  wantsLabels,
} from "../../src/sheet/tables";
import { readSeries } from "../../src/sheet/grid";
import { ahead } from "../../src/sheet/calls/ahead";
import { lagcov } from "../../src/sheet/calls/lagcov";
import { model } from "../../src/sheet/calls/model";
import { order } from "../../src/sheet/calls/order";
import { inventedSeries } from "../support/invented";
import { errorOf } from "../support/sheet";

const code = (facts: object) =>
  expect.objectContaining({ facts: expect.objectContaining(facts) as object }) as Issue;

describe("tables", () => {
  it("numbers stand under their names; one that is none is a blank", () => {
    expect(numberRows([[1, NaN]], null)).toEqual([[1, ""]]);
    expect(numberRows([[1, 2]], ["a", "b"])).toEqual([["a", "b"], [1, 2]]); // prettier-ignore
    expect([orBlank(null), orBlank(0)]).toEqual(["", 0]);
  });

  it("header in, header out, unless labels says otherwise", () => {
    const [headed, bare] = [readSeries([["a"], [1]]), readSeries([[1]])];
    expect([wantsLabels({}, headed), wantsLabels({}, bare)]).toEqual([true, false]);
    expect([wantsLabels({ labels: "no" }, headed), wantsLabels({ labels: "yes" }, bare)]).toEqual([
      false,
      true,
    ]);
    expect([wantsLabels({ labels: "auto" }, headed), wantsLabels({ labels: "auto" }, bare)]).toEqual([
      true,
      false,
    ]);
  });

  it("a table with words cannot go without labels", () => {
    expect(() => requireLabels({ labels: "no" })).toThrow(code({ code: "labels-needed" }));
    const series = inventedSeries(40, 2);
    for (const call of [model, order])
      expect(errorOf(call, { series, maxorder: 2, options: "labels=no" })).toMatch(/^#VALUE! This result is a table with words/);
  }); // prettier-ignore

  it.each<[string, OutTable]>([
    ["an infinite number", [[1, Infinity]]],
    ["a number that is none", [[1], [NaN]]],
  ])("%s is refused as too large", (_, table) => {
    expect(() => checkTable(table)).toThrow(code({ code: "too-large" }));
  });

  it.each<[string, OutTable]>([["ragged", [[1, 2], [3]]], ["empty", []], ["without columns", [[]]]])("%s is a fault of ours", (_, table) => {
    expect(() => checkTable(table)).toThrow("rectangle");
  }); // prettier-ignore

  it("a result of more cells than allowed is refused before it is computed", () => {
    expect(() => requireCells(CELL_LIMIT, 1)).not.toThrow();
    expect(() => requireCells(CELL_LIMIT + 1, 1)).toThrow(code({ code: "too-many-cells", cells: 250_001 }));
    const wide = inventedSeries(60, 30).map((row) => row.map((v, k) => v + k));
    expect(errorOf(ahead, { series: wide, horizon: 10_000, model: 0 })).toMatch(/^#VALUE! The result would have 300,030 cells; at most 250,000 are allowed\. /);
    expect(errorOf(lagcov, { series: inventedSeries(60, 2), lags: [Array.from({ length: 100_000 }, () => 1)] })).toMatch(/cells; at most 250,000/);
  }); // prettier-ignore
});
