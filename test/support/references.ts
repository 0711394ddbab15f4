import { describe, expect, it } from "vitest";
import * as distributions from "../../src/core/distributions";
import { pathDeviations } from "../../src/core/forecast/deviations";
import { forecastPath } from "../../src/core/forecast/path";
import { logDeterminant } from "../../src/core/linalg";
import type { Matrix } from "../../src/core/matrix";
import { centredColumns } from "../../src/core/moments/centre";
import { lagCorrelations, lagCovariances, productMoments } from "../../src/core/moments/lag-covariance";
import { whittleRecursion } from "../../src/core/moments/whittle";
import type { StepPlan } from "../../src/core/prepare/steps";
import { designOf } from "../../src/core/var/design";
import { fitModel } from "../../src/core/var/fit";
import { lagMatrices } from "../../src/core/var/lag-matrices";
import { leastSquares } from "../../src/core/var/least-squares";
import { bestOrder, compareOrders } from "../../src/core/var/order";
import { rootsOf } from "../../src/core/var/roots";
import type { Sample } from "../../src/core/var/sample";
import { stepSample } from "../../src/core/var/stepped";
import type { ModelSettings, Terms } from "../../src/core/var/settings";
import { blockClose, close } from "./close";
import { readCsv } from "./data";
import { plainShape, sampleOf, settingsOfOrder } from "./requests";
import type distributionValues from "../reference/r-distributions.json";
import type momentValues from "../reference/r-moments.json";
import type varValues from "../reference/statsmodels-var.json";

/**
 * What R and statsmodels compute from the data files, compared with ours: once from the committed values, once
 * live. Their conventions are converted here; ours are never bent to theirs.
 */
export type MomentValues = typeof momentValues;
export type VarValues = typeof varValues;
export type DistributionValues = typeof distributionValues;

/** Levels and the steps that take them to what the reference programs were given. */
function dataSet(name: string): { levels: Matrix; steps: StepPlan } {
  const log = { kind: "log" } as const;
  const diff = { kind: "diff", span: 1 } as const;
  switch (name) {
    case "bjsales":
      return { levels: readCsv("BJsales.csv", ["lead", "sales"]), steps: [[diff], [diff]] };
    case "german": {
      const levels = readCsv("e1_west_german_inv_inc_cons_1960Q1_1982Q4.csv", ["invest", "income", "cons"]);
      return { levels: levels.slice(0, 76), steps: [1, 2, 3].map(() => [log, diff]) };
    }
    case "danish":
      return {
        levels: readCsv("danish_johansen_juselius_1990.csv", ["lrm", "lry", "ibo", "ide"]),
        steps: [[], [], [], []],
      };
    case "macro": {
      const levels = readCsv("macrodata.csv", ["realgdp", "realcons", "realinv"]);
      return { levels, steps: [1, 2, 3].map(() => [log, diff]) };
    }
    case "lynx":
      return { levels: readCsv("lynx.csv", ["lynx"]), steps: [[log]] };
    default:
      throw new Error(`no data set ${name}`);
  }
}

/** Drivers stand beside the levels; the reference programs were given them beside the differences. */
function sampleFor(name: string, driver: Matrix | null): { sample: Sample; steps: StepPlan; y: Matrix } {
  const { levels, steps } = dataSet(name);
  const lost = steps[0].some(({ kind }) => kind === "diff") ? 1 : 0;
  const drivers = driver === null ? [] : [...Array.from({ length: lost }, () => [0]), ...driver];
  const sample = sampleOf(levels, drivers);
  return { sample, steps, y: stepSample(sample, steps).y };
}

/** A log difference of fitted series is known to some 13 digits of the level, 11 of the difference. */
const RTOL = 1e-9;

