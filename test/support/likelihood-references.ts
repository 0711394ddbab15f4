import { describe, expect, it } from "vitest";
import { levelForecast } from "../../src/core/forecast/level-forecast";
import { forecastPath } from "../../src/core/forecast/path";
import { transpose } from "../../src/core/linalg";
import type { Matrix } from "../../src/core/matrix";
import { estimates } from "../../src/core/var/estimates";
import { expectedLevels, oneStepLevels } from "../../src/core/var/filtered";
import { fitModel } from "../../src/core/var/fit";
import { lagMatrices } from "../../src/core/var/lag-matrices";
import { likelihoodAt, type LikelihoodData } from "../../src/core/var/likelihood";
import { observedSample } from "../../src/core/var/observed";
import type { VarModel } from "../../src/core/var/model";
import { regressorsOf } from "../../src/core/var/regressors";
import { stationaryMean } from "../../src/core/var/stationary-mean";
import { stepSample } from "../../src/core/var/stepped";
import type { Terms } from "../../src/core/var/settings";
import { blockClose, close } from "./close";
import { readCsv } from "./data";
import { sampleOf, settingsOfOrder } from "./requests";
import type arimaValues from "../reference/r-arima.json";
import type likelihoodValues from "../reference/statsmodels-likelihood.json";
import type vecmValues from "../reference/statsmodels-vecm.json";

export type LikelihoodValues = typeof likelihoodValues;
export type VecmValues = typeof vecmValues;
export type ArimaValues = typeof arimaValues;

type Cells = readonly (readonly (number | null)[])[];
const numbers = (x: Cells): Matrix => x.map((row) => row.map((v) => v ?? NaN));

/** A model with a constant from matrices, row = equation. */
function modelOf(
  phi: readonly Matrix[],
  theta: readonly Matrix[],
  sigma: Matrix,
  constant: readonly number[],
): VarModel {
  const series = sigma.length;
  const settings = settingsOfOrder(series, phi.length, {
    fit: "likelihood",
    movingAverage: theta.length,
    terms: constant.length > 0 ? "constant" : "none",
  });
  return {
    settings,
    series,
    drivers: 0,
    regressors: regressorsOf(settings, series, 0),
    coefficients: [
      ...(constant.length > 0 ? [constant] : []),
      ...[...phi, ...theta].flatMap((matrix) => transpose(matrix)),
    ],
    noiseCovariance: sigma,
    rows: 80,
    start: 1,
  };
}

const dataOf = (x: Matrix, model: VarModel): LikelihoodData => {
  const observed = observedSample(sampleOf(x), model.settings.steps);
  const terms = model.settings.terms === "constant" ? [1] : [];
  return { observed, terms: Array.from({ length: observed.rows }, () => terms), drivers: [] };
};

const fitTo = (x: Matrix, p: number, q: number): VarModel =>
  fitModel({
    sample: sampleOf(x),
    plan: { kind: "fit", settings: settingsOfOrder(x[0].length, p, { fit: "likelihood", movingAverage: q }) },
  });

const logLikelihoodOf = (x: Matrix, model: VarModel): number => {
  const { settings, coefficients, series } = model;
  const matrices = coefficients.slice(1);
  const block = (b: number) => transpose(matrices.slice(b * series, (b + 1) * series));
  const phi = settings.lags.map((_, b) => block(b));
  const theta = Array.from({ length: settings.movingAverage }, (_, j) => block(settings.lags.length + j));
  const mean = { terms: stationaryMean(model), drivers: [] };
  return likelihoodAt(dataOf(x, model), { phi, theta, sigma: model.noiseCovariance }, mean)!.logLikelihood;
};

