import betainc from "@stdlib/math-base-special-betainc";
import erfc from "@stdlib/math-base-special-erfc";
import gammainc from "@stdlib/math-base-special-gammainc";
import normal from "@stdlib/stats-base-dists-normal-quantile";
import student from "@stdlib/stats-base-dists-t-quantile";

/** Upper tails are taken directly, never as 1 − cdf, so that a p-value of 1e-30 keeps its digits. */

/** P(Z > x), standard normal. */
export const normalUpper = (x: number): number => 0.5 * erfc(x / Math.SQRT2);

/** P(|Z| > |x|), standard normal. */
export const normalTwoSided = (x: number): number => erfc(Math.abs(x) / Math.SQRT2);

/** The x with P(Z ≤ x) = p, standard normal. */
export const normalQuantile = (p: number): number => normal(p, 0, 1);

/** P(X > x), chi-square with df degrees of freedom. */
export const chiSquareUpper = (x: number, df: number): number =>
  x <= 0 ? 1 : gammainc(x / 2, df / 2, true, true);

/** P(X > x), F with df1 and df2 degrees of freedom. */
export const fUpper = (x: number, df1: number, df2: number): number =>
  x <= 0 ? 1 : betainc(df2 / (df2 + df1 * x), df2 / 2, df1 / 2, true, false);

/** P(|X| > |x|), Student t with df degrees of freedom. */
export const studentTwoSided = (x: number, df: number): number =>
  x === 0 ? 1 : betainc(df / (df + x * x), df / 2, 0.5, true, false);

/** The x with P(X ≤ x) = p, Student t with df degrees of freedom. */
export const studentQuantile = (p: number, df: number): number => student(p, df);
