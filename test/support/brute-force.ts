import { cholesky, invertTriangle, logDeterminant, multiply, transpose } from "../../src/core/linalg";
import type { Matrix } from "../../src/core/matrix";

/** One cell of a block of series. */
export interface BlockCell {
  readonly row: number;
  readonly series: number;
  readonly value: number;
}

export const cellsOf = (x: Matrix): BlockCell[] =>
  x.flatMap((line, row) => line.map((value, series) => ({ row, series, value })));

/** Covariance of cells from Γ(0), Γ(1), …, Γ(k)[i][j] = Cov(i at t, j at t − k). */
export function cellCovariance(
  gamma: readonly Matrix[],
  a: readonly BlockCell[],
  b: readonly BlockCell[],
): Matrix {
  return a.map((p) =>
    b.map((q) =>
      p.row >= q.row ? gamma[p.row - q.row][p.series][q.series] : gamma[q.row - p.row][q.series][p.series],
    ),
  );
}

/** ln of the normal density of mean zero. */
export function logDensity(x: readonly number[], covariance: Matrix): number {
  const white = multiply(invertTriangle(cholesky(covariance)!), x.map((v) => [v])); // prettier-ignore
  const squares = white.reduce((sum, [v]) => sum + v * v, 0);
  return -0.5 * (x.length * Math.log(2 * Math.PI) + logDeterminant(covariance)! + squares);
}

/** Mean and variance of unseen normal values of mean zero given seen ones. */
export function conditional(
  seen: readonly number[],
  among: Matrix,
  between: Matrix,
  own: Matrix,
): { readonly mean: number[]; readonly variance: Matrix } {
  const root = invertTriangle(cholesky(among)!);
  const weights = multiply(root, transpose(between));
  const white = multiply(root, seen.map((v) => [v])); // prettier-ignore
  return {
    mean: multiply(transpose(weights), white).map(([v]) => v),
    variance: own.map((row, i) =>
      row.map((v, j) => v - weights.reduce((sum, line) => sum + line[i] * line[j], 0)),
    ),
  };
}
