import { factorColumns, multiply, solveColumns, subtract } from "../linalg";
import type { Matrix } from "../matrix";

/** What least squares on the columns of x leaves of y; null when those columns are an exact combination. */
export function remainders(x: Matrix, y: Matrix): Matrix | null {
  if (x[0].length === 0) return y;
  const found = factorColumns(x);
  if ("relation" in found) return null;
  const first = subtract(y, multiply(x, solveColumns(found.factor, y)));
  // once more on what is left: the step of refinement
  return subtract(first, multiply(x, solveColumns(found.factor, first)));
}

/** xᵀx / rows. */
export function moment(x: Matrix): Matrix {
  const width = x[0].length;
  const out = Array.from({ length: width }, () => new Array<number>(width).fill(0));
  for (const row of x)
    for (let i = 0; i < width; i++) for (let j = 0; j < width; j++) out[i][j] += row[i] * row[j];
  return out.map((row) => row.map((v) => v / x.length));
}
