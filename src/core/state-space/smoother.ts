import { runFilter, type FilterRow } from "./filter";
import { dot, dotDense, transposeCongruence, transposeTimesDense, type StateSpace } from "./state-space";
import { pullBy, seeCell } from "./seen-cell";

/**
 * What every cell is expected to be given all cells seen, before and after it; a seen cell is itself.
 * @param values rows×series, row after row
 * @returns rows×series
 * Source: Durbin and Koopman (2012), 4.4 and 6.4
 */
export function smoothedCells(
  space: StateSpace,
  gains: readonly FilterRow[],
  values: Float64Array,
): Float64Array {
  const { size, series, observed, transition } = space;
  const { errors, before } = runFilter(space, gains, values);
  const out = new Float64Array(gains.length * series);
  let r: Float64Array = new Float64Array(size);
  let seen = errors.length;
  for (let t = gains.length - 1; t >= 0; t--) {
    const row = gains[t];
    for (const { series: k, variance, gain } of [...row.cells].reverse())
      pullBy(r, space, k, errors[--seen] / variance - dotDense(gain, r));
    for (let k = 0; k < series; k++) {
      const reach = varianceTimes(row.before, observed.at[k], observed.value[k], size);
      out[t * series + k] =
        dot(observed.at[k], observed.value[k], before.subarray(t * size, (t + 1) * size)) +
        dotDense(reach, r);
    }
    r = transposeTimesDense(transition, r, 1);
  }
  return out;
}

/** Variances that are left to every cell once all seen cells are known: zᵀ(P − PNP)z, rows×series. */
export function smoothedVariances(space: StateSpace, gains: readonly FilterRow[]): Float64Array {
  const { size, series, observed, transition } = space;
  const out = new Float64Array(gains.length * series);
  let n: Float64Array = new Float64Array(size * size);
  for (let t = gains.length - 1; t >= 0; t--) {
    const row = gains[t];
    for (const cell of [...row.cells].reverse()) seeCell(n, space, cell);
    for (let k = 0; k < series; k++) {
      const reach = varianceTimes(row.before, observed.at[k], observed.value[k], size);
      let known = 0;
      for (let i = 0; i < size; i++)
        for (let j = 0; j < size; j++) known += reach[i] * n[i * size + j] * reach[j];
      // rounding may leave less than nothing of a variance that is all explained
      out[t * series + k] = Math.max(0, dot(observed.at[k], observed.value[k], reach) - known);
    }
    n = transposeCongruence(transition, n, size);
  }
  return out;
}

/** P·z. */
function varianceTimes(p: Float64Array, at: Int32Array, value: Float64Array, size: number): Float64Array {
  const out = new Float64Array(size);
  for (let e = 0; e < at.length; e++) for (let i = 0; i < size; i++) out[i] += value[e] * p[at[e] * size + i];
  return out;
}
