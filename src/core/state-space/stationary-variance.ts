import { add, multiply, transpose } from "../linalg";
import type { Matrix } from "../matrix";

/** Doublings after which a sum of powers has settled even for a largest root of 1 − 1e-12. */
const DOUBLINGS = 60;

/**
 * P = F·P·Fᵀ + Q as the sum Σ_j F^j·Q·(F^j)ᵀ; each pass doubles the powers summed.
 * @param noise symmetric
 * @returns null when the sum has no end: F is not stable
 * Source: Anderson and Moore (1979), 6.7
 */
export function stationaryVariance(transition: Matrix, noise: Matrix): Matrix | null {
  let sum = noise;
  let power = transition;
  for (let pass = 0; pass < DOUBLINGS; pass++) {
    const next = add(sum, multiply(multiply(power, sum), transpose(power))).map((row) => [...row]);
    for (let i = 0; i < next.length; i++)
      for (let j = 0; j < i; j++) next[i][j] = next[j][i] = (next[i][j] + next[j][i]) / 2;
    if (!next.every((row, i) => Number.isFinite(row[i]))) return null;
    if (next.every((row, i) => row.every((v, j) => v === sum[i][j]))) return next;
    sum = next;
    power = multiply(power, power);
  }
  // whatever is left of the last power is rounding, unless it never shrank
  return power.every((row) => row.every((v) => Math.abs(v) < 1e-3)) ? sum : null;
}
