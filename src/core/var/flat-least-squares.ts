import { PIVOT_FLOOR } from "../linalg";

/**
 * Least squares by Householder reflections on flat columns, for fitting thousands of samples of one size: the same
 * coefficients as `leastSquares` without its step of refinement, and nothing else.
 * @param z       T×q, column after column; overwritten
 * @param y       T×K, column after column; overwritten
 * @returns       q×K coefficients, row after row; null when a column is an exact combination of those before it
 * Source: Golub and Van Loan (2013), 5.2.2
 */
export function flatLeastSquares(
  z: Float64Array,
  y: Float64Array,
  {
    rows,
    regressors,
    series,
  }: { readonly rows: number; readonly regressors: number; readonly series: number },
): Float64Array | null {
  const diagonal = new Float64Array(regressors);
  for (let j = 0; j < regressors; j++) {
    const whole = length(z, j * rows, rows);
    const v = z.subarray(j * rows, (j + 1) * rows);
    const rest = length(v, j, rows - j);
    // reflections so far kept the column's length, so `rest` is what the columns before it leave of it
    if (!(rest > PIVOT_FLOOR * whole)) return null;
    diagonal[j] = v[j] > 0 ? -rest : rest;
    v[j] -= diagonal[j];
    const half = -diagonal[j] * v[j];
    for (let c = j + 1; c < regressors; c++) reflect(v, half, z, c * rows, j);
    for (let k = 0; k < series; k++) reflect(v, half, y, k * rows, j);
  }
  const coefficients = new Float64Array(regressors * series);
  for (let k = 0; k < series; k++) {
    for (let j = regressors - 1; j >= 0; j--) {
      let sum = y[k * rows + j];
      for (let c = j + 1; c < regressors; c++) sum -= z[c * rows + j] * coefficients[c * series + k];
      coefficients[j * series + k] = sum / diagonal[j];
    }
  }
  return coefficients;
}

/** Column at `start` less v·(vᵀcolumn)/half, rows from `from` on: half is vᵀv/2. */
function reflect(v: Float64Array, half: number, columns: Float64Array, start: number, from: number): void {
  let sum = 0;
  for (let t = from; t < v.length; t++) sum += v[t] * columns[start + t];
  const factor = sum / half;
  for (let t = from; t < v.length; t++) columns[start + t] -= factor * v[t];
}

function length(values: Float64Array, from: number, count: number): number {
  let sum = 0;
  for (let t = from; t < from + count; t++) sum += values[t] * values[t];
  return Math.sqrt(sum);
}
