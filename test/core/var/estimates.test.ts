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
import lutkepohl from "../../reference/lutkepohl-e1.json";
import { blockClose, close } from "../../support/close";
import { readCsv } from "../../support/data";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const y = frozen(inventedSeries(70, 3));
const logDiff = Array.from({ length: 3 }, () => [
  { kind: "log" } as const,
  { kind: "diff", span: 1 } as const,
]);
const german = sampleOf(
  readCsv("e1_west_german_inv_inc_cons_1960Q1_1982Q4.csv", ["invest", "income", "cons"]).slice(0, 76),
);

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
    // Student t, 66 degrees of freedom, 95 % point: 1.668271 (R qt(0.95, 66), from memory of the usual table, 6 digits)
    for (const { low, high, error } of rows) close((high - low) / 2 / error, 1.668271, { rtol: 1e-6 });
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
