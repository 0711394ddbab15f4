import { chiSquareUpper } from "../distributions";
import { cholesky, invertTriangle, multiply, transpose } from "../linalg";
import type { Matrix } from "../matrix";
import { figure, missing, type Figure } from "./figure";
import { moment, remainders } from "./remainders";

/** The test of the third moments, of the fourth, and of both. */
export interface Normality {
  readonly skewness: Figure;
  readonly kurtosis: Figure;
  readonly both: Figure;
  /** Whether the fourth moments lie above the normal one on the whole. */
  readonly heavyTails: boolean;
}

/**
 * Whether the residuals have the third and fourth moments of a normal distribution: centred, whitened by the lower
 * Cholesky factor of UᵀU/(T − q) in the order of the columns; T·b₁ᵀb₁/6 and T·(b₂ − 3)ᵀ(b₂ − 3)/24, χ²(K) each.
 * @param u T×K residuals
 * @param q coefficients per equation, T > q
 * Source: Lütkepohl (2005), 4.5
 */
export function normality(u: Matrix, q: number): Normality {
  const rows = u.length;
  const centred = remainders(
    u.map(() => [1]),
    u,
  )!;
  const root = cholesky(moment(centred).map((row) => row.map((v) => (v * rows) / (rows - q))));
  if (root === null) {
    const nothing = missing("exact");
    return { skewness: nothing, kurtosis: nothing, both: nothing, heavyTails: false };
  }
  const white = multiply(centred, transpose(invertTriangle(root)));
  const mean = (k: number, power: number) => white.reduce((sum, row) => sum + row[k] ** power, 0) / rows;
  const series = u[0].length;
  let skewness = 0;
  let kurtosis = 0;
  let excess = 0;
  for (let k = 0; k < series; k++) {
    skewness += (rows * mean(k, 3) ** 2) / 6;
    kurtosis += (rows * (mean(k, 4) - 3) ** 2) / 24;
    excess += mean(k, 4) - 3;
  }
  const told = (statistic: number, df: number) => figure({ statistic, df, p: chiSquareUpper(statistic, df) });
  return {
    skewness: told(skewness, series),
    kurtosis: told(kurtosis, series),
    both: told(skewness + kurtosis, 2 * series),
    heavyTails: excess > 0,
  };
}
