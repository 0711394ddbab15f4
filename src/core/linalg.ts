import {
  CholeskyDecomposition,
  EigenvalueDecomposition,
  LuDecomposition,
  Matrix as Dense,
  QrDecomposition,
  SingularValueDecomposition,
  inverse,
  solve,
} from "ml-matrix";
import { Issue } from "./issue";
import type { Matrix, MutableMatrix } from "./matrix";

/** The one gate to the matrix library: every decomposition is scaled, screened and never returns an invented answer. */

/**
 * A column that, after removing the columns before it, keeps less than this share of its length is an exact
 * combination of them. NIST's Filip problem keeps 5e-8 and must pass.
 */
export const PIVOT_FLOOR = 1e-10;

const dense = (x: Matrix): Dense => new Dense(x as number[][]);
const plain = (x: Dense): MutableMatrix => x.to2DArray();

export const transpose = (x: Matrix): MutableMatrix =>
  x.length === 0 ? [] : x[0].map((_, j) => x.map((row) => row[j]));

export function multiply(a: Matrix, b: Matrix): MutableMatrix {
  const inner = b.length;
  const width = b[0]?.length ?? 0;
  return a.map((row) => {
    const out = new Array<number>(width).fill(0);
    for (let k = 0; k < inner; k++) {
      const factor = row[k];
      const from = b[k];
      for (let j = 0; j < width; j++) out[j] += factor * from[j];
    }
    return out;
  });
}

export const add = (a: Matrix, b: Matrix): MutableMatrix => a.map((row, i) => row.map((v, j) => v + b[i][j]));
export const subtract = (a: Matrix, b: Matrix): MutableMatrix =>
  a.map((row, i) => row.map((v, j) => v - b[i][j]));
export const scale = (a: Matrix, factor: number): MutableMatrix => a.map((row) => row.map((v) => v * factor));
export const trace = (a: Matrix): number => a.reduce((sum, row, i) => sum + row[i], 0);

/** An exact relation Σ weight·column = 0 among the columns of a matrix, found while factoring it. */
export interface ExactRelation {
  readonly columns: readonly number[];
  readonly weights: readonly number[];
}

/** Orthogonal factor of a matrix whose columns were brought to unit length. */
export interface ColumnFactor {
  readonly lengths: readonly number[];
  /** Upper triangle R of the unit-length columns. */
  readonly upper: Matrix;
  readonly qr: QrDecomposition;
}

/**
 * Householder QR of the columns brought to unit length.
 * @param x  T×q, T ≥ q
 * @returns  the factor, or the first exact relation among the columns
 */
export function factorColumns(x: Matrix): { factor: ColumnFactor } | { relation: ExactRelation } {
  const width = x[0]?.length ?? 0;
  const lengths = Array.from({ length: width }, (_, j) => columnLength(x, j));
  const zero = lengths.findIndex((length) => length === 0);
  if (zero >= 0) return { relation: { columns: [zero], weights: [1] } };
  if (!lengths.every(Number.isFinite)) throw new Issue({ code: "too-large" });
  const qr = new QrDecomposition(dense(x.map((row) => row.map((v, j) => v / lengths[j]))));
  const upper = plain(qr.upperTriangularMatrix);
  const weak = upper.findIndex((row, j) => Math.abs(row[j]) < PIVOT_FLOOR);
  if (weak >= 0) return { relation: relationEndingAt(upper, lengths, weak) };
  return { factor: { lengths, upper, qr } };
}

/** Length of a column, its largest entry taken out first so that no square runs out of range. */
function columnLength(x: Matrix, j: number): number {
  let top = 0;
  for (const row of x) if (!(Math.abs(row[j]) <= top)) top = Math.abs(row[j]);
  if (top === 0 || !Number.isFinite(top)) return top;
  let sum = 0;
  for (const row of x) sum += (row[j] / top) ** 2;
  return top * Math.sqrt(sum);
}

/** Column `last` of the scaled matrix equals a combination of those before it; weights in the original units. */
function relationEndingAt(upper: Matrix, lengths: readonly number[], last: number): ExactRelation {
  const before = upper.slice(0, last).map((row) => row.slice(0, last));
  const target = upper.slice(0, last).map((row) => [row[last]]);
  const shares = last === 0 ? [] : plain(solve(dense(before), dense(target))).map(([w]) => -w);
  const kept = [...shares, 1]
    .map((share, column) => ({ column, share, weight: (share * lengths[last]) / lengths[column] }))
    .filter(({ share }) => Math.abs(share) > 1e-8);
  return { columns: kept.map(({ column }) => column), weights: kept.map(({ weight }) => weight) };
}

/** W with (XᵀX)⁻¹ = W·Wᵀ for the factored columns X: R⁻¹ brought back to original units. */
export const inverseRoot = ({ lengths, upper }: ColumnFactor): MutableMatrix =>
  plain(inverse(dense(upper))).map((row, i) => row.map((v) => v / lengths[i]));

/** Least-squares coefficients q×K of y on the factored columns. */
export function solveColumns({ lengths, qr }: ColumnFactor, y: Matrix): MutableMatrix {
  return plain(qr.solve(dense(y))).map((row, i) => row.map((v) => v / lengths[i]));
}

/**
 * Solves a·X = b for a square matrix that has no exact relation among its (scaled) columns.
 * @throws Issue "singular-system" | "too-large"
 */
