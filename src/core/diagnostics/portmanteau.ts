import { chiSquareUpper } from "../distributions";
import { cholesky, invertTriangle, multiply, transpose } from "../linalg";
import { column, type Matrix } from "../matrix";
import { productMoments } from "../moments/lag-covariance";
import { exceedsWork } from "../var/work";
import { figure, missing, type Figure } from "./figure";
import { moment } from "./remainders";

/** Both forms of the portmanteau test, on the same lags. */
export interface Portmanteau {
  readonly plain: Figure;
  readonly smallSample: Figure;
}

/**
 * Whether the residuals of all series together are correlated with their own past:
 * Q = T·Σ tr(Cᵢᵀ C₀⁻¹ Cᵢ C₀⁻¹) and T²·Σ tr(…)/(T − i), i = 1 … lags, Cᵢ = Σ u[t]u[t−i]ᵀ/T.
 * @param u      T×K residuals
 * @param fitted degrees of freedom that the model's lags use up
 * Source: Lütkepohl (2005), (4.4.21) and (4.4.23)
 */
export function portmanteau(u: Matrix, lags: number, fitted: number): Portmanteau {
  const rows = u.length;
  const series = u[0].length;
  const none = (gap: "rows" | "lags" | "exact" | "heavy") => {
    const nothing = missing(gap, lags);
    return { plain: nothing, smallSample: nothing };
  };
  if (lags < 1 || lags >= rows) return none("rows");
  const df = series * series * lags - fitted;
  if (df <= 0) return none("lags");
  if (exceedsWork(rows * lags * series * series)) return none("heavy");
  const root = cholesky(moment(u));
  if (root === null) return none("exact");
  // with w = L⁻¹u, C₀ = LLᵀ, each trace is the squared length of the correlation matrix of w
  const white = multiply(u, transpose(invertTriangle(root)));
  const columns = white[0].map((_, k) => Float64Array.from(column(white, k)));
  let plain = 0;
  let small = 0;
  for (let lag = 1; lag <= lags; lag++) {
    let square = 0;
    for (const row of productMoments(columns, lag, rows)) for (const v of row) square += v * v;
    plain += rows * square;
    small += (rows * rows * square) / (rows - lag);
  }
  const told = (statistic: number) => figure({ lags, statistic, df, p: chiSquareUpper(statistic, df) });
  return { plain: told(plain), smallSample: told(small) };
}
