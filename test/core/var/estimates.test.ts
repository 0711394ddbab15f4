import { describe, expect, it } from "vitest";
import { inverseSymmetric, multiply, transpose } from "../../../src/core/linalg";
import { grangerPValues, holm } from "../../../src/core/diagnostics/granger";
import { designOf } from "../../../src/core/var/design";
import { estimates } from "../../../src/core/var/estimates";
import { fitModel } from "../../../src/core/var/fit";
import { fittedLevels, residualRows } from "../../../src/core/var/one-step-levels";
import { leastSquares } from "../../../src/core/var/least-squares";
import { fUpper } from "../../../src/core/distributions";
import reference from "../../reference/statsmodels-var.json";
import single from "../../reference/statsmodels-coefficients.json";
import lutkepohl from "../../reference/lutkepohl-e1.json";
import { blockClose, close } from "../../support/close";
import { readCsv } from "../../support/data";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const macro = sampleOf(readCsv("macrodata.csv", ["realgdp", "realcons", "realinv"]));
const danish = sampleOf(readCsv("danish_johansen_juselius_1990.csv", ["lrm", "lry", "ibo", "ide"]));
const y = frozen(inventedSeries(70, 3));
const logDiff = Array.from({ length: 3 }, () => [
  { kind: "log" } as const,
  { kind: "diff", span: 1 } as const,
]);
const german = sampleOf(
  readCsv("e1_west_german_inv_inc_cons_1960Q1_1982Q4.csv", ["invest", "income", "cons"]).slice(0, 76),
);

/** The data and settings of a reference case. */
const studied = ({ set, order }: { readonly set: string; readonly order: number }) => {
  if (set === "german") return { sample: german, settings: settingsOfOrder(3, order, { steps: logDiff }) };
  if (set === "macro") return { sample: macro, settings: settingsOfOrder(3, order, { steps: logDiff }) };
  return { sample: danish, settings: settingsOfOrder(4, order) };
};

describe("estimates", () => {
  it("standard errors are √((ZᵀZ)⁻¹ ⊗ Σ) by the normal equations", () => {
    const settings = settingsOfOrder(3, 2);
    const model = fitModel({ sample: sampleOf(y), plan: { kind: "fit", settings } });
    const { z } = designOf({ y, drivers: [], start: 1 }, settings, 2);
    const inverse = inverseSymmetric(multiply(transpose(z), z))!;
    const expected = [0, 1, 2].flatMap((i) =>
      inverse.map((row, r) => Math.sqrt(row[r] * model.noiseCovariance[i][i])),
    );
    close(
      estimates(model, sampleOf(y), 0.95).map(({ error }) => error),
      expected,
      { rtol: 1e-7 },
    );
  });

  it("agrees with statsmodels on Lütkepohl's example, and limits hold t quantiles on T − q", () => {
    const settings = settingsOfOrder(3, 2, { steps: logDiff });
    const model = fitModel({ sample: german, plan: { kind: "fit", settings } });
    const rows = estimates(model, german, 0.9);
    const { errors } = reference.cases.find(({ name }) => name === "german order 2")!;
    close(
      rows.map(({ error }) => error),
      [0, 1, 2].flatMap((i) => errors.map((row) => row[i])),
      { rtol: 1e-9 },
    );
    close(
      rows.map(({ coefficient }) => coefficient),
      lutkepohl.coef.flat(),
      { rtol: 1e-9 },
    );
  });

  it.each(single.cases)("is the table of single regressions by statsmodels: $name", (expected) => {
    const { sample, settings } = studied(expected);
    const rows = estimates(fitModel({ sample, plan: { kind: "fit", settings } }), sample, expected.coverage);
    close(rows.map(({ coefficient }) => coefficient), expected.coefficients.flat(), { rtol: 1e-8 }); // prettier-ignore
    close(rows.map(({ error }) => error), expected.errors.flat(), { rtol: 1e-9 }); // prettier-ignore
    close(rows.map(({ t }) => t), expected.t.flat(), { rtol: 1e-8 }); // prettier-ignore
    close(rows.map(({ p }) => p), expected.p.flat(), { rtol: 1e-7 }); // prettier-ignore
    close(rows.map(({ low }) => low), expected.low.flat(), { rtol: 1e-7 }); // prettier-ignore
    close(rows.map(({ high }) => high), expected.high.flat(), { rtol: 1e-7 }); // prettier-ignore
  });

  it("do not exist for an equation that leaves nothing over", () => {
    const copied = sampleOf(y.map(([a], t) => [a, t === 0 ? 9 : y[t - 1][0]]));
    for (const terms of ["constant", "none"] as const) {
      const settings = settingsOfOrder(2, 1, { terms });
      const model = fitModel({ sample: copied, plan: { kind: "fit", settings } });
      expect(() => estimates(model, copied, 0.95)).toThrow("nothing-left-over");
      expect(() => grangerPValues(copied, settings, 0)).toThrow("nothing-left-over");
    }
  });
});

