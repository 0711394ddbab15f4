import { chiSquareUpper } from "../distributions";
import { inverseSymmetric, multiply, trace } from "../linalg";
import type { Matrix } from "../matrix";
import { exceedsWork } from "../var/work";
import { figure, missing, type Figure } from "./figure";
import { moment, remainders } from "./remainders";

/** Rows that the test needs: the products regressed must outnumber what they are regressed on. */
const enough = (rows: number, series: number, lags: number): boolean => {
  const products = (series * (series + 1)) / 2;
  return rows - lags - 1 - products * lags >= products;
};

/** Two lags, else one, else none, as the rows allow. */
export const archLags = (rows: number, series: number): number | null =>
  [2, 1].find((lags) => enough(rows, series, lags)) ?? null;

/**
 * Whether the spread of all series together depends on the residuals before: the products uᵢ[t]uⱼ[t], i ≥ j, regressed on
 * a constant and their own past, (T − lags)·(N − tr(Ω·Ω₀⁻¹)), N = K(K + 1)/2, χ²(lags·N²).
 * @param u T×K residuals
 * Source: Lütkepohl (2005), 16.5.1; Doornik and Hendry (1997); Engle (1982) for one series
 */
export function archTest(u: Matrix, lags: number | null): Figure {
  const series = u[0].length;
  if (lags === null || !enough(u.length, series, lags)) return missing("rows", lags);
  const products = (series * (series + 1)) / 2;
  const rows = u.length - lags;
  const width = 1 + products * lags;
  if (exceedsWork(rows * width * (width + products))) return missing("heavy", lags);
  const v = u.map((row) => row.flatMap((a, i) => row.slice(0, i + 1).map((b) => a * b)));
  const y = v.slice(lags);
  const whole = remainders(
    y.map(() => [1]),
    y,
  );
  const left = remainders(
    y.map((_, t) => [1, ...Array.from({ length: lags }, (_, j) => v[t + lags - 1 - j]).flat()]),
    y,
  );
  const inverse = whole && inverseSymmetric(moment(whole));
  if (left === null || inverse === null) return missing("exact", lags);
  const statistic = rows * (products - trace(multiply(inverse, moment(left))));
  const df = lags * products * products;
  return figure({ lags, statistic, df, p: chiSquareUpper(statistic, df) });
}
