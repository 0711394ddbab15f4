import type { Matrix } from "../matrix";

/** Mean of numbers; the second pass removes the rounding of the first (NIST NumAcc4 needs it). */
export function mean(values: ArrayLike<number>): number {
  const count = values.length;
  let sum = 0;
  for (let t = 0; t < count; t++) sum += values[t];
  const first = sum / count;
  let rest = 0;
  for (let t = 0; t < count; t++) rest += values[t] - first;
  return first + rest / count;
}

/** Each column less its mean over all rows; a constant column becomes exact zeros. */
export function centredColumns(x: Matrix): Float64Array[] {
  return x[0].map((_, j) => {
    const values = Float64Array.from(x, (row) => row[j]);
    const first = values[0];
    if (values.every((v) => v === first)) return new Float64Array(values.length);
    const centre = mean(values);
    return values.map((v) => v - centre);
  });
}
