import { Issue } from "../issue";
import { factorColumns, inverseRoot, invertTriangle, multiply, scale, transpose } from "../linalg";
import type { Matrix } from "../matrix";
import { symmetric } from "../moments/whittle";
import { designOf } from "./design";
import { refuseExactSeries } from "./exact";
import { leastSquares, residualCovariance } from "./least-squares";
import { likelihoodFit } from "./likelihood-fit";
import { longRunFit } from "./long-run";
import type { VarModel } from "./model";
import { chooseOrder } from "./order";
import { regressorCount, regressorsOf } from "./regressors";
import { requireRows } from "./rows-needed";
import type { ModelRequest, Sample } from "./sample";
import { allLags, orderOf, type ModelSettings } from "./settings";
import { leastObserved, stepSample, type SteppedSample } from "./stepped";
import { carryTerms, removeTerms, yuleWalker, type MomentFit } from "./yule-walker";
import { nuttallStrand } from "./nuttall-strand";
import { dataResiduals, shrinkageDesign } from "./shrinkage";

/** The numbers that an estimator returns. */
interface Estimate {
  readonly coefficients: Matrix;
  readonly noiseCovariance: Matrix;
}

/** The model that a request means: given with its numbers, or fitted to the sample with an order given or chosen. */
export function fitModel({ sample, plan }: ModelRequest): VarModel {
  if (plan.kind === "given") return plan.model;
  return fitSettings(sample, settingsOf(sample, plan));
}

/** The settings that a request means; an automatic order is chosen here. */
export function settingsOf(sample: Sample, plan: ModelRequest["plan"]): ModelSettings {
  if (plan.kind === "given") return plan.model.settings;
  if (plan.kind === "fit") return plan.settings;
  const stepped = stepSample(sample, plan.shape.steps);
  return { ...plan.shape, lags: allLags(chooseOrder(stepped, plan.shape, plan.criterion, plan.maxOrder)) };
}

/**
 * Estimates every coefficient of the settings from the sample.
 * @throws Issue "too-few-rows" | "constant-series" | "exact-combination" | "singular-system"
 */
export function fitSettings(sample: Sample, settings: ModelSettings): VarModel {
  const stepped = stepSample(sample, settings.steps);
  const rows = stepped.y.length;
  const series = stepped.y[0].length;
  const drivers = stepped.drivers[0]?.length ?? 0;
  requireRows(settings, { rows: leastObserved(stepped.y), series, drivers });
  refuseExactSeries(stepped.y, settings, stepped.start);
  return {
    settings,
    series,
    drivers,
    regressors: regressorsOf(settings, series, drivers),
    ...(settings.fit === "likelihood" ? likelihoodFit(sample, settings) : estimate(stepped, settings)),
    rows,
    start: sample.start,
  };
}

/** The estimators that ask for nothing but the stepped values. */
export function estimate(stepped: SteppedSample, settings: ModelSettings): Estimate {
  const rows = stepped.y.length;
  const q = regressorCount(settings, stepped.y[0].length, stepped.drivers[0]?.length ?? 0);
  switch (settings.fit) {
    case "least-squares":
      if (settings.longRun !== null) return byLongRun(stepped, settings, rows - orderOf(settings) - q);
      return byLeastSquares(stepped, settings, rows - orderOf(settings) - q);
    case "yule-walker":
      return byMoments(stepped, settings, (rest) => yuleWalker(rest, settings), rows / (rows - q));
    case "nuttall-strand":
      return byMoments(
        stepped,
        settings,
        (rest) => nuttallStrand(rest, orderOf(settings)),
        rows / (rows - q),
      );
    case "shrinkage":
      return byShrinkage(stepped, settings, rows - orderOf(settings) - q);
    default:
      throw new Error(`no estimator for ${settings.fit}`);
  }
}

/** Innovation covariance UᵀU/(T − q). */
function byLeastSquares(stepped: SteppedSample, settings: ModelSettings, divisor: number): Estimate {
  const { coefficients, residuals } = leastSquares(designOf(stepped, settings, orderOf(settings)));
  return { coefficients, noiseCovariance: residualCovariance(residuals, divisor) };
}

/** Innovation covariance UᵀU/(T − q), q of the unrestricted model. */
function byLongRun(stepped: SteppedSample, settings: ModelSettings, divisor: number): Estimate {
  const { coefficients, residuals } = longRunFit(stepped, settings);
  return { coefficients, noiseCovariance: residualCovariance(residuals, divisor) };
}

/** Innovation covariance UᵀU/(T − q) over the rows of data. */
function byShrinkage(stepped: SteppedSample, settings: ModelSettings, divisor: number): Estimate {
  const { coefficients, residuals } = leastSquares(shrinkageDesign(stepped, settings).design);
  return {
    coefficients,
    noiseCovariance: residualCovariance(dataResiduals(residuals, stepped, settings), divisor),
  };
}

/**
 * Innovation covariance of the recursion times n/(n − q). The recursions follow any mixing of the series, so they are
 * run on an uncorrelated mix of unit size, x[t] with rest[t] = M·x[t]: neither units nor near copies cost digits.
 */
function byMoments(
  stepped: SteppedSample,
  settings: ModelSettings,
  solve: (rest: Matrix) => MomentFit,
  factor: number,
): Estimate {
  const { rest, taken } = removeTerms(stepped, settings);
  const found = factorColumns(rest);
  if ("relation" in found) throw new Issue({ code: "singular-system" });
  const unmix = scale(inverseRoot(found.factor), Math.sqrt(rest.length));
  const mix = transpose(invertTriangle(unmix));
  const ofMix = solve(multiply(rest, unmix));
  const lagMatrices = ofMix.lagMatrices.map((phi) => multiply(multiply(mix, phi), transpose(unmix)));
  const innovation = symmetric(multiply(multiply(mix, ofMix.innovation), transpose(mix)));
  const terms = carryTerms(settings, taken, lagMatrices);
  return {
    coefficients: [...terms, ...lagMatrices.flatMap((phi) => phi[0].map((_, k) => phi.map((row) => row[k])))],
    noiseCovariance: scale(innovation, factor),
  };
}
