import betainc from "@stdlib/math-base-special-betainc";
import erfc from "@stdlib/math-base-special-erfc";
import erfcinv from "@stdlib/math-base-special-erfcinv";
import gammainc from "@stdlib/math-base-special-gammainc";
import student from "@stdlib/stats-base-dists-t-quantile";

/** Upper tails are taken directly, never as 1 − cdf, so that a p-value of 1e-30 keeps its digits. */

/** P(Z > x), standard normal. */
export const normalUpper = (x: number): number => 0.5 * erfc(x / Math.SQRT2);

/** P(|Z| > |x|), standard normal. */
export const normalTwoSided = (x: number): number => erfc(Math.abs(x) / Math.SQRT2);

/** The x with P(Z ≤ x) = p, standard normal; from the complement of the error function, so that far tails stay exact. */
export const normalQuantile = (p: number): number => -Math.SQRT2 * erfcinv(2 * p);

/** P(X > x), chi-square with df degrees of freedom. */
export const chiSquareUpper = (x: number, df: number): number =>
  x <= 0 ? 1 : gammainc(x / 2, df / 2, true, true);

/** P(X > x), F with df1 and df2 degrees of freedom. */
export const fUpper = (x: number, df1: number, df2: number): number =>
  x <= 0 ? 1 : betaTail(df1 * x, df2, df1 / 2, df2 / 2);

/** P(|X| > |x|), Student t with df degrees of freedom. */
export const studentTwoSided = (x: number, df: number): number =>
  x === 0 ? 1 : betaTail(x * x, df, 0.5, df / 2);

/** P(B > u/(u + v)), B beta with parameters a and b: asked from the side whose share is small and exact. */
const betaTail = (u: number, v: number, a: number, b: number): number =>
  u < v ? betainc(u / (u + v), a, b, true, true) : betainc(v / (u + v), b, a, true, false);

/** The x with P(X ≤ x) = p, Student t with df degrees of freedom. */
export const studentQuantile = (p: number, df: number): number => student(p, df);