export function momentSuite({ cases, regressions }: MomentValues): void {
  describe.each(cases)("$name: moments and Yule–Walker against R", (expected) => {
    const { sample, steps, y } = sampleFor(expected.name, null);
    const k = expected.series;
    const settings = settingsOfOrder(k, expected.order, { steps, fit: "yule-walker" });
    const model = fitModel({ sample, plan: { kind: "fit", settings } });

    it("lagged covariances and correlations", () => {
      const lags = [0, 1, 2, 3, 4, 5, 6];
      lagCovariances(y, lags).forEach((gamma, i) => blockClose(gamma, expected.covariances[i], RTOL));
      lagCorrelations(y, lags).forEach((rho, i) => blockClose(rho, expected.correlations[i], RTOL));
    });

    it("lag matrices", () => {
      lagMatrices(model).forEach((phi, j) => blockClose(phi, expected.lagMatrices[j], RTOL));
    });

    it("the constant is (I − ΣΦ)μ", () => {
      const total = (i: number) =>
        expected.lagMatrices.reduce(
          (sum, phi) => sum + phi[i].reduce((s, v, j) => s + v * expected.mean[j], 0),
          0,
        );
      blockClose([model.coefficients[0]], [expected.mean.map((mu, i) => mu - total(i))], 1e-8);
    });

    it("the innovation covariance, once the divisors are exchanged", () => {
      // ours n − q with q = 1 + Kp; theirs n − K(p + 1) for several series, n − (p + 1) for one
      const n = expected.rows;
      const ours = n - (1 + k * expected.order);
      const theirs = n - k * (expected.order + 1);
      blockClose(
        model.noiseCovariance.map((row) => row.map((v) => (v * ours) / theirs)),
        expected.varPred,
        RTOL,
      );
    });

    it("forecasts", () => {
      const { forecast } = forecastPath(model, stepSample(sample, steps), 5);
      blockClose(forecast, expected.ahead, RTOL);
    });

    it("the last matrix of every order, and the order that AIC chooses on the recursion's own covariances", () => {
      const columns = centredColumns(y);
      const gamma = Array.from({ length: expected.most + 1 }, (_, lag) =>
        productMoments(columns, lag, y.length),
      );
      const recursion = whittleRecursion(gamma);
      recursion
        .slice(1)
        .forEach(({ coefficients }, i) => blockClose(coefficients.at(-1)!, expected.partial[i], RTOL));
      const raw = recursion.map(
        ({ order, innovation }) => y.length * logDeterminant(innovation)! + 2 * order * k * k,
      );
      const least = Math.min(...raw);
      // differences from the smallest, of sums of hundreds: absolute digits
      close(
        raw.map((v) => v - least),
        expected.aic,
        { rtol: 1e-8, atol: 1e-8 },
      );
      expect(raw.indexOf(least)).toBe(expected.aicOrder);
    });
  });

  describe.each(regressions)("$name: least squares against R's lm", (expected) => {
    const { sample, steps, y } = sampleFor(expected.set, expected.driver);
    const terms: Terms = expected.trend ? "trend" : "constant";
    const settings = {
      ...plainShape(y[0].length, { terms, cycle: expected.cycle || null, steps }),
      lags: expected.lags,
    } satisfies ModelSettings;
    const model = fitModel({ sample, plan: { kind: "fit", settings } });

    it("coefficients", () => blockClose(model.coefficients, expected.coefficients, RTOL));
    it("innovation covariance", () => blockClose(model.noiseCovariance, expected.covariance, RTOL));
    it("standard errors of the first equation", () => {
      const { inverseRoot } = leastSquares(
        designOf(stepSample(sample, steps), settings, expected.lags.at(-1)!),
      );
      const spread = Math.sqrt(model.noiseCovariance[0][0]);
      close(
        inverseRoot.map((row) => spread * Math.hypot(...row)),
        expected.errors,
        { rtol: RTOL },
      );
    });
  });
}

const TERMS: Readonly<Record<string, Terms>> = { c: "constant", ct: "trend", ctt: "quadratic", n: "none" };

