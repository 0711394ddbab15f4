import { expect } from "vitest";
import type { Matrix } from "../../src/core/matrix";

export interface Tolerance {
  readonly rtol?: number;
  /** Only where the true value is zero; the reason stands beside the use. */
  readonly atol?: number;
}

/** Compares numbers one by one: shape first, then index, both values, error and allowance of the first miss. */
export function close(
  actual: Matrix | readonly number[] | number,
  expected: Matrix | readonly number[] | number,
  { rtol = 1e-10, atol = 0 }: Tolerance = {},
): void {
  const a = flatten(actual);
  const e = flatten(expected);
  expect(a.shape, "shape").toEqual(e.shape);
  a.values.forEach((value, i) => {
    const allowance = atol + rtol * Math.abs(e.values[i]);
    const error = Math.abs(value - e.values[i]);
    if (!(error <= allowance)) {
      expect.fail(`at ${i}: got ${value}, expected ${e.values[i]}; off by ${error}, allowed ${allowance}`);
    }
  });
}

/** Agreement of a whole block: max|difference| / max|block|. */
export function blockClose(actual: Matrix, expected: Matrix, rtol = 1e-10): void {
  const a = flatten(actual);
  const e = flatten(expected);
  expect(a.shape, "shape").toEqual(e.shape);
  const top = Math.max(...e.values.map(Math.abs));
  const worst = Math.max(...a.values.map((v, i) => Math.abs(v - e.values[i])));
  expect(worst / top, `largest difference ${worst} in a block up to ${top}`).toBeLessThanOrEqual(rtol);
}

function flatten(x: Matrix | readonly number[] | number): { shape: number[]; values: number[] } {
  if (typeof x === "number") return { shape: [], values: [x] };
  if (x.length > 0 && typeof x[0] === "number") return { shape: [x.length], values: [...(x as number[])] };
  const rows = x as Matrix;
  return { shape: [rows.length, ...new Set(rows.map((row) => row.length))], values: rows.flat() };
}
