import { Issue } from "../issue";
import { cholesky, eigenvalues, scale } from "../linalg";
import type { Matrix } from "../matrix";
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
import { residualCovariance } from "./least-squares";
import { observedSample, type Observed } from "./observed";
import type { VarModel } from "./model";
import { regressorsOf } from "./regressors";
import { companionMatrix } from "./roots";
import type { Sample } from "./sample";
import type { ModelSettings } from "./settings";
import { stepSample } from "./stepped";
import { termRow } from "./terms";
import { carryTerms } from "./yule-walker";
import { requireLikelihoodWork } from "./work";

/** The likelihood of a sample in coordinates around a start, every series divided by its unit. */
export interface LikelihoodProblem {
  readonly data: LikelihoodData;
  readonly units: readonly number[];
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
  const { coordinates, data, units } = problem;
  const found = minimise((point) => fallAt(problem, point), new Float64Array(coordinates.size));
  const varma = withinCircle(coordinates.varma(found.point));
  refuseUnsettled(found, varma);
  return inUnits(settings, varma, likelihoodAt(data, varma, null)!.mean, units);
}

/** Beyond the unit circle a moving average repeats what another says within: the same likelihood, one of the two. */
const withinCircle = (varma: Varma): Varma =>
  largestOf(turned(varma.theta)) > 1 ? (invertible(varma) ?? varma) : varma;

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
  const start = hannanRissanen(filled, settings);
  const noise = model ? model.noiseCovariance : residualCovariance(start.residuals, start.residuals.length);
  refuseNoiseless(noise, filled.y);
  const units = noise.map((row, k) => Math.sqrt(row[k]));
  const regressors = regressorsOf(settings, units.length, sample.drivers[0]?.length ?? 0);
  const from = regressors.flatMap((regressor) =>
    regressor.kind === "lag" || regressor.kind === "innovation" ? [units[regressor.series]] : [],
  );
  const centre = dynamicRows(regressors, (model ?? start).coefficients).map((row, r) =>
    row.map((v, k) => (v * from[r]) / units[k]),
  );
  const spread = dynamicSpread(start.inverseRoot, regressors);
  const root = cholesky(noise.map((row, i) => row.map((v, j) => v / (units[i] * units[j]))));
  if (root === null || spread === null) throw new Issue({ code: "singular-system" });
  return {
    data: {
      observed: dividedBy(observed, units),
      terms: filled.y.map((_, t) => termRow(settings, filled.start + t)),
      drivers: filled.drivers.slice(0, observed.rows),
    },
    units,
    coordinates: coordinatesAround(
      settings,
      model ? centre : damped(centre, settings, units.length),
      spread.map((row, r) => row.map((v) => v * from[r])),
      root,
      observed.rows,
    ),
  };
}

const dividedBy = (observed: Observed, units: readonly number[]): Observed => {
  const divide = (values: Float64Array) => values.map((v, i) => v / units[i % units.length]);
  return { ...observed, values: divide(observed.values), known: divide(observed.known) };
};

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

/** Back from units of one to the units of the series, and from the mean to terms in the equations. */
export function inUnits(
  settings: ModelSettings,
  { phi, theta, sigma }: Varma,
  mean: MeanPart,
  units: readonly number[],
): { readonly coefficients: Matrix; readonly noiseCovariance: Matrix } {
  const unscaled = (m: Matrix) => m.map((row, i) => row.map((v, k) => (v * units[i]) / units[k]));
  const times = (m: Matrix) => m.map((row) => row.map((v, k) => v * units[k]));
  const lags = { phi: phi.map(unscaled), theta: theta.map(unscaled) };
  const dynamic = toRows(lags, settings, units.length);
  const past = settings.lags.length * units.length;
  const used = settings.lags.map((lag) => lags.phi[lag - 1]);
  return {
    coefficients: [
      ...carryTerms(settings, times(mean.terms), used),
      ...dynamic.slice(0, past),
      ...times(mean.drivers),
      ...dynamic.slice(past),
    ],
    noiseCovariance: sigma.map((row, i) => row.map((v, j) => v * units[i] * units[j])),
  };
}
