import { describe, expect, it } from "vitest";
import { impliedCovariances } from "../../../src/core/moments/implied-covariance";
import { add, scale, transpose } from "../../../src/core/linalg";
import type { Matrix } from "../../../src/core/matrix";
import { invertible } from "../../../src/core/state-space/invertible";
import type { Varma } from "../../../src/core/state-space/varma-space";
import { likelihoodAt, type LikelihoodData } from "../../../src/core/var/likelihood";
import { observedSample, pastWeights } from "../../../src/core/var/observed";
import { regressorsOf } from "../../../src/core/var/regressors";
import type { StepPlan } from "../../../src/core/prepare/steps";
import type { VarModel } from "../../../src/core/var/model";
import { cellCovariance, cellsOf, logDensity } from "../../support/brute-force";
import { close } from "../../support/close";
import { inventedSeries } from "../../support/invented";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const PHI: Matrix[] = [
  [[0.5, 0.1], [0.3, 0.4]],
  [[0.1, -0.05], [0, 0.2]],
]; // prettier-ignore
const THETA: Matrix[] = [[[0.3, -0.2], [0.1, 0.4]]]; // prettier-ignore
const SIGMA: Matrix = [[1, 0.3], [0.3, 2]]; // prettier-ignore
const varma: Varma = { phi: PHI, theta: THETA, sigma: SIGMA };

/** Two series around zero with gaps: single cells, a whole row, and near both ends. */
const gappy: Matrix = inventedSeries(30, 2).map((row, t) =>
  row.map((v, k) => {
    const gap = t === 5 || [[4, 0], [12, 1], [2, 1], [1, 0], [29, 0]].some(([r, c]) => r === t && c === k); // prettier-ignore
    return gap ? NaN : v - 10 * (k + 1);
  }),
);

const NO_STEPS: StepPlan = [[], []];
const dataOf = (x: Matrix, steps = NO_STEPS, { constant = false, driver = false } = {}): LikelihoodData => {
  const observed = observedSample(sampleOf(x), steps);
  const rows = Array.from({ length: observed.rows }, (_, t) => t);
  return {
    observed,
    terms: rows.map(() => (constant ? [1] : [])),
    drivers: driver ? rows.map((t) => [Math.sin(t) + 2]) : [],
  };
};

const modelOf = ({ phi, theta, sigma }: Varma): VarModel => {
  const settings = settingsOfOrder(sigma.length, phi.length, {
    terms: "none",
    fit: "likelihood",
    movingAverage: theta.length,
  });
  return {
    settings,
    series: sigma.length,
    drivers: 0,
    regressors: regressorsOf(settings, sigma.length, 0),
    coefficients: [...phi, ...theta].flatMap((matrix) => transpose(matrix)),
    noiseCovariance: sigma,
    rows: 30,
    start: 1,
  };
};

describe("the exact likelihood", () => {
  it("of two rows of one lag, by hand: y₁ ~ N(0, 4/3), y₂ | y₁ ~ N(y₁/2, 1); with a gap between, variance 5/4", () => {
    const one: Varma = { phi: [[[0.5]]], theta: [], sigma: [[1]] };
    const at = (x: Matrix) => likelihoodAt(dataOf(x, [[]]), one, null)!.logLikelihood;
    const log = (v: number, variance: number) =>
      -0.5 * (Math.log(2 * Math.PI * variance) + (v * v) / variance);
    close(at([[1], [2]]), log(1, 4 / 3) + log(2 - 0.5, 1));
    close(at([[1], [NaN], [2]]), log(1, 4 / 3) + log(2 - 0.25, 5 / 4));
  });

  it.each([
    ["lags and a moving average", varma],
    ["lags", { ...varma, theta: [] }],
    ["a moving average", { ...varma, phi: [] }],
    ["neither", { phi: [], theta: [], sigma: SIGMA }],
  ])("equals the normal density of all observed cells at once: %s", (_, model) => {
    const cells = cellsOf(gappy).filter(({ value }) => !Number.isNaN(value));
    const gamma = impliedCovariances(modelOf(model), 29);
    const covariance = cellCovariance(gamma, cells, cells);
    close(
      likelihoodAt(dataOf(gappy), model, null)!.logLikelihood,
      logDensity(cells.map(({ value }) => value), covariance),
      { rtol: 1e-12 },
    ); // prettier-ignore
  });

  it("of differences is that of the levels, row by row, when nothing is missing", () => {
    const x = inventedSeries(40, 2);
    const diff = { kind: "diff", span: 1 } as const;
    const whole = likelihoodAt(dataOf(x, [[diff], [diff, diff]]), varma, null)!.logLikelihood;
    const data = dataOf(x, [[diff], [diff, diff]]);
    const levels = observedSample(sampleOf(x), [[diff], [diff, diff]], { levels: true });
    close(likelihoodAt({ ...data, observed: levels }, varma, null)!.logLikelihood, whole, { rtol: 1e-12 });
  });

  it("does not depend on what cannot be known: a first level missing, any guess of it has the same likelihood", () => {
    const diff = { kind: "diff", span: 1 } as const;
    const x = gappy.map((row, t) => (t === 0 ? [NaN, row[1]] : row));
    const at = likelihoodAt(dataOf(x, [[diff], []]), varma, null)!.logLikelihood;
    const moved = x.map(([a, b]) => [a + 1000, b]);
    close(likelihoodAt(dataOf(moved, [[diff], []]), varma, null)!.logLikelihood, at, { rtol: 1e-9 });
  });

  it("has no value where the model is not stable", () =>
    expect(likelihoodAt(dataOf(gappy), { ...varma, phi: [[[1.01, 0], [0, 0.5]]] }, null)).toBeNull()); // prettier-ignore
});

