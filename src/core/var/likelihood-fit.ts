import { Issue } from "../issue";
import { cholesky, eigenvalues, invertTriangle, multiply, scale, transpose } from "../linalg";
import type { Matrix } from "../matrix";
import { symmetric } from "../moments/whittle";
import { minimise, type Minimum } from "../optimise/quasi-newton";
import { bridgedColumns } from "../prepare/fill";
import { invertible } from "../state-space/invertible";
import type { Varma } from "../state-space/varma-space";
import { refuseNoiseless } from "./exact";
import { hannanRissanen } from "./hannan-rissanen";
import { likelihoodAt, type LikelihoodData, type MeanPart } from "./likelihood";
import {
  coordinatesAround,
  dynamicRows,
  dynamicSpread,
  toMatrices,
  toRows,
  type Coordinates,
} from "./likelihood-coordinates";
import { residualCovariance, type Regression } from "./least-squares";
import { hasGaps, observedSample, type Observed } from "./observed";
import type { VarModel } from "./model";
import { regressorsOf } from "./regressors";
import { companionMatrix } from "./roots";
import type { Sample } from "./sample";
import type { ModelSettings } from "./settings";
import { stepSample } from "./stepped";
import { termRow } from "./terms";
import { carryTerms } from "./yule-walker";
import { requireLikelihoodWork } from "./work";

/**
 * The likelihood of a sample in coordinates around a start, for series x[t] with y[t] = mix·x[t] whose innovations have
 * variance one: without gaps they are mixed so as to be uncorrelated too, as the likelihood follows any mixing.
 */
export interface LikelihoodProblem {
  readonly data: LikelihoodData;
  /** K×K, lower. */
  readonly mix: Matrix;
  readonly coordinates: Coordinates;
}

/** Largest root that a start may have: further in than where the likelihood turns steep. */
const START_ROOT = 0.98;

/** Value lost for good when the search ends: below this share of a standard error, squared, it has converged. */
const CONVERGED = 1e-8;

/**
 * Coefficients and innovation covariance of largest exact Gaussian likelihood, in block order.
 * @param sample gaps are NaN
 * @throws Issue "exact-combination" | "nothing-left-over" | "likelihood-stuck" | "too-heavy" | "gaps-too-many"
 * Source: Lütkepohl (2005), 3.4 and 12.2; Harvey (1989), 3.4
 */
export function likelihoodFit(
  sample: Sample,
  settings: ModelSettings,
): { readonly coefficients: Matrix; readonly noiseCovariance: Matrix } {
  const problem = likelihoodProblem(sample, settings);
  const { coordinates, data, mix } = problem;
  const start = new Float64Array(coordinates.size);
  // a start is stable and noisy: what has no likelihood there lacks a level that no cell tells
  if (fallAt(problem, start) === null) throw new Issue({ code: "gaps-too-many" });
  const found = minimise((point) => fallAt(problem, point), start);
  const varma = withinCircle(coordinates.varma(found.point));
  refuseUnsettled(found, varma);
  return unmixed(settings, varma, likelihoodAt(data, varma, null)!.mean, mix);
}

/**
 * Beyond the unit circle a moving average repeats what another says within: the same likelihood, one of the two. One
 * that is found on the circle, give or take rounding, stays as it is.
 */
const withinCircle = (varma: Varma): Varma =>
  largestOf(turned(varma.theta)) > 1 + 1e-6 ? (invertible(varma) ?? varma) : varma;

/** Minus the log-likelihood with its slope; null where there is none. */
function fallAt({ data, coordinates }: LikelihoodProblem, point: Float64Array) {
  const varma = coordinates.varma(point);
  const there = likelihoodAt(data, varma, null);
  if (there === null) return null;
  return {
    value: -there.logLikelihood,
    gradient: coordinates.slope(point, there.gradient()).map((v) => -v),
  };
}

/**
 * Lays the problem out around a start by regression, or around the numbers of a model.
 * @throws Issue "too-heavy" | "exact-combination" | "nothing-left-over" | "singular-system"
 */
