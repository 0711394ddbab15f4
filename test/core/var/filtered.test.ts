import { describe, expect, it } from "vitest";
import { forecastAhead } from "../../../src/core/forecast/ahead";
import { forecastBands } from "../../../src/core/forecast/bands";
import { levelForecast } from "../../../src/core/forecast/level-forecast";
import { whatIf } from "../../../src/core/forecast/what-if";
import { impliedCovariances } from "../../../src/core/moments/implied-covariance";
import type { Matrix } from "../../../src/core/matrix";
import type { StepPlan } from "../../../src/core/prepare/steps";
import { expectedLevels, oneStepLevels } from "../../../src/core/var/filtered";
import { fitModel } from "../../../src/core/var/fit";
import type { VarModel } from "../../../src/core/var/model";
import { fittedLevels, residualRows } from "../../../src/core/var/one-step-levels";
import { stationaryMean } from "../../../src/core/var/stationary-mean";
import { cellCovariance, cellsOf, conditional } from "../../support/brute-force";
import { blockClose, close } from "../../support/close";
import { inventedSeries } from "../../support/invented";
import { modelWith } from "../../support/models";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const diff = { kind: "diff", span: 1 } as const;
const log = { kind: "log" } as const;
const PHI: Matrix[] = [[[0.5, 0.1], [0.3, 0.4]], [[0.1, -0.05], [0, 0.2]]]; // prettier-ignore
const SIGMA: Matrix = [[1, 0.3], [0.3, 2]]; // prettier-ignore
const model = modelWith(PHI, SIGMA, { terms: [[4, 5]] });
const y = inventedSeries(24, 2);
const GAPS = [[3, 0], [3, 1], [7, 1], [8, 1], [22, 0], [23, 0]]; // prettier-ignore
const gappy = y.map((row, t) => row.map((v, k) => (GAPS.some(([r, c]) => r === t && c === k) ? NaN : v)));
const free = (rows: number, series = 2): Matrix =>
  Array.from({ length: rows }, () => new Array<number>(series).fill(NaN));

const fitted = (x: Matrix, changes: Parameters<typeof settingsOfOrder>[2] = {}): VarModel =>
  fitModel({
    sample: sampleOf(x),
    plan: { kind: "fit", settings: settingsOfOrder(x[0].length, 1, { fit: "likelihood", ...changes }) },
  });
const given = (m: VarModel) => ({ kind: "given", model: m }) as const;

/** The same by conditioning the joint normal distribution of all cells at once. */
function byBruteForce(x: Matrix): { mean: Matrix; deviation: Matrix } {
  const level = stationaryMean(model)[0];
  const gamma = impliedCovariances(model, x.length);
  const cells = cellsOf(x);
  const seen = cells.filter(({ value }) => !Number.isNaN(value));
  const { mean, variance } = conditional(
    seen.map(({ value, series }) => value - level[series]),
    cellCovariance(gamma, seen, seen),
    cellCovariance(gamma, cells, seen),
    cellCovariance(gamma, cells, cells),
  );
  return {
    mean: x.map((row, t) => row.map((_, k) => mean[2 * t + k] + level[k])),
    deviation: x.map((row, t) => row.map((_, k) => Math.sqrt(Math.max(0, variance[2 * t + k][2 * t + k])))),
  };
}

describe("cells expected given all observed ones", () => {
  const whole = [...gappy, ...free(5)];
  const { mean, deviation } = byBruteForce(whole);
  const { expected, deviations } = expectedLevels(model, sampleOf(gappy), free(5));

  it("equal Gaussian conditioning, gaps and rows ahead alike", () => {
    blockClose(expected, mean, 1e-11);
    close(
      deviations.flat().filter((v) => v > 1e-6),
      deviation.flat().filter((v) => v > 1e-6),
      { rtol: 1e-9 },
    );
  });

  it("are the cells themselves where they are observed, without any doubt", () =>
    gappy.forEach((row, t) =>
      row.forEach((v, k) => {
        if (Number.isNaN(v)) return expect(deviations[t][k]).toBeGreaterThan(0.1);
        close(expected[t][k], v, { rtol: 1e-12 });
        return expect(deviations[t][k]).toBeLessThan(1e-6);
      }),
    ));

  it("with plans ahead are what the plan and the gaps together make likely", () => {
    const imposed = [[NaN, 30], [NaN, NaN], [8, NaN], [NaN, NaN]]; // prettier-ignore
    const path = whatIf({ sample: sampleOf(gappy), plan: given(model), imposed, point: "median" });
    blockClose(path, byBruteForce([...gappy, ...imposed]).mean.slice(-4), 1e-11);
    expect(path[0][1]).toBe(30);
    expect(path[2][0]).toBe(8);
  });

  it("with an empty plan are the forecast", () =>
    expect(
      whatIf({ sample: sampleOf(gappy), plan: given(model), imposed: free(4), point: "median" }),
    ).toEqual(forecastAhead({ sample: sampleOf(gappy), plan: given(model), horizon: 4, point: "median" })));
});