describe("its slope", () => {
  const diff = { kind: "diff", span: 1 } as const;
  const third = { kind: "diff", span: 3 } as const;
  const changed = (part: "phi" | "theta", j: number, i: number, k: number, by: number): Varma => ({
    ...varma,
    [part]: varma[part].map((m, l) =>
      m.map((row, r) => row.map((v, c) => (l === j && r === i && c === k ? v + by : v))),
    ),
  });
  const steps: readonly (readonly [string, StepPlan])[] = [
    ["no steps", NO_STEPS],
    ["one series differenced", [[diff], []]],
    ["both differenced, first levels missing", [[diff], [diff, third]]],
  ];

  it.each(steps.flatMap(([name, plan]) => [false, true].map((driver) => ({ name, plan, driver }))))(
    "is the limit of its differences: $name, driver $driver",
    ({ plan, driver }) => {
      const data = dataOf(gappy, plan, { constant: true, driver });
      const at = (model: Varma) => likelihoodAt(data, model, null)!.logLikelihood;
      const slope = likelihoodAt(data, varma, null)!.gradient();
      const by = (up: Varma, down: Varma) => (at(up) - at(down)) / 2e-5;
      for (const part of ["phi", "theta"] as const) {
        varma[part].forEach((matrix, j) =>
          matrix.forEach((row, i) =>
            row.forEach((_, k) =>
              close(slope[part][j][i][k], by(changed(part, j, i, k, 1e-5), changed(part, j, i, k, -1e-5)), {
                rtol: 1e-6,
                atol: 1e-6, // slopes near zero
              }),
            ),
          ),
        );
      }
      const bump: Matrix = [[0.7, 0.2], [0.2, -0.4]]; // prettier-ignore
      const along = (step: number) => ({ ...varma, sigma: add(SIGMA, scale(bump, step)) });
      const inner = bump.flat().reduce((sum, v, i) => sum + v * slope.sigma.flat()[i], 0);
      close(inner, by(along(1e-5), along(-1e-5)), { rtol: 1e-6 });
    },
  );

  it("by the mean vanishes where generalised least squares puts it, and is right beside it", () => {
    const data = dataOf(gappy, [[diff], []], { constant: true, driver: true });
    const { mean, gradient } = likelihoodAt(data, varma, null)!;
    close(gradient().mean.terms.flat(), [0, 0], { atol: 1e-10 }); // a top
    const at = (by: number) => ({ ...mean, terms: mean.terms.map(([a, b]) => [a, b + by]) });
    const value = (by: number) => likelihoodAt(data, varma, at(by))!;
    close(
      value(0.3).gradient().mean.terms[0][1],
      (value(0.3 + 1e-5).logLikelihood - value(0.3 - 1e-5).logLikelihood) / 2e-5,
      { rtol: 1e-6 },
    );
  });
});

describe("the invertible twin of a moving average", () => {
  it("of 1 + 2B with variance 1 is 1 + B/2 with variance 4", () => {
    const twin = invertible({ phi: [], theta: [[[2]]], sigma: [[1]] })!;
    close(twin.theta[0], [[0.5]], { rtol: 1e-9 });
    close(twin.sigma, [[4]], { rtol: 1e-9 });
  });

  it("has the same covariances at every lag", () => {
    const model: Varma = { ...varma, theta: [[[2, 0.3], [0.1, 0.2]], [[0.1, 0], [0, 0.1]]] }; // prettier-ignore
    const twin = invertible(model)!;
    impliedCovariances(modelOf(twin), 6).forEach((gamma, k) =>
      close(gamma, impliedCovariances(modelOf(model), 6)[k], { rtol: 1e-9 }),
    );
  });

  it("is the model itself where that is invertible", () => {
    const twin = invertible(varma)!;
    close(twin.theta[0], THETA[0], { rtol: 1e-9 });
    close(twin.sigma, SIGMA, { rtol: 1e-9 });
  });
});

it("weights of the own past undo differences: (1 − B)(1 − B³) = 1 − B − B³ + B⁴", () =>
  expect(pastWeights([1, 3])).toEqual([1, 0, 1, -1]));