describe("one step ahead", () => {
  it("fitted plus residuals give the data back, blanks where lags are spent", () => {
    const model = fitModel({ sample: sampleOf(y), plan: { kind: "fit", settings: settingsOfOrder(3, 2) } });
    const fitted = fittedLevels(model, sampleOf(y));
    const residuals = residualRows(model, sampleOf(y));
    expect([fitted.length, residuals.length]).toEqual([70, 70]);
    expect(fitted.slice(0, 2).flat().every(Number.isNaN)).toBe(true);
    blockClose(
      fitted.slice(2).map((row, t) => row.map((v, k) => v + residuals[t + 2][k])),
      y.slice(2),
    );
  });

  it("undoes log and differences from the actual rows before: y[t] = fitted·exp(residual)", () => {
    const settings = settingsOfOrder(3, 1, { steps: logDiff });
    const model = fitModel({ sample: german, plan: { kind: "fit", settings } });
    const fitted = fittedLevels(model, german);
    const residuals = residualRows(model, german);
    expect(fitted.findIndex((row) => !Number.isNaN(row[0]))).toBe(2);
    blockClose(
      fitted.slice(2).map((row, t) => row.map((v, k) => v * Math.exp(residuals[t + 2][k]))),
      german.series.slice(2),
    );
  });

  it("residuals of least squares are orthogonal to their regressors", () => {
    const settings = settingsOfOrder(3, 2, { terms: "trend", cycle: 4 });
    const model = fitModel({ sample: sampleOf(y), plan: { kind: "fit", settings } });
    const { z } = designOf({ y, drivers: [], start: 1 }, settings, 2);
    const cross = multiply(transpose(z), residualRows(model, sampleOf(y)).slice(2));
    for (const v of cross.flat()) expect(Math.abs(v)).toBeLessThan(1e-7);
  });
});

describe("Granger's question", () => {
  it("is the F test of leaving the cause's lags out of one equation", () => {
    const settings = settingsOfOrder(3, 2);
    const p = grangerPValues(sampleOf(y), settings, 0);
    const full = designOf({ y, drivers: [], start: 1 }, settings, 2);
    const squares = (design: typeof full, k: number) =>
      leastSquares(design).residuals.reduce((sum, row) => sum + row[k] ** 2, 0);
    for (const [effect, cause] of [
      [1, 0],
      [0, 1],
      [2, 1],
      [0, 2],
    ]) {
      // prettier-ignore
      const keep = full.regressors.flatMap((r, at) => (r.kind === "lag" && r.series === cause ? [] : [at]));
      const restricted = {
        ...full,
        regressors: keep.map((at) => full.regressors[at]),
        z: full.z.map((row) => keep.map((at) => row[at])),
      };
      const [rss, rss0] = [squares(full, effect), squares(restricted, effect)];
      close(p[effect][cause], fUpper((rss0 - rss) / 2 / (rss / (68 - 7)), 2, 68 - 7), { rtol: 1e-8 });
    }
  });

  it.each(single.cases)("agrees with F tests of single regressions by statsmodels: $name", (expected) => {
    const { sample, settings } = studied(expected);
    const off = (p: readonly (readonly (number | null)[])[]) =>
      p.map((row, i) => row.filter((_, j) => j !== i) as number[]);
    close(off(grangerPValues(sample, settings, 0)), off(expected.granger), { rtol: 1e-7 });
    // fitted at order p + d, tested at the first p lags
    close(off(grangerPValues(sample, settings, expected.spare)), off(expected.grangerSpare), { rtol: 1e-7 });
  });

  it("tests just the lags used, the spare ones beyond the order", () => {
    const settings = settingsOfOrder(3, 4, { lags: [1, 4] });
    const p = grangerPValues(sampleOf(y), settings, 1);
    const full = designOf({ y, drivers: [], start: 1 }, { ...settings, lags: [1, 4, 5] }, 5);
    const keep = full.regressors.flatMap((r, at) =>
      r.kind === "lag" && r.series === 0 && r.lag !== 5 ? [] : [at],
    );
    const squares = (z: typeof full.z) =>
      leastSquares({ ...full, z, regressors: z[0].map(() => full.regressors[0]) }).residuals.reduce(
        (sum, row) => sum + row[1] ** 2,
        0,
      );
    const [rss, rss0] = [squares(full.z), squares(full.z.map((row) => keep.map((at) => row[at])))];
    close(p[1][0], fUpper((rss0 - rss) / 2 / (rss / (65 - 10)), 2, 65 - 10), { rtol: 1e-8 });
  });

  it("refuses a series that never changes, with terms or without", () => {
    const constant = sampleOf(y.map(([a]) => [a, 5]));
    for (const terms of ["constant", "none"] as const)
      expect(() => grangerPValues(constant, settingsOfOrder(2, 1, { terms }), 0)).toThrow("constant-series");
  });

  it("sees that each invented series leads the next, and not the other way round", () => {
    const p = grangerPValues(sampleOf(inventedSeries(300, 3)), settingsOfOrder(3, 1), 0);
    expect(Math.max(p[1][0], p[2][1])).toBeLessThan(1e-6);
    expect(Math.min(p[0][1], p[1][2], p[0][2])).toBeGreaterThan(0.01);
  });

  it("does not depend on units or on the order of the series", () => {
    const p = grangerPValues(sampleOf(y), settingsOfOrder(3, 2), 1);
    const moved = grangerPValues(
      sampleOf(y.map(([a, b, c]) => [1e6 * c, 1e-4 * a, b])),
      settingsOfOrder(3, 2),
      1,
    );
    const from = [2, 0, 1];
    from.forEach((i, r) => from.forEach((j, c) => i !== j && close(moved[r][c], p[i][j], { rtol: 1e-8 })));
  });

  it("Holm's correction by hand", () => {
    expect(holm([[NaN, 0.01], [0.04, NaN]])).toEqual([[NaN, 0.02], [0.04, NaN]]); // prettier-ignore
    expect(holm([[0.9, 0.01, 0.8, 0.02]])[0]).toEqual([1, 0.04, 1, 0.06]);
  });
});
