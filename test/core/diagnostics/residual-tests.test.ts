import { describe, expect, it } from "vitest";
import { breuschGodfrey } from "../../../src/core/diagnostics/breusch-godfrey";
import { changeTests, supWaldP } from "../../../src/core/diagnostics/change";
import { residualTests, type ResidualTest } from "../../../src/core/diagnostics/residual-tests";
import { SUP_WALD_QUANTILES, SUP_WALD_TAILS } from "../../../src/core/diagnostics/sup-wald-quantiles";
import type { Matrix } from "../../../src/core/matrix";
import { fitModel } from "../../../src/core/var/fit";
import type { ModelSettings } from "../../../src/core/var/settings";
import { close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries, normals } from "../../support/invented";
import { sampleOf, settingsOfOrder } from "../../support/requests";

function tests(
  series: Matrix,
  order: number,
  changes: Partial<ModelSettings> = {},
  { drivers = [], lags = [] }: { readonly drivers?: Matrix; readonly lags?: readonly number[] } = {},
): ResidualTest[] {
  const sample = frozen(sampleOf(series, drivers));
  const settings = frozen(settingsOfOrder(series[0].length, order, changes));
  const model = frozen(fitModel({ sample, plan: { kind: "fit", settings } }));
  return residualTests(model, sample, lags);
}

const of = (all: readonly ResidualTest[], method: ResidualTest["method"], about: number | null = null) =>
  all.find((test) => test.method === method && test.about === about)!.figure;
const numbers = (all: readonly ResidualTest[]) => all.map(({ figure }) => figure.statistic ?? -1);

const rows = inventedSeries(160, 3);
const plain = tests(rows, 2);

describe("the rows of the report", () => {
  it("lags and degrees of freedom by rule", () => {
    const figures = plain.map(({ method, figure }) => [method, figure.lags, figure.df, figure.df2 === null]);
    expect(figures.slice(0, 4)).toEqual([
      ["portmanteau", 10, 72, true],
      ["small-sample", 10, 72, true],
      ["lm", 3, 27, true],
      ["f", 3, 27, false],
    ]);
    expect(of(plain, "ljung-box", 2)).toMatchObject({ lags: 10, df: 8 });
    expect(of(plain, "arch")).toMatchObject({ lags: 2, df: 72 });
    expect(of(plain, "chow", 1).df).toBe(7);
    close(of(plain, "rows").statistic!, 158 / 7);
  });

  it("lags asked for", () => {
    const asked = tests(rows, 2, {}, { lags: [6, 1, 1] });
    expect([of(asked, "portmanteau"), of(asked, "lm"), of(asked, "arch")].map(({ lags }) => lags)).toEqual([
      6, 1, 1,
    ]);
  });

  it("every p-value lies within 0 and 1", () => {
    for (const { figure } of plain) if (figure.p !== null) expect(figure.p).toBeGreaterThanOrEqual(0);
    for (const { figure } of plain) if (figure.p !== null) expect(figure.p).toBeLessThanOrEqual(1);
  });

  it("one series of order 0, with and without terms", () => {
    const one = rows.map(([v]) => [v]);
    const constant = tests(one, 0);
    expect(of(constant, "root")).toMatchObject({ statistic: null, gap: "no-lags" });
    expect(of(constant, "portmanteau")).toMatchObject({ df: 10, gap: null });
    const bare = tests(one, 0, { terms: "none" });
    expect(of(bare, "rows").gap).toBe("no-coefficients");
    expect(of(bare, "conditioning").gap).toBe("no-coefficients");
    expect(of(bare, "chow", 0).gap).toBe("no-coefficients");
    expect(of(bare, "lm").gap).toBeNull();
  });

  it("chosen lags, drivers and other fits", () => {
    const driver = rows.map((_, t) => [Math.cos(t * t)]);
    const chosen = tests(rows, 0, { lags: [1, 3] }, { drivers: driver });
    expect(of(chosen, "portmanteau").df).toBe(72);
    expect(of(chosen, "chow", 0).df).toBe(8);
    expect(of(chosen, "ljung-box", 0).df).toBe(8);
    for (const fit of ["yule-walker", "nuttall-strand", "shrinkage"] as const) {
      const figures = tests(rows, 2, { fit });
      expect(figures.every(({ figure }) => figure.gap === null)).toBe(true);
      // the equation's change is judged by least squares, whatever the fit
      close(of(figures, "chow", 1).statistic!, of(plain, "chow", 1).statistic!, { rtol: 1e-8 });
    }
  });

  it("too few rows leave blanks, not failures", () => {
    const few = tests(rows.slice(0, 14), 2);
    expect(of(few, "arch").gap).toBe("rows");
    expect(of(few, "lm").gap).toBe("rows");
    expect(of(few, "chow", 0).gap).toBe("rows");
    expect(of(few, "portmanteau")).toMatchObject({ lags: 3, df: 9 });
    expect(of(tests(rows, 2, {}, { lags: [2] }), "portmanteau").gap).toBe("lags");
    expect(of(tests(rows, 2, {}, { lags: [158] }), "small-sample").gap).toBe("rows");
    expect(of(tests(rows, 2, {}, { lags: [999_999, 999_999, 999_999] }), "lm").gap).toBe("rows");
  });
});

