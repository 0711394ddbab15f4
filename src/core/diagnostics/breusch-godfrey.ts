import { chiSquareUpper, fUpper } from "../distributions";
import { inverseSymmetric, logDeterminant, multiply, trace } from "../linalg";
import type { Matrix } from "../matrix";
import { exceedsWork } from "../var/work";
import { figure, missing, type Figure } from "./figure";
import { moment, remainders } from "./remainders";

/** The test and its form for few rows. */
export interface BreuschGodfrey {
  readonly lm: Figure;
  readonly f: Figure;
}

/**
 * Whether past residuals help to predict residuals beside the model's own regressors, zeros before the sample:
 * T(K − tr(Σ̃ᵤ⁻¹Σ̃ₑ)), χ²(lags·K²), and Rao's F for few rows.
 * @param u T×K residuals
 * @param z T×q regressors
 * Source: Lütkepohl (2005), 4.4.4; Edgerton and Shukur (1999), Econometric Reviews 18, 343–386
 */
export function breuschGodfrey(u: Matrix, z: Matrix, lags: number): BreuschGodfrey {
  const rows = u.length;
  const series = u[0].length;
  const q = z[0].length;
  const added = series * lags;
  const none = (gap: "rows" | "exact" | "heavy") => ({ lm: missing(gap, lags), f: missing(gap, lags) });
  if (lags < 1 || rows - q - added < series) return none("rows");
  if (exceedsWork(rows * (q + added) * (q + added + series))) return none("heavy");
  const before = new Array<number>(series).fill(0);
  const regressors = z.map((row, t) => [
    ...row,
    ...Array.from({ length: lags }, (_, j) => u[t - 1 - j] ?? before).flat(),
  ]);
  const e = remainders(regressors, u);
  const inverse = inverseSymmetric(moment(u));
  if (e === null || inverse === null) return none("exact");
  const left = moment(e);
  const df = added * series;
  const statistic = rows * (series - trace(multiply(inverse, left)));
  const lm = figure({ lags, statistic, df, p: chiSquareUpper(statistic, df) });
  return { lm, f: raoF(moment(u), left, { rows, q, added, lags }) };
}

/** ((|Σ̃ᵤ|/|Σ̃ₑ|)^(1/s) − 1)·(Ns − r)/(K·m), m the regressors added to each equation, N = T − q − m − (K − m + 1)/2. */
function raoF(
  whole: Matrix,
  left: Matrix,
  {
    rows,
    q,
    added: m,
    lags,
  }: { readonly rows: number; readonly q: number; readonly added: number; readonly lags: number },
): Figure {
  const series = whole.length;
  const [logWhole, logLeft] = [logDeterminant(whole), logDeterminant(left)];
  if (logWhole === null || logLeft === null) return missing("exact", lags);
  const square = series * series * m * m - 4;
  const s = square > 0 && series * series + m * m > 5 ? Math.sqrt(square / (series * series + m * m - 5)) : 1;
  const df = series * m;
  const df2 = (rows - q - m - (series - m + 1) / 2) * s - (df / 2 - 1);
  if (!(df2 > 0)) return missing("rows", lags);
  const statistic = (Math.expm1((logWhole - logLeft) / s) * df2) / df;
  return figure({ lags, statistic, df, df2, p: fUpper(statistic, df, df2) });
}