export function varSuite({ cases }: VarValues): void {
  describe.each(cases)("$name: least squares against statsmodels", (expected) => {
    const { sample, steps, y } = sampleFor(expected.set, expected.driver);
    const k = y[0].length;
    const terms = TERMS[expected.trend];
    const p = expected.order;
    const settings = settingsOfOrder(k, p, { terms, steps });
    const model = fitModel({ sample, plan: { kind: "fit", settings } });
    const theirs = theirBlock(expected);

    it("coefficients", () => blockClose(model.coefficients, theirs, RTOL));
    it("every coefficient with its own digits", () =>
      // a squared trend beside its constant is known to fewer digits than the block's largest entry
      close(model.coefficients, theirs, { rtol: 1e-7, atol: 1e-13 }));
    it("innovation covariance", () => blockClose(model.noiseCovariance, expected.sigma, RTOL));

    it("forecasts and their mean squared errors", () => {
      const { forecast } = forecastPath(model, stepSample(sample, steps), 6);
      blockClose(forecast, expected.ahead, RTOL);
      // with the steps taken off, the deviations are those of the differences that statsmodels forecast
      const plain = { ...model, settings: { ...settings, steps: steps.map(() => []) } };
      const deviations = pathDeviations(plain, 6);
      close(
        deviations.map((row) => row.map((v) => v * v)),
        expected.mse.map((m) => m.map((row, i) => row[i])),
        { rtol: RTOL },
      );
      const reach = -distributions.normalQuantile(0.05);
      close(
        forecast.map((row, j) => row.map((v, i) => v - reach * deviations[j][i])),
        expected.low,
        { rtol: 1e-7, atol: 1e-12 },
      );
    });

    it("moduli of the roots", () =>
      close(
        rootsOf(model).map(({ modulus }) => modulus),
        expected.roots,
        { rtol: 1e-7 },
      ));

    if (expected.criteria.length > 0) {
      it("criteria on the same rows, and the orders they choose", () => {
        const table = compareOrders({ y, drivers: [], start: 1 }, plainShape(k, { terms }), expected.most);
        expected.criteria.forEach((row, order) => {
          if (row === null) return; // order 0 without terms has no model there
          const { aic, bic, hq, fpe } = table[order];
          close([aic, bic, hq], [row.aic, row.bic, row.hq], { rtol: RTOL });
          close(fpe, row.fpe, { rtol: 1e-8 });
        });
        const { aic, bic, hqic, fpe } = expected.selected!;
        expect(
          (["aic", "bic", "hq", "fpe"] as const).map((criterion) => bestOrder(table, criterion)),
        ).toEqual([aic, bic, hqic, fpe]);
      });
    }
  });
}

/** Their coefficients (terms, driver, lags) in our order (terms, lags, driver). */
function theirBlock({ params, trend, driver }: VarValues["cases"][number]): number[][] {
  const m = trend === "n" ? 0 : trend.length;
  const d = driver === null ? 0 : 1;
  return [...params.slice(0, m), ...params.slice(m + d), ...params.slice(m, m + d)];
}

/** Far in the tails a last-bit error of the argument moves the probability by more than its own last bits. */
export function distributionSuite(expected: DistributionValues): void {
  const at = (rows: number[][], f: (...args: number[]) => number, rtol: number) =>
    rows.forEach((row) => {
      const args = row.slice(0, -1);
      const value = row.at(-1)!;
      const found = f(...args);
      const off = Math.abs(found - value);
      // below 1e-305 doubles run out of digits; a median is exactly zero
      if (!(off <= rtol * Math.abs(value) + (value === 0 ? 1e-12 : 1e-305)))
        expect.fail(`at ${args.join(", ")}: ${found}, R says ${value}`);
    });

  describe("distributions against R", () => {
    it("upper tail of the normal", () => at(expected.normalUpper, distributions.normalUpper, 1e-12));
    it("two-sided normal is twice the upper tail", () =>
      at(
        expected.normalUpper.filter(([x]) => x >= 0).map(([x, p]) => [x, 2 * p]),
        distributions.normalTwoSided,
        1e-12,
      ));
    it("upper tail of chi-square", () => at(expected.chiSquareUpper, distributions.chiSquareUpper, 1e-10));
    it("upper tail of F", () => at(expected.fUpper, distributions.fUpper, 1e-10));
    it("two-sided Student t", () => at(expected.studentTwoSided, distributions.studentTwoSided, 1e-10));
    it("quantiles of the normal", () => at(expected.normalQuantile, distributions.normalQuantile, 1e-12));
    it("quantiles of Student t", () => at(expected.studentQuantile, distributions.studentQuantile, 1e-9));
  });
}