describe("what must not matter", () => {
  it("units", () => {
    const scaled = tests(
      rows.map(([a, b, c]) => [a * 1e6, b / 1e9, c * 12]),
      2,
    );
    const figures = ["portmanteau", "small-sample", "lm", "f", "arch", "skewness", "kurtosis"] as const;
    for (const method of figures)
      close(of(scaled, method).statistic!, of(plain, method).statistic!, { rtol: 1e-8 });
    close(numbers(scaled), numbers(plain), { rtol: 1e-6 });
  });

  it("the order of the series, for the joint statistics", () => {
    const turned = tests(
      rows.map(([a, b, c]) => [c, a, b]),
      2,
    );
    for (const method of ["portmanteau", "small-sample", "lm", "f", "arch"] as const)
      close(of(turned, method).statistic!, of(plain, method).statistic!, { rtol: 1e-9 });
    close(of(turned, "chow", 0).statistic!, of(plain, "chow", 2).statistic!, { rtol: 1e-9 });
    close(of(turned, "ljung-box", 1).statistic!, of(plain, "ljung-box", 0).statistic!, { rtol: 1e-9 });
  });
});

describe("did the equation change?", () => {
  it("by hand: one mean before, another after", () => {
    // means 1 and 5 after row 4 of 8: remainders ±1 throughout, so F = (40 − 8)/(8/6) with the mean of all at 3
    const y = [0, 2, 0, 2, 4, 6, 4, 6].map((v) => [v]);
    const [figure] = changeTests(
      y,
      y.map(() => [1]),
    );
    close(figure.statistic!, 32 / (8 / 6));
  });

  it("finds a slope that turns", () => {
    const draw = normals(5);
    const y = Array.from({ length: 120 }, (_, t) => [Math.abs(t - 60) + draw()]);
    const z = y.map((_, t) => [1, t]);
    expect(changeTests(y, z)[0]).toMatchObject({ p: null, bound: { side: "below", p: 0.001 } });
  });

  it("a regressor that is silent on one side has no figure", () => {
    const draw = normals(5);
    const y = Array.from({ length: 60 }, () => [draw()]);
    const z = y.map((_, t) => [1, t === 50 ? 1 : 0]);
    expect(changeTests(y, z)[0].gap).toBe("exact");
  });

  it("quantiles rise, and p-values fall between them", () => {
    expect(SUP_WALD_QUANTILES).toHaveLength(30);
    SUP_WALD_QUANTILES.forEach((row, i) => {
      expect(row).toHaveLength(SUP_WALD_TAILS.length);
      expect([...row].sort((a, b) => a - b)).toEqual(row);
      if (i > 0) row.forEach((v, j) => expect(v).toBeGreaterThan(SUP_WALD_QUANTILES[i - 1][j]));
    });
    const at = SUP_WALD_TAILS.indexOf(0.05);
    close(supWaldP(SUP_WALD_QUANTILES[3][at], 4).p!, 0.05);
    const middle = supWaldP((SUP_WALD_QUANTILES[3][at] + SUP_WALD_QUANTILES[3][at + 1]) / 2, 4).p!;
    close(middle, Math.sqrt(0.05 * 0.04));
  });

  it("5 % points of one, two and three coefficients, within what a walk of 1,000 steps misses", () => {
    // Andrews (2003), Econometrica 71, 395–397: 8.68, 11.72, 14.13
    const at = SUP_WALD_TAILS.indexOf(0.05);
    close(
      [0, 1, 2].map((q) => SUP_WALD_QUANTILES[q][at]),
      [8.68, 11.72, 14.13],
      { rtol: 0.02 },
    );
  });

  it("outside the table the side is told", () => {
    expect(supWaldP(40, 31)).toMatchObject({ p: null, gap: "untabulated" });
    expect(supWaldP(0.1, 1)).toMatchObject({ p: null, bound: { side: "above", p: 0.99 } });
    expect(supWaldP(90, 1)).toMatchObject({ p: null, bound: { side: "below", p: 0.001 } });
  });
});

describe("in white noise", () => {
  const samples = Array.from({ length: 200 }, (_, seed) => {
    const draw = normals(1000 + seed);
    return tests(
      Array.from({ length: 200 }, () => [draw(), draw()]),
      1,
    );
  });
  const judged = [
    ["small-sample", null],
    ["lm", null],
    ["f", null],
    ["ljung-box", 0],
    ["arch", null],
    ["skewness", null],
    ["chow", 1],
  ] as const;

  it.each(judged)("p-values of %s are spread evenly", (method, about) => {
    const p = samples.map((all) => {
      const found = of(all, method, about);
      return found.p ?? found.bound!.p;
    });
    const share = (limit: number) => p.filter((value) => value < limit).length / p.length;
    // four standard deviations of a share of 200, and what 200 rows leave of an asymptotic distribution
    expect(Math.abs(share(0.5) - 0.5)).toBeLessThan(0.16);
    expect(Math.abs(share(0.1) - 0.1)).toBeLessThan(0.09);
  });

  it("the F form exists wherever its degrees of freedom do", () => {
    const u = rows.slice(0, 14).map(([a, b]) => [a - 10, b - 20]);
    const z = u.map(() => [1]);
    for (const lags of [1, 2, 3, 4, 5, 6]) {
      const { f } = breuschGodfrey(u, z, lags);
      expect(f.gap === null ? f.df2! > 0 : f.gap === "rows").toBe(true);
    }
  });
});