export function likelihoodSuite({ systems, optima, differenced }: LikelihoodValues): void {
  describe.each(systems)("$name: state space against statsmodels", (expected) => {
    const x = numbers(expected.x);
    const model = modelOf(expected.phi, expected.theta, expected.sigma, expected.constant);
    const free = Array.from({ length: 6 }, () => expected.constant.map(() => NaN));
    const { expected: levels, deviations } = expectedLevels(model, sampleOf(x), free);

    it("log-likelihood", () => close(logLikelihoodOf(x, model), expected.logLikelihood, { rtol: 1e-11 }));
    it("one row ahead", () => blockClose(oneStepLevels(model, sampleOf(x)), expected.oneStep, 1e-10));
    it("gaps are expected given all cells", () =>
      blockClose(levels.slice(0, x.length), numbers(expected.smoothed), 1e-10));
    it("forecast and its errors", () => {
      blockClose(levels.slice(-6), expected.forecast, 1e-10);
      blockClose(deviations.slice(-6), expected.errors, 1e-10);
    });
  });

  describe.each(optima)("$name: largest likelihood against statsmodels", (expected) => {
    const x = numbers(expected.x);
    const model = fitTo(x, expected.p, expected.q);

    it("is no smaller, and the numbers agree as far as theirs are settled", () => {
      expect(logLikelihoodOf(x, model)).toBeGreaterThan(expected.logLikelihood - 1e-9);
      close([...model.coefficients.map(([v]) => v), model.noiseCovariance[0][0]], expected.params, {
        rtol: 1e-5,
      });
    });
  });

  describe.each(differenced)("$name: levels with a unit root against statsmodels", (expected) => {
    const x = numbers(expected.x);
    const at = ([phi, theta, variance]: readonly number[]) => {
      const varma = { phi: [[[phi]]], theta: [[[theta]]], sigma: [[variance]] };
      return likelihoodAt(
        {
          observed: observedSample(sampleOf(x), [[{ kind: "diff", span: 1 }]]),
          terms: x.slice(1).map(() => []),
          drivers: [],
        },
        varma,
        null,
      )!.logLikelihood;
    };

    it("the likelihood differs between two sets of numbers by as much", () =>
      close(at(expected.params[1]) - at(expected.params[0]), expected.gain, { rtol: 1e-9 }));
    it("forecast and its errors", () => {
      const [phi, theta, variance] = expected.params[0];
      const model = modelOf([[[phi]]], [[[theta]]], [[variance]], []);
      const steps = { ...model.settings, steps: [[{ kind: "diff", span: 1 } as const]] };
      const { expected: levels, deviations } = expectedLevels(
        { ...model, settings: steps },
        sampleOf(x),
        Array.from({ length: 6 }, () => [NaN]),
      );
      close(levels.slice(-6).flat(), expected.forecast, { rtol: 1e-9 });
      close(deviations.slice(-6).flat(), expected.errors, { rtol: 1e-9 });
    });
  });
}

/** R settles its own search to some six digits, and takes the Hessian by differences of values. */
export function arimaSuite({ cases }: ArimaValues): void {
  describe.each(cases)("$name: one series against R", (expected) => {
    const x = numbers(expected.x.map((v) => [v]));
    const model = fitTo(x, expected.p, expected.q);
    const mean = stationaryMean(model)[0][0];

    it("largest likelihood", () =>
      expect(logLikelihoodOf(x, model)).toBeGreaterThan(expected.logLikelihood - 1e-9));
    it("coefficients, mean and variance", () =>
      close(
        [...model.coefficients.slice(1).map(([v]) => v), mean, model.noiseCovariance[0][0]],
        [...expected.coefficients, expected.variance],
        { rtol: 2e-4 },
      ));
    it("standard errors of lags and moving average", () =>
      close(
        estimates(model, sampleOf(x), 0.95).slice(1).map(({ error }) => error),
        expected.errors.slice(0, -1),
        { rtol: 2e-3 },
      )); // prettier-ignore
    it("forecast and its errors", () => {
      const { level, deviations } = levelForecast(model, sampleOf(x), 6);
      close(level.flat(), expected.forecast, { rtol: 1e-5 });
      close(deviations().flat(), expected.spread, { rtol: 1e-4 });
    });
  });
}

const DATA: Readonly<Record<string, () => Matrix>> = {
  danish: () => readCsv("danish_johansen_juselius_1990.csv", ["lrm", "lry", "ibo", "ide"]),
  macro: () =>
    readCsv("macrodata.csv", ["realgdp", "realcons", "realinv"]).map((row) => row.map((v) => Math.log(v))),
};

export function vecmSuite({ cases }: VecmValues): void {
  describe.each(cases)("$name: long-run relations against statsmodels", (expected) => {
    const y = DATA[expected.set]();
    const settings = settingsOfOrder(y[0].length, expected.order, {
      longRun: expected.rank,
      terms: expected.terms as Terms,
      cycle: expected.cycle,
    });
    const model = fitModel({ sample: sampleOf(y), plan: { kind: "fit", settings } });

    it("lag matrices of the levels", () =>
      lagMatrices(model).forEach((phi, j) => blockClose(phi, expected.lagMatrices[j], 1e-8)));
    // theirs divides by T, ours by T − q of the unrestricted model
    it("innovation covariance", () =>
      blockClose(
        model.noiseCovariance,
        expected.sigma.map((row) =>
          row.map((v) => (v * expected.rows) / (expected.rows - model.coefficients.length)),
        ),
        1e-9,
      ));
    it("forecast", () =>
      blockClose(
        forecastPath(model, stepSample(sampleOf(y), settings.steps), 8).forecast,
        expected.forecast,
        1e-9,
      ));
  });
}
