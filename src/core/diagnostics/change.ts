import { factorColumns, inverseRoot, multiply, solveColumns, transpose } from "../linalg";
import type { Matrix } from "../matrix";
import { exceedsWork } from "../var/work";
import { figure, missing, type Figure, type Gap } from "./figure";
import { remainders } from "./remainders";
import { SUP_WALD_QUANTILES, SUP_WALD_TAILS } from "./sup-wald-quantiles";

/** Share of the rows that either side of a break keeps. */
const TRIM = 0.15;

/**
 * Whether some row splits an equation in two: the largest Chow Wald statistic, q·F, over breaks from ⌈0.15T⌉ to
 * T − ⌈0.15T⌉, one figure per equation. The coefficients are least squares, whatever the model's own.
 * @param u T×K residuals of the model: they have the same remainders as the series themselves
 * @param z T×q regressors
 * Source: Andrews (1993), Econometrica 61, 821–856; Hansen (1997), JBES 15, 60–67
 */
export function changeTests(u: Matrix, z: Matrix): Figure[] {
  const rows = u.length;
  const q = z[0].length;
  const none = (gap: Gap) => u[0].map(() => missing(gap));
  const edge = Math.ceil(TRIM * rows);
  if (q === 0) return none("no-coefficients");
  if (edge < q || rows - 2 * q < 1 || edge > rows - edge) return none("rows");
  if (exceedsWork(2 * rows * q * (q + u[0].length))) return none("heavy");
  const basis = orthonormal(z);
  const before = basis && growingSquares(basis, u, edge);
  const after = basis && growingSquares([...basis].reverse(), [...u].reverse(), edge);
  if (!before || !after) return none("exact");
  const whole = remainders(z, u)!;
  return u[0].map((_, k) => {
    const all = whole.reduce((sum, row) => sum + row[k] * row[k], 0);
    let statistic = 0;
    for (let at = edge; at <= rows - edge; at++) {
      const split = before[at - edge][k] + after[rows - at - edge][k];
      if (!(split > 0)) return missing("exact");
      statistic = Math.max(statistic, ((all - split) / split) * (rows - 2 * q));
    }
    return figure({ statistic, df: q, ...supWaldP(statistic, q) });
  });
}

/** The regressors in coordinates that make their columns orthonormal; null when some are an exact combination. */
function orthonormal(z: Matrix): Matrix | null {
  const found = factorColumns(z);
  return "relation" in found ? null : multiply(z, inverseRoot(found.factor));
}

/**
 * Sums of squared remainders of least squares on the first `from`, from + 1, … rows, one row of K each: every further row
 * adds the square of its recursive residual, so that no fit is done twice.
 * @returns null when the first rows cannot tell the columns apart
 * Source: Brown, Durbin and Evans (1975), JRSS B 37, 149–192
 */
function growingSquares(x: Matrix, y: Matrix, from: number): Matrix | null {
  const start = x.slice(0, from);
  const found = factorColumns(start);
  if ("relation" in found) return null;
  const root = inverseRoot(found.factor);
  const inverse = multiply(root, transpose(root));
  const coefficients = solveColumns(found.factor, y.slice(0, from));
  const series = y[0].length;
  const squares = remainders(start, y.slice(0, from))!.reduce<number[]>(
    (sums, row) => sums.map((sum, k) => sum + row[k] * row[k]),
    new Array<number>(series).fill(0),
  );
  const out = [[...squares]];
  for (let t = from; t < x.length; t++) {
    const row = x[t];
    const gain = inverse.map((line) => line.reduce((sum, v, j) => sum + v * row[j], 0));
    const spread = 1 + gain.reduce((sum, v, i) => sum + v * row[i], 0);
    for (let k = 0; k < series; k++) {
      let miss = y[t][k];
      for (let i = 0; i < row.length; i++) miss -= row[i] * coefficients[i][k];
      squares[k] += (miss * miss) / spread;
      for (let i = 0; i < row.length; i++) coefficients[i][k] += (gain[i] * miss) / spread;
    }
    for (let i = 0; i < row.length; i++)
      for (let j = 0; j < row.length; j++) inverse[i][j] -= (gain[i] * gain[j]) / spread;
    out.push([...squares]);
  }
  return out;
}

/** Upper tail of the largest Wald statistic, its logarithm linear between the quantiles that were simulated. */
export function supWaldP(statistic: number, q: number): Pick<Figure, "p" | "gap" | "bound"> {
  const quantiles = SUP_WALD_QUANTILES[q - 1];
  if (quantiles === undefined) return { p: null, gap: "untabulated", bound: null };
  const above = quantiles.findIndex((quantile) => statistic <= quantile);
  if (above < 0) return { p: null, gap: null, bound: { side: "below", p: SUP_WALD_TAILS.at(-1)! } };
  if (statistic === quantiles[above]) return { p: SUP_WALD_TAILS[above], gap: null, bound: null };
  if (above === 0) return { p: null, gap: null, bound: { side: "above", p: SUP_WALD_TAILS[0] } };
  const share = (statistic - quantiles[above - 1]) / (quantiles[above] - quantiles[above - 1]);
  const [from, to] = [Math.log(SUP_WALD_TAILS[above - 1]), Math.log(SUP_WALD_TAILS[above])];
  return { p: Math.exp(from + share * (to - from)), gap: null, bound: null };
}
