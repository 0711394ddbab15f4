import type { Matrix } from "../matrix";

/** A square matrix with few entries per row, as its rows. */
export interface SparseRows {
  readonly at: readonly Int32Array[];
  readonly value: readonly Float64Array[];
}

/**
 * y[t] = Z·α[t], α[t + 1] = T·α[t] + η[t], Var η = Ω, α[1] with mean 0 and variance P: no noise of observation.
 * Means, known starts and unknown starts are taken out of y beforehand.
 * Source: Durbin and Koopman (2012), 3.1
 */
export interface StateSpace {
  readonly size: number;
  readonly series: number;
  /** T, size×size. */
  readonly transition: SparseRows;
  /** Z, series×size. */
  readonly observed: SparseRows;
  /** Ω, size×size, row after row. */
  readonly noise: Float64Array;
  /** P, size×size, row after row. */
  readonly start: Float64Array;
}

export function sparseRows(matrix: Matrix): SparseRows {
  const at = matrix.map((row) => Int32Array.from(row.flatMap((v, j) => (v === 0 ? [] : [j]))));
  return { at, value: matrix.map((row, i) => Float64Array.from(at[i], (j) => row[j])) };
}

/** M·X for X of `columns` columns, row after row. */
export function timesDense({ at, value }: SparseRows, x: Float64Array, columns: number): Float64Array {
  const out = new Float64Array(at.length * columns);
  for (let i = 0; i < at.length; i++) {
    for (let e = 0; e < at[i].length; e++) {
      const from = at[i][e] * columns;
      const weight = value[i][e];
      for (let c = 0; c < columns; c++) out[i * columns + c] += weight * x[from + c];
    }
  }
  return out;
}

/** Mᵀ·X for X of `columns` columns, row after row. */
export function transposeTimesDense(
  { at, value }: SparseRows,
  x: Float64Array,
  columns: number,
): Float64Array {
  const out = new Float64Array(at.length * columns);
  for (let i = 0; i < at.length; i++) {
    for (let e = 0; e < at[i].length; e++) {
      const to = at[i][e] * columns;
      const weight = value[i][e];
      for (let c = 0; c < columns; c++) out[to + c] += weight * x[i * columns + c];
    }
  }
  return out;
}

/** M·X·Mᵀ for symmetric X, exactly symmetric. */
export function congruence(m: SparseRows, x: Float64Array, size: number): Float64Array {
  return symmetrised(timesDense(m, transposed(timesDense(m, x, size), size), size), size);
}

/** Mᵀ·X·M for symmetric X, exactly symmetric. */
export function transposeCongruence(m: SparseRows, x: Float64Array, size: number): Float64Array {
  return symmetrised(transposeTimesDense(m, transposed(transposeTimesDense(m, x, size), size), size), size);
}

function transposed(x: Float64Array, size: number): Float64Array {
  const out = new Float64Array(x.length);
  for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) out[j * size + i] = x[i * size + j];
  return out;
}

function symmetrised(x: Float64Array, size: number): Float64Array {
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < i; j++) {
      const mean = (x[i * size + j] + x[j * size + i]) / 2;
      x[i * size + j] = mean;
      x[j * size + i] = mean;
    }
  }
  return x;
}

/** Σ value·x over the entries of a row that are not zero. */
export function dot(at: Int32Array, value: Float64Array, x: Float64Array): number {
  let sum = 0;
  for (let e = 0; e < at.length; e++) sum += value[e] * x[at[e]];
  return sum;
}

export function dotDense(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}
