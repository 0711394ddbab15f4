import { describe, expect, it } from "vitest";
import type { Matrix } from "../../../src/core/matrix";
import { Issue } from "../../../src/core/issue";
import { estimates } from "../../../src/core/var/estimates";
import { fitModel } from "../../../src/core/var/fit";
import { likelihoodProblem } from "../../../src/core/var/likelihood-fit";
import { likelihoodAt } from "../../../src/core/var/likelihood";
import { rootsOf } from "../../../src/core/var/roots";
import { simulate } from "../../../src/core/forecast/simulate";
import type { VarModel } from "../../../src/core/var/model";
import type { ModelSettings } from "../../../src/core/var/settings";
import { blockClose, close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries, normals } from "../../support/invented";
import { modelWith } from "../../support/models";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const y = frozen(inventedSeries(120, 3));
const gappy = frozen(
  y.map((row, t) => row.map((v, k) => ((7 * t + 3 * k) % 11 === 0 || t === 50 ? NaN : v))),
);
const driver = frozen(y.map((_, t) => [Math.cos(t * t)]));

const fit = (
  x: Matrix,
  order: number,
  changes: Partial<ModelSettings> = {},
  drivers: Matrix = [],
): VarModel =>
  fitModel({
    sample: sampleOf(x, drivers),
    plan: { kind: "fit", settings: settingsOfOrder(x[0].length, order, { fit: "likelihood", ...changes }) },
  });

const issueOf = (work: () => unknown): Issue["facts"] => {
  try {
    work();
  } catch (thrown) {
    if (thrown instanceof Issue) return thrown.facts;
    throw thrown;
  }
  throw new Error("nothing was refused");
};

