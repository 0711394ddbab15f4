import type { Matrix } from "../matrix";
import type { Regressor } from "./regressors";
import type { ModelSettings } from "./settings";

/**
 * A vector autoregression with its numbers: y[t] = coefficientsᵀ · z[t] + innovation[t] on the stepped scale,
 * z[t] the regressors in the order of `regressors`.
 */
export interface VarModel {
  readonly settings: ModelSettings;
  /** Number of series, K. */
  readonly series: number;
  /** Number of drivers, d. */
  readonly drivers: number;
  /** The q regressors of every equation, in block order. */
  readonly regressors: readonly Regressor[];
  /** q × K, one column per equation. */
  readonly coefficients: Matrix;
  /** K × K covariance of the innovations. */
  readonly noiseCovariance: Matrix;
  /** Rows it was fitted on, after the steps (n). */
  readonly rows: number;
  /** Position of the first row in the fit (see Sample.start). */
  readonly start: number;
}
