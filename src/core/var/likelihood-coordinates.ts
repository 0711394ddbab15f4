import { cholesky, multiply, transpose } from "../linalg";
import { zeros, type Matrix, type MutableMatrix } from "../matrix";
import type { Varma, VarmaGradient } from "../state-space/varma-space";
import type { Regressor } from "./regressors";
import { orderOf, type ModelSettings } from "./settings";

/** Coefficients of lags and past innovations with the innovation covariance, as one list of numbers around a centre. */
export interface Coordinates {
  readonly size: number;
  /** The model at a point; the centre is at 0. */
  varma(point: Float64Array): Varma;
  /** Derivatives by the model's matrices as derivatives by the point. */
  slope(point: Float64Array, by: VarmaGradient): Float64Array;
}

/** Of rows in block order those of lags and innovations. */
export const dynamicRows = (regressors: readonly Regressor[], rows: Matrix): Matrix =>
  rows.filter((_, r) => regressors[r].kind === "lag" || regressors[r].kind === "innovation");

/**
 * Coordinates in which the likelihood curves by about one in every direction: the coefficients are centre + L·X·Rᵀ with
 * LLᵀ the inverse of the regressors' products and RRᵀ the centre's covariance; the covariance is R·E·Eᵀ·Rᵀ with E
 * lower, its diagonal exponentials, so that it stays positive definite.
 * @param centre coefficients of lags and innovations, in block order
 * @param spread L
 * @param root   R
 * @param rows   T
 */
export function coordinatesAround(
  settings: ModelSettings,
  centre: Matrix,
  spread: Matrix,
  root: Matrix,
  rows: number,
): Coordinates {
  const series = root.length;
  const dynamic = centre.length * series;
  const diagonal = 1 / Math.sqrt(2 * rows);
  const below = 1 / Math.sqrt(rows);
  const cells = root.flatMap((row, i) => row.slice(0, i + 1).map((_, j) => [i, j] as const));
  const lowerAt = (point: Float64Array): Matrix => {
    const lower = zeros(series, series);
    cells.forEach(([i, j], c) => {
      const x = point[dynamic + c];
      lower[i][j] = i === j ? Math.exp(x * diagonal) : x * below;
    });
    return lower;
  };
  const coefficientsAt = (point: Float64Array): Matrix => {
    const x = centre.map((_, r) => [...point.subarray(r * series, (r + 1) * series)]);
    const moved = multiply(multiply(spread, x), transpose(root));
    return centre.map((row, r) => row.map((v, k) => v + moved[r][k]));
  };
  return {
    size: dynamic + cells.length,
    varma: (point) => {
      const { phi, theta } = toMatrices(coefficientsAt(point), settings, series);
      const scale = multiply(root, lowerAt(point));
      return { phi, theta, sigma: multiply(scale, transpose(scale)) };
    },
    slope: (point, by) => {
      const byCoefficients = toRows(by, settings, series);
      const byX = multiply(multiply(transpose(spread), byCoefficients), root);
      const lower = lowerAt(point);
      const byLower = multiply(multiply(multiply(transpose(root), by.sigma), root), lower);
      return Float64Array.from([
        ...byX.flat(),
        ...cells.map(([i, j]) => 2 * byLower[i][j] * (i === j ? lower[i][i] * diagonal : below)),
      ]);
    },
  };
}

/** Rows of lags and innovations in block order as Φ(1 … p) and Θ(1 … q), row = equation. */
export function toMatrices(
  rows: Matrix,
  { lags, movingAverage }: ModelSettings,
  series: number,
): Pick<Varma, "phi" | "theta"> {
  const none = () => zeros(series, series);
  const block = (b: number): Matrix => transpose(rows.slice(b * series, (b + 1) * series));
  const phi: Matrix[] = Array.from({ length: orderOf({ lags }) }, none);
  lags.forEach((lag, b) => (phi[lag - 1] = block(b)));
  return { phi, theta: Array.from({ length: movingAverage }, (_, j) => block(lags.length + j)) };
}

/** The way back, lags left out dropped. */
export function toRows(
  { phi, theta }: Pick<Varma, "phi" | "theta">,
  { lags }: ModelSettings,
  series: number,
): MutableMatrix {
  const rows = [...lags.map((lag) => phi[lag - 1]), ...theta].flatMap((matrix) => transpose(matrix));
  return rows.length === 0 ? zeros(0, series) : rows;
}

/** L with LLᵀ = the block of WWᵀ that belongs to lags and innovations; null where they repeat each other. */
export function dynamicSpread(inverseRoot: Matrix, regressors: readonly Regressor[]): Matrix | null {
  const rows = dynamicRows(regressors, inverseRoot);
  return rows.length === 0 ? [] : cholesky(multiply(rows, transpose(rows)));
}