export function likelihoodProblem(
  sample: Sample,
  settings: ModelSettings,
  model: VarModel | null = null,
): LikelihoodProblem {
  const filled = stepSample({ ...sample, series: bridgedColumns(sample.series) }, settings.steps);
  const observed = observedSample(sample, settings.steps);
  requireLikelihoodWork(observed, settings);
  const noise = model ? model.noiseCovariance : noiseOf(hannanRissanen(filled, settings));
  refuseNoiseless(noise, filled.y);
  const mix = mixOf(noise, hasGaps(sample));
  const unmix = invertTriangle(mix);
  const mixed = { ...filled, y: multiply(filled.y, transpose(unmix)) };
  const start = hannanRissanen(mixed, settings);
  const regressors = regressorsOf(settings, mix.length, sample.drivers[0]?.length ?? 0);
  const rows = dynamicRows(regressors, (model ?? start).coefficients);
  const spread = dynamicSpread(start.inverseRoot, regressors);
  const root = cholesky(multiply(multiply(unmix, noise), transpose(unmix)));
  if (root === null || spread === null) throw new Issue({ code: "singular-system" });
  return {
    data: {
      observed: hasGaps(sample) ? inUnits(observed, mix) : { ...observed, values: flat(mixed.y) },
      terms: filled.y.map((_, t) => termRow(settings, filled.start + t)),
      drivers: filled.drivers.slice(0, observed.rows),
    },
    mix,
    coordinates: coordinatesAround(
      settings,
      model ? mixedRows(rows, settings, unmix, mix) : damped(rows, settings, mix.length),
      spread,
      root,
      observed.rows,
    ),
  };
}

const noiseOf = ({ residuals }: Regression): Matrix => residualCovariance(residuals, residuals.length);

/** Gaps stand in single series, which can then be brought to one size but not mixed. @throws Issue "singular-system" */
function mixOf(noise: Matrix, gaps: boolean): Matrix {
  if (gaps) return noise.map((row, i) => row.map((v, j) => (i === j ? Math.sqrt(v) : 0)));
  const root = cholesky(noise);
  if (root === null) throw new Issue({ code: "singular-system" });
  return root;
}

const flat = (x: Matrix): Float64Array => Float64Array.from(x.flat());

/** Observed cells of series that are each divided by a unit of their own. */
const inUnits = (observed: Observed, mix: Matrix): Observed => {
  const divide = (values: Float64Array) => values.map((v, i) => v / mix[i % mix.length][i % mix.length]);
  return { ...observed, values: divide(observed.values), known: divide(observed.known) };
};

/** Lags and innovations of y = from·x as those of to·y. */
function mixedRows(rows: Matrix, settings: ModelSettings, to: Matrix, from: Matrix): Matrix {
  const { phi, theta } = toMatrices(rows, settings, to.length);
  const turn = (matrix: Matrix) => multiply(multiply(to, matrix), from);
  return toRows({ phi: phi.map(turn), theta: theta.map(turn) }, settings, to.length);
}

/** A start within the stationary and invertible models: roots that reach too far are all drawn in. */
function damped(rows: Matrix, settings: ModelSettings, series: number): Matrix {
  const { phi, theta } = toMatrices(rows, settings, series);
  const drawn = (matrices: readonly Matrix[], root: number) =>
    root <= START_ROOT ? matrices : matrices.map((m, j) => scale(m, (START_ROOT / root) ** (j + 1)));
  return toRows(
    { phi: drawn(phi, largestOf(phi)), theta: drawn(theta, largestOf(turned(theta))) },
    settings,
    series,
  );
}

/** Largest root of an autoregression with these matrices; a moving average is invertible if that of −Θ is below 1. */
export function largestOf(matrices: readonly Matrix[]): number {
  if (matrices.length === 0) return 0;
  return Math.max(...eigenvalues(companionMatrix(matrices)).map((r) => Math.hypot(r.real, r.imaginary)));
}

const turned = (theta: readonly Matrix[]): Matrix[] => theta.map((matrix) => scale(matrix, -1));

/** @throws Issue "likelihood-stuck" */
function refuseUnsettled({ decrement, value }: Minimum, { phi, theta }: Varma): void {
  if (decrement < CONVERGED * (1 + Math.abs(value) * 1e-6)) return;
  const reason = largestOf(turned(theta)) > 0.99 ? "ma-root" : largestOf(phi) > 0.99 ? "ar-root" : "flat";
  throw new Issue({ code: "likelihood-stuck", reason });
}

/** Back to y = mix·x, and from the mean to terms in the equations. */
export function unmixed(
  settings: ModelSettings,
  { phi, theta, sigma }: Varma,
  mean: MeanPart,
  mix: Matrix,
): { readonly coefficients: Matrix; readonly noiseCovariance: Matrix } {
  const series = mix.length;
  const rows = mixedRows(toRows({ phi, theta }, settings, series), settings, mix, invertTriangle(mix));
  const past = settings.lags.length * series;
  const lags = toMatrices(rows, settings, series).phi;
  return {
    coefficients: [
      ...carryTerms(
        settings,
        multiply(mean.terms, transpose(mix)),
        settings.lags.map((lag) => lags[lag - 1]),
      ),
      ...rows.slice(0, past),
      ...multiply(mean.drivers, transpose(mix)),
      ...rows.slice(past),
    ],
    noiseCovariance: symmetric(multiply(multiply(mix, sigma), transpose(mix))),
  };
}