describe("the fit of largest likelihood", () => {
  it("of a mean alone is the mean, and the variance around it with divisor n", () => {
    const x = [[1], [2], [6], [7]];
    const model = fit(x, 0);
    close(model.coefficients, [[4]]);
    close(model.noiseCovariance, [[6.5]], { rtol: 1e-7 });
  });

  it("of a mean alone uses every cell there is", () => {
    const model = fit([[1, 5], [2, NaN], [6, 8], [NaN, 9], [7, 8], [8, 1]], 0); // prettier-ignore
    // correlated series: the mean of one also hears of the cells of the other
    expect(model.coefficients[0][0]).not.toBe(24 / 5);
    const alone = fit([[1], [2], [6], [NaN], [7], [8]], 0); // prettier-ignore
    close(alone.coefficients, [[24 / 5]]);
  });

  it("has no slope at its top, whichever the terms", () => {
    for (const changes of [
      {},
      { terms: "trend" },
      { cycle: 4 },
      { cycle: 6, waves: 2 },
      { movingAverage: 1 },
      { lags: [1, 3] },
    ] as const) {
      const lags = "lags" in changes ? changes.lags : [1];
      const model = fit(gappy, 1, { ...changes, lags });
      const { coordinates, data } = likelihoodProblem(sampleOf(gappy), model.settings, model);
      const centre = new Float64Array(coordinates.size);
      const slope = coordinates.slope(
        centre,
        likelihoodAt(data, coordinates.varma(centre), null)!.gradient(),
      );
      // in coordinates of one standard error each
      expect(Math.max(...slope.map(Math.abs)), JSON.stringify(changes)).toBeLessThan(1e-5);
    }
  });

  it("is near least squares when rows are many and roots small", () => {
    const long = inventedSeries(2000, 2);
    const settings = settingsOfOrder(2, 1);
    const squares = fitModel({ sample: sampleOf(long), plan: { kind: "fit", settings } });
    blockClose(fit(long, 1).coefficients, squares.coefficients, 2e-3);
  });

  it("finds the numbers that the data were drawn with, within what chance allows", () => {
    const truth = modelWith([[[0.6, 0.2], [-0.3, 0.4]]], [[1, 0.4], [0.4, 2]], { terms: [[1, -2]] }); // prettier-ignore
    const x = simulate({ model: truth, rows: 3000, start: null, seed: 11 });
    const holes = x.map((row, t) => row.map((v, k) => ((3 * t + k) % 5 === 0 ? NaN : v)));
    estimates(fit(holes, 1), sampleOf(holes), 0.95).forEach(({ regressor, equation, coefficient, error }) => {
      const r = regressor.kind === "lag" ? 1 + regressor.series : 0;
      expect(Math.abs(coefficient - truth.coefficients[r][equation]) / error).toBeLessThan(3.5);
    });
  });

  it("is always stable, even where least squares is not", () => {
    const walk = inventedSeries(40, 1).reduce<number[][]>(
      (sum, [v]) => [...sum, [(sum.at(-1)?.[0] ?? 0) + v - 10]],
      [],
    );
    const model = fit(walk, 1);
    expect(rootsOf(model)[0].modulus).toBeLessThan(1);
  });

  it("moves along when series are measured in other units or stand in another order", () => {
    const model = fit(gappy, 1, { movingAverage: 1 });
    const factor = [1e6, 1e-4, -3];
    const scaled = fit(gappy.map((row) => row.map((v, k) => v * factor[k])), 1, { movingAverage: 1 }); // prettier-ignore
    const back = scaled.coefficients.map((row, r) => {
      const regressor = scaled.regressors[r];
      const from = regressor.kind === "lag" || regressor.kind === "innovation" ? factor[regressor.series] : 1;
      return row.map((v, k) => (v * from) / factor[k]);
    });
    blockClose(back, model.coefficients, 1e-5);
    const order = [2, 0, 1];
    const turned = fit(gappy.map((row) => order.map((k) => row[k])), 1, { movingAverage: 1 }); // prettier-ignore
    blockClose(turned.noiseCovariance, order.map((i) => order.map((j) => model.noiseCovariance[i][j])), 1e-5); // prettier-ignore
  });

  it("takes a driver: its coefficient is what it was drawn with", () => {
    const drawn = inventedSeries(400, 1);
    const x = drawn.map((_, t) => [3 * Math.sin(t * t)]);
    // two of the driver in every row, carried on by the lag that the series was drawn with
    let carried = 0;
    const moved = drawn.map(([v], t) => [v + (carried = 0.55 * carried + 2 * x[t][0])]);
    const model = fit(moved, 1, {}, x);
    const at = model.regressors.findIndex(({ kind }) => kind === "driver");
    expect(Math.abs(model.coefficients[at][0] - 2)).toBeLessThan(0.1);
  });

  it("is the same with a driver shifted by a constant, which the constant takes up", () => {
    const plain = fit(gappy, 1, {}, driver);
    const shifted = fit(gappy, 1, {}, driver.map(([v]) => [v + 100])); // prettier-ignore
    const at = plain.regressors.findIndex(({ kind }) => kind === "driver");
    blockClose([shifted.coefficients[at]], [plain.coefficients[at]], 1e-5);
    blockClose(
      [shifted.coefficients[0].map((v, k) => v + 100 * shifted.coefficients[at][k])],
      [plain.coefficients[0]],
      1e-5,
    );
  });

  it("comes out the same every time", () => {
    const changes = { movingAverage: 1, steps: [[], [{ kind: "diff", span: 1 } as const], []] };
    expect(fit(gappy, 1, changes)).toEqual(fit(gappy, 1, changes));
  });

  it("refuses what has no top, and says which way: noise, where a lag and an innovation stand in for each other", () => {
    const draw = normals(1);
    const noise = Array.from({ length: 60 }, () => [draw(), draw()]);
    expect(issueOf(() => fit(noise, 1, { movingAverage: 1 }))).toEqual({
      code: "likelihood-stuck",
      reason: "ma-root",
    });
  });

  it("refuses a series that never changes, a copy, and one that its own past predicts exactly", () => {
    expect(issueOf(() => fit(y.map(([a]) => [a, 3]), 1)).code).toBe("constant-series"); // prettier-ignore
    expect(issueOf(() => fit(y.map(([a]) => [a, 2 * a]), 1)).code).toBe("exact-combination"); // prettier-ignore
    expect(
      issueOf(() =>
        fit(
          y.map((_, t) => [2 ** -t]),
          1,
          { terms: "none" },
        ),
      ).code,
    ).toBe("nothing-left-over");
  });

  it("refuses too few observed cells, not rows", () => {
    const x = y.slice(0, 20).map((row, t) => (t % 3 === 0 ? row : [row[0], NaN, row[2]]));
    expect(issueOf(() => fit(x, 2))).toMatchObject({ code: "too-few-rows", rows: 7, need: 12 });
  });
});

describe("standard errors", () => {
  it("of a mean alone: the mean's is √(σ²/n)", () => {
    const x = inventedSeries(50, 1);
    const model = fit(x, 0);
    const [{ error }] = estimates(model, sampleOf(x), 0.95);
    close(error, Math.sqrt(model.noiseCovariance[0][0] / 50), { rtol: 1e-6 });
  });

  it("are near those of least squares when rows are many", () => {
    const long = inventedSeries(1500, 2);
    const errors = (model: VarModel) => estimates(model, sampleOf(long), 0.95).map(({ error }) => error);
    const squares = fitModel({
      sample: sampleOf(long),
      plan: { kind: "fit", settings: settingsOfOrder(2, 1) },
    });
    close(errors(fit(long, 1)), errors(squares), { rtol: 0.02 });
  });

  it("grow when cells are missing", () => {
    const whole = estimates(fit(y, 1), sampleOf(y), 0.95);
    const less = estimates(fit(gappy, 1), sampleOf(gappy), 0.95);
    const total = (rows: typeof whole) => rows.reduce((sum, { error }) => sum + Math.log(error), 0);
    expect(total(less)).toBeGreaterThan(total(whole));
  });

  it("cover a moving average as well", () => {
    const rows = estimates(fit(y, 1, { movingAverage: 1 }), sampleOf(y), 0.95);
    expect(rows.filter(({ regressor }) => regressor.kind === "innovation")).toHaveLength(9);
    for (const { error } of rows) expect(error).toBeGreaterThan(0);
  });
});
