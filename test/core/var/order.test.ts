import { describe, expect, it } from "vitest";
import { type Issue } from "../../../src/core/issue";
import { fitModel } from "../../../src/core/var/fit";
import { bestOrder, chooseOrder, compareOrders, defaultMaxOrder } from "../../../src/core/var/order";
import { regressorCount, regressorsOf } from "../../../src/core/var/regressors";
import { largestOrder, requireOrder, rowsNeeded } from "../../../src/core/var/rows-needed";
import type { Calendar, Terms } from "../../../src/core/var/settings";
import { termCount, termNames } from "../../../src/core/var/terms";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { plainShape, sampleOf, settingsOfOrder } from "../../support/requests";

const stepped = (y: number[][]) => frozen({ y, drivers: [], start: 1 });
const code = (facts: object) =>
  expect.objectContaining({ facts: expect.objectContaining(facts) as object }) as Issue;

describe("rows that a fit needs", () => {
  const constant: Calendar = { terms: "constant", cycle: null, waves: null };

  it("n ≥ p + q + K: two lags of three series with a constant need 2 + 7 + 3", () => {
    expect(rowsNeeded({ ...constant, lags: [1, 2] }, 3, 0)).toBe(12);
    expect(rowsNeeded({ ...constant, lags: [1, 12] }, 3, 1)).toBe(12 + 8 + 3);
    expect(rowsNeeded({ ...constant, lags: [] }, 1, 0)).toBe(2);
  });

  it("the largest order is the one whose rows are there", () => {
    for (const rows of [5, 12, 13, 14, 15, 16, 40]) {
      const top = largestOrder(constant, rows, 3, 0)!;
      expect(() => requireOrder(constant, top, { rows, series: 3, drivers: 0 })).not.toThrow();
      expect(() => requireOrder(constant, top + 1, { rows, series: 3, drivers: 0 })).toThrow(
        code({ code: "too-few-rows", order: top + 1, rows, largest: top }),
      );
    }
    expect(largestOrder(constant, 3, 3, 0)).toBeNull();
  });

  it("a fit on exactly as many rows exists, one fewer is refused", () => {
    const fit = (rows: number) =>
      fitModel({
        sample: sampleOf(inventedSeries(rows, 3)),
        plan: { kind: "fit", settings: settingsOfOrder(3, 2) },
      });
    expect(fit(12).rows).toBe(12);
    expect(() => fit(11)).toThrow(code({ code: "too-few-rows", need: 12, rows: 11, largest: 1 }));
  });

  it("terms and regressors are counted without laying them out", () => {
    for (const terms of ["none", "constant", "trend", "quadratic"] as Terms[])
      for (const cycle of [null, 2, 3, 4, 12])
        for (const waves of [null, 1, 2, 6].filter((w) => w === null || (cycle !== null && w <= cycle / 2))) {
          const calendar = { terms, cycle, waves };
          expect(termCount(calendar)).toBe(termNames(calendar).length);
          const settings = settingsOfOrder(2, 3, calendar);
          expect(regressorCount(settings, 2, 4)).toBe(regressorsOf(settings, 2, 4).length);
        }
  });
});

describe("compareOrders", () => {
  const y = inventedSeries(60, 2);
  const table = compareOrders(stepped(y), plainShape(2), 5);

  it("all orders are on the same rows: a higher order never fits worse", () => {
    expect(table.map(({ order }) => order)).toEqual([0, 1, 2, 3, 4, 5]);
    table.slice(1).forEach(({ logDet, lr }, i) => {
      expect(logDet).toBeLessThanOrEqual(table[i].logDet);
      expect(lr).toBeGreaterThanOrEqual(0);
    });
  });

  it("the ratio test is against the order below, with χ²(K²)", () => {
    expect([table[0].lr, table[0].lrP]).toEqual([null, null]);
    table.slice(1).forEach(({ order, logDet, lr }, i) => {
      const q = 1 + 2 * order;
      expect(lr).toBeCloseTo((55 - q - 0.5) * (table[i].logDet - logDet), 10);
    });
  });

  it("the small-sample criterion is blank where its denominator is not positive", () => {
    const few = compareOrders(stepped(y.slice(0, 14)), plainShape(2), 3);
    // T = 11: T − q − K − 1 = 11 − (1 + 2p) − 3
    expect(few.map(({ aicc }) => aicc === null)).toEqual([false, false, false, false]);
    const fewer = compareOrders(stepped(y.slice(0, 12)), plainShape(2), 3);
    expect(fewer.map(({ aicc }) => aicc === null)).toEqual([false, false, false, true]);
    expect(bestOrder(fewer, "aicc")).not.toBe(3);
  });

  it("the smaller order wins a tie", () => {
    expect(
      bestOrder(
        [
          { ...table[1], order: 1 },
          { ...table[1], order: 2 },
        ],
        "bic",
      ),
    ).toBe(1);
  });

  it("a series that another predicts without error is told, however small the order", () => {
    const late = y.map(([v], t) => [v, t > 0 ? y[t - 1][0] : 0]);
    for (const top of [1, 2])
      expect(() => compareOrders(stepped(late), plainShape(2), top)).toThrow(
        code({ code: "predicted-exactly", order: 1 }),
      );
  });

  it("series that are an exact combination are told, with the terms", () => {
    const sum = y.map(([a, b]) => [a, b, a + b + 5]);
    expect(() => compareOrders(stepped(sum), plainShape(3), 2)).toThrow(code({ code: "exact-combination" }));
  });
});

describe("an automatic order", () => {
  it("looks no further than max(1, min(8, ⌊(n/3 − m − d)/K⌋))", () => {
    expect(defaultMaxOrder(stepped(inventedSeries(90, 3)), plainShape(3))).toBe(8);
    expect(defaultMaxOrder(stepped(inventedSeries(60, 3)), plainShape(3))).toBe(6);
    expect(defaultMaxOrder(stepped(inventedSeries(12, 3)), plainShape(3))).toBe(1);
    expect(defaultMaxOrder(stepped(inventedSeries(400, 3)), plainShape(3, { cycle: 12 }))).toBe(13);
  });

  it("is the smallest criterion of that comparison", () => {
    const sample = stepped(inventedSeries(90, 3));
    const table = compareOrders(sample, plainShape(3), 8);
    for (const criterion of ["aicc", "aic", "bic", "hq"] as const) {
      const values = table.map((row) => row[criterion]!);
      expect(chooseOrder(sample, plainShape(3), criterion, null)).toBe(values.indexOf(Math.min(...values)));
    }
  });

  it("does not depend on how the coefficients are estimated", () => {
    const sample = sampleOf(inventedSeries(90, 3));
    const lags = (fit: "least-squares" | "yule-walker") =>
      fitModel({
        sample,
        plan: { kind: "auto", shape: plainShape(3, { fit }), criterion: "bic", maxOrder: null },
      }).settings.lags;
    expect(lags("yule-walker")).toEqual(lags("least-squares"));
  });

  it("finds the order of an invented process", () => {
    const sample = stepped(inventedSeries(2000, 3));
    expect(chooseOrder(sample, plainShape(3), "bic", null)).toBe(1);
  });
});
