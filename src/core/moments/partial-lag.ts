import { chiSquareUpper } from "../distributions";
import { Issue } from "../issue";
import { logDeterminant } from "../linalg";
import type { Matrix } from "../matrix";
import { designOf } from "../var/design";
import { refuseExactSeries } from "../var/exact";
import { leastSquares, residualCovariance } from "../var/least-squares";
import { requireRows } from "../var/rows-needed";
import { allLags, plainShape, type ModelSettings } from "../var/settings";
import { lagCovariances } from "./lag-covariance";
import { whittleRecursion } from "./whittle";

/** The partial autoregression at one lag. */
export interface PartialLag {
  readonly lag: number;
  /** P(k), K×K, row = equation. */
  readonly matrix: Matrix;
  /** Likelihood ratio of P(k) = 0, and its p-value. */
  readonly statistic: number;
  readonly p: number;
}

/**
 * P(k), the last coefficient matrix of the Yule–Walker fit of order k, for k = 1 … lags, with a test of P(k) = 0:
 * (T − q − ½)·ln(|Σ̃ₖ₋₁|/|Σ̃ₖ|), least squares with constant of orders k − 1 and k on the same T = n − k rows,
 * q = 1 + K·k, χ²(K²).
 * @param x n×K
 * @throws Issue "too-few-rows" | "constant-series" | "exact-combination" | "singular-system" | "predicted-exactly"
 * Source: Tiao and Box (1981), JASA 76, 802–816
 */
export function partialLags(x: Matrix, lags: number): PartialLag[] {
  const series = x[0].length;
  const settings = (order: number): ModelSettings => ({ ...plainShape(series), lags: allLags(order) });
  requireRows(settings(lags), { rows: x.length, series, drivers: 0 }, lags);
  refuseExactSeries(x, settings(lags), 1);
  const steps = whittleRecursion(lagCovariances(x, [0, ...allLags(lags)]));
  const sample = { y: x, drivers: [], start: 1 };
  return allLags(lags).map((lag) => {
    const rows = x.length - lag;
    const logDet = (order: number): number => {
      const { residuals } = leastSquares(designOf(sample, settings(order), lag));
      const value = logDeterminant(residualCovariance(residuals, rows));
      if (value === null) throw new Issue({ code: "predicted-exactly", order });
      return value;
    };
    const statistic = (rows - (1 + series * lag) - 0.5) * (logDet(lag - 1) - logDet(lag));
    return {
      lag,
      matrix: steps[lag].coefficients[lag - 1],
      statistic,
      p: chiSquareUpper(statistic, series * series),
    };
  });
}
