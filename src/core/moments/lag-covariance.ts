import { Issue } from "../issue";
import type { Matrix, MutableMatrix } from "../matrix";
import { centredColumns } from "./centre";

export type Divisor = "n" | "n-k";

/**
 * Covariance between each series now and each series `lag` rows earlier, for each of the lags asked for.
 * Γ(k)[i][j] = (1/n) Σ_t (x[t,i] − mean_i)(x[t−k,j] − mean_j), means over all rows; Γ(−k) = Γ(k)ᵀ.
 * @param x       n×K, rows oldest first, finite
 * @param lags    whole rows, |lag| < n, in any order
 * @param divisor n, or the n − |k| products summed
 * @returns       one K×K matrix per lag, units of series i × units of series j
 * @throws Issue "lags-beyond-rows"
 * Cost O(n·K²) per lag.  Source: Lütkepohl (2005), (3.3.9)
 */
export function lagCovariances(x: Matrix, lags: readonly number[], divisor: Divisor = "n"): MutableMatrix[] {
  const rows = x.length;
  const beyond = lags.find((lag) => Math.abs(lag) > rows - 1);
  if (beyond !== undefined) throw new Issue({ code: "lags-beyond-rows", lag: beyond, rows });
  const columns = centredColumns(x);
  return lags.map((lag) => productMoments(columns, lag, divisor === "n" ? rows : rows - Math.abs(lag)));
}

/**
 * Σ_t u[t,i]·u[t−lag,j] / divisor for columns that are used as they stand (no mean removed).
 * @param columns K columns of n numbers each
 */
export function productMoments(
  columns: readonly Float64Array[],
  lag: number,
  divisor: number,
): MutableMatrix {
  const length = columns[0].length - Math.abs(lag);
  return columns.map((now) =>
    columns.map((earlier) => {
      const a = lag >= 0 ? now.subarray(lag) : now;
      const b = lag >= 0 ? earlier : earlier.subarray(-lag);
      let sum = 0;
      for (let t = 0; t < length; t++) sum += a[t] * b[t];
      return sum / divisor;
    }),
  );
}

/**
 * Lagged correlations: lagged covariances over √(Γ(0)[i,i]·Γ(0)[j,j]).
 * Each column is brought to unit variance first, so that very large and very small units do no harm.
 * @throws Issue "constant-series" | "lags-beyond-rows"
 */
export function lagCorrelations(x: Matrix, lags: readonly number[], divisor: Divisor = "n"): MutableMatrix[] {
  const columns = centredColumns(x);
  const lengths = columns.map((c) => c.reduce((top, v) => Math.max(top, Math.abs(v)), 0));
  const constant = lengths.findIndex((length) => length === 0);
  if (constant >= 0) throw new Issue({ code: "constant-series", series: constant });
  const scaled = x.map((row, t) => row.map((_, j) => columns[j][t] / lengths[j]));
  const [variance] = lagCovariances(scaled, [0]);
  return lagCovariances(scaled, lags, divisor).map((gamma) =>
    gamma.map((row, i) => row.map((v, j) => v / Math.sqrt(variance[i][i] * variance[j][j]))),
  );
}