describe("without gaps the filter is the recursion", () => {
  const plans: readonly (readonly [string, StepPlan])[] = [
    ["as they are", [[], []]],
    ["one differenced", [[diff], []]],
    ["logs and differences", [[log, diff], [log, diff, { kind: "diff", span: 4 }]]],
  ]; // prettier-ignore

  it.each(plans)("forecast and errors: %s", (_, steps) => {
    const m = { ...model, coefficients: [[0.1, 0.05], ...model.coefficients.slice(1)], settings: { ...model.settings, steps } }; // prettier-ignore
    const { expected, deviations } = expectedLevels(m, sampleOf(y), free(6));
    const recursion = levelForecast(m, sampleOf(y), 6);
    blockClose(expected.slice(-6), recursion.level, 1e-9);
    blockClose(deviations.slice(-6), recursion.deviations(), 1e-9);
  });

  it("one row ahead, once the first rows are known", () =>
    blockClose(oneStepLevels(model, sampleOf(y)).slice(2), fittedLevels(model, sampleOf(y)).slice(2), 1e-11));

  it("also from a model that is not stable, whose start is unknown", () => {
    const wild = modelWith([[[1.02, 0.1], [0, 1]]], SIGMA, { terms: [[0.1, -0.2]] }); // prettier-ignore
    const { expected, deviations } = expectedLevels(wild, sampleOf(y), free(6));
    const recursion = levelForecast(wild, sampleOf(y), 6);
    blockClose(expected.slice(-6), recursion.level, 1e-9);
    blockClose(deviations.slice(-6), recursion.deviations(), 1e-9);
    const across = expectedLevels(wild, sampleOf(gappy), free(2)).expected;
    // a walk is expected between its neighbours
    expect(across[3][1]).toBeGreaterThan(Math.min(y[2][1], y[4][1]) - 3);
    expect(across[3][1]).toBeLessThan(Math.max(y[2][1], y[4][1]) + 3);
  });
});

describe("a random walk with a gap, by hand", () => {
  const walk = modelWith([], [[1]], { terms: [] });
  const levels = { ...walk, settings: { ...walk.settings, steps: [[diff]] } };
  const x = [[1], [2], [NaN], [6], [5]];

  it("the gap is expected half way, with variance ½; the forecast is the last level, with variance h", () => {
    const { expected, deviations } = expectedLevels(levels, sampleOf(x), free(3, 1));
    close(expected.flat(), [2, 4, 6, 5, 5, 5, 5]);
    close([deviations[1][0], ...deviations.slice(-3).flat()], [Math.SQRT1_2, 1, Math.SQRT2, Math.sqrt(3)]);
  });

  it("a first level that is missing is the one after it, with variance 1", () => {
    const { expected } = expectedLevels(levels, sampleOf([[NaN], [2], [3]]), free(1, 1));
    close(expected.flat(), [2, 3, 3]);
  });

  it("what is left over after the gap is the jump over both rows", () => {
    const rows = residualRows(levels, sampleOf(x)).flat();
    expect(rows.map((v) => (Number.isNaN(v) ? null : v))).toEqual([null, 1, null, 4, -1]);
    expect(fittedLevels(levels, sampleOf(x)).flat().slice(1)).toEqual([1, 2, 2, 6]);
  });
});

describe("bands beside gaps", () => {
  const long = inventedSeries(120, 2).map((row, t) => row.map((v, k) => ((5 * t + k) % 9 === 0 ? NaN : v)));
  const m = fitted(long);
  const ask = (bands: "known" | "fitted") =>
    forecastBands({
      sample: sampleOf(long),
      plan: given(m),
      horizon: 4,
      point: "median",
      coverage: 0.9,
      joint: false,
      bands,
      draws: 100,
      seed: 1,
    }) as { low: Matrix; high: Matrix };
  const width = ({ low, high }: { low: Matrix; high: Matrix }) =>
    high.map((row, j) => row.map((v, k) => v - low[j][k]));

  it("are wider for a series whose last cell is missing, and with the coefficients' own error", () => {
    const known = width(ask("known"));
    const withError = width(ask("fitted"));
    known.forEach((row, j) => row.forEach((v, k) => expect(withError[j][k]).toBeGreaterThan(v)));
    const complete = levelForecast(m, sampleOf(inventedSeries(120, 2)), 4).deviations();
    const last = levelForecast(m, sampleOf([...long.slice(0, -1), [NaN, NaN]]), 4).deviations();
    expect(last[0][0]).toBeGreaterThan(complete[0][0]);
  });

  it("without gaps come near those of least squares when rows are many", () => {
    const x = inventedSeries(800, 2);
    const both = (["likelihood", "least-squares"] as const).map((fit) =>
      width(
        forecastBands({
          sample: sampleOf(x),
          plan: { kind: "fit", settings: settingsOfOrder(2, 1, { fit }) },
          horizon: 5,
          point: "median",
          coverage: 0.9,
          joint: false,
          bands: "fitted",
          draws: 100,
          seed: 1,
        }) as { low: Matrix; high: Matrix },
      ),
    );
    blockClose(both[0], both[1], 5e-3);
  });
});

it("gaps that hide a level for good are refused", () => {
  const seasonal = modelWith([[[0.3]]], [[1]], { terms: [] });
  const m = {
    ...seasonal,
    settings: { ...seasonal.settings, steps: [[{ kind: "diff", span: 4 } as const]] },
  };
  // one quarter is blank in every year
  const x = inventedSeries(40, 1).map((row, t) => (t % 4 === 2 ? [NaN] : row));
  expect(() => expectedLevels(m, sampleOf(x), free(1, 1))).toThrow("gaps-too-many");
  expect(() => fitted(x, { steps: m.settings.steps })).toThrow("gaps-too-many");
});