export function solveSquare(a: Matrix, b: Matrix): MutableMatrix {
  const rowScale = a.map((row) => Math.max(...row.map(Math.abs)));
  if (!rowScale.every(Number.isFinite)) throw new Issue({ code: "too-large" });
  if (rowScale.includes(0)) throw new Issue({ code: "singular-system" });
  const lu = new LuDecomposition(dense(a.map((row, i) => row.map((v) => v / rowScale[i]))));
  const pivots = plain(lu.upperTriangularMatrix).map((row, i) => Math.abs(row[i]));
  if (Math.min(...pivots) < 1e-14 * Math.max(...pivots)) throw new Issue({ code: "singular-system" });
  return plain(lu.solve(dense(b.map((row, i) => row.map((v) => v / rowScale[i])))));
}

/**
 * Lower Cholesky factor of a symmetric positive definite matrix, or null when it is not positive definite.
 * Diagonal scaling first, so that series in tonnes and series in millionths are judged alike.
 */
export function cholesky(a: Matrix): MutableMatrix | null {
  const scales = a.map((row, i) => Math.sqrt(row[i]));
  if (!scales.every((s) => s > 0 && Number.isFinite(s))) return null;
  // the library wants exact symmetry, which products of rounded numbers do not have
  const scaled = a.map((row, i) => row.map((v, j) => (v + a[j][i]) / 2 / (scales[i] * scales[j])));
  const decomposition = new CholeskyDecomposition(dense(scaled));
  if (!decomposition.isPositiveDefinite()) return null;
  const lower = plain(decomposition.lowerTriangularMatrix);
  // the last pivot of a unit-diagonal matrix is the share of variance left: below this it is rounding noise
  if (lower.some((row, i) => !(row[i] > 1e-7))) return null;
  return lower.map((row, i) => row.map((v) => v * scales[i]));
}

/** ln|a| of a symmetric positive definite matrix, or null when it is not positive definite. */
export function logDeterminant(a: Matrix): number | null {
  const lower = cholesky(a);
  return lower && 2 * lower.reduce((sum, row, i) => sum + Math.log(row[i]), 0);
}

/** Inverse of a symmetric positive definite matrix through its Cholesky factor; null when it is not. */
export function inverseSymmetric(a: Matrix): MutableMatrix | null {
  const lower = cholesky(a);
  if (!lower) return null;
  const root = invertTriangle(lower);
  return multiply(transpose(root), root);
}

/** Inverse of a triangle with a nonzero diagonal. */
export const invertTriangle = (triangle: Matrix): MutableMatrix => plain(inverse(dense(triangle)));

export interface Eigenvalue {
  readonly real: number;
  readonly imaginary: number;
}

/**
 * Eigenvalues of a general square matrix, in the library's order; series in very different units do no harm.
 * @throws Issue "too-large"
 */
export function eigenvalues(a: Matrix): Eigenvalue[] {
  // not spread into one call of Math.max: the cells of a long companion matrix are too many arguments
  const top = a.reduce((most, row) => row.reduce((m, v) => Math.max(m, Math.abs(v)), most), 0);
  if (top === 0) return a.map(() => ({ real: 0, imaginary: 0 }));
  if (!Number.isFinite(top)) throw new Issue({ code: "too-large" });
  // squares of numbers near the end of the range overflow, and the library then never comes back
  const unit = 2 ** Math.floor(Math.log2(top));
  const scaled = balanced(a.map((row) => row.map((v) => v / unit)));
  const { realEigenvalues, imaginaryEigenvalues } = new EigenvalueDecomposition(dense(scaled));
  return realEigenvalues.map((real, i) => ({ real: real * unit, imaginary: imaginaryEigenvalues[i] * unit }));
}

/**
 * A matrix with the same eigenvalues whose rows and columns are of like size: D⁻¹·A·D, D of powers of two, exact.
 * Source: Parlett and Reinsch (1969), Numerische Mathematik 13, 293–304
 */
function balanced(a: Matrix): MutableMatrix {
  const out = a.map((row) => [...row]);
  for (let moved = true; moved;) {
    moved = false;
    for (let i = 0; i < out.length; i++) {
      const rowSize = out[i].reduce((sum, v, j) => (j === i ? sum : sum + Math.abs(v)), 0);
      const columnSize = out.reduce((sum, row, j) => (j === i ? sum : sum + Math.abs(row[i])), 0);
      if (rowSize === 0 || columnSize === 0) continue;
      const factor = 2 ** Math.round(Math.log2(rowSize / columnSize) / 2);
      if (columnSize * factor + rowSize / factor >= 0.95 * (columnSize + rowSize)) continue;
      out[i] = out[i].map((v) => v / factor);
      for (const row of out) row[i] *= factor;
      moved = true;
    }
  }
  return out;
}

/** Eigenvalues (falling) and orthonormal eigenvectors (columns) of a symmetric matrix. */
export function symmetricEigen(a: Matrix): { values: number[]; vectors: MutableMatrix } {
  const decomposition = new EigenvalueDecomposition(dense(a), { assumeSymmetric: true });
  const order = decomposition.realEigenvalues.map((_, i) => i);
  order.sort((i, j) => decomposition.realEigenvalues[j] - decomposition.realEigenvalues[i]);
  const vectors = plain(decomposition.eigenvectorMatrix);
  return {
    values: order.map((i) => decomposition.realEigenvalues[i]),
    vectors: vectors.map((row) => order.map((i) => row[i])),
  };
}

/** Singular values, falling. */
export const singularValues = (a: Matrix): number[] =>
  [...new SingularValueDecomposition(dense(a), { autoTranspose: true }).diagonal].sort((p, q) => q - p);
