import type { FilterRow, Track } from "./filter";
import { dotDense, transposeCongruence, transposeTimesDense, type StateSpace } from "./state-space";
import { pullBy, seeCell } from "./seen-cell";

/**
 * How −½ Σ (log F + v²/F) changes with what the filter was built from. With several tracks the squares v²/F of all
 * are summed, log F once.
 */
export interface FilterGradient {
  /** With T, but only for its first `series` columns: size×series, row after row. */
  readonly transition: Float64Array;
  /** With Ω and with P, size×size, row after row. */
  readonly noise: Float64Array;
  readonly start: Float64Array;
  /** With the values of the first track, rows×series, row after row. */
  readonly values: Float64Array;
}

/**
 * Runs the filter backwards. With r the derivative by the state and ½(Σrrᵀ − N) that by its variance, a cell seen adds
 * z·v/F to r and zzᵀ/F to N, and a step in time turns r into Tᵀr and N into TᵀNT.
 * @param tracks each with the weights r that it carries along; N is common to all
 * Source: Koopman and Shephard (1992), Biometrika 79, 823–826; Durbin and Koopman (2012), 4.5 and 7.3.3
 */
export function filterGradient(
  space: StateSpace,
  gains: readonly FilterRow[],
  tracks: readonly Track[],
): FilterGradient {
  const { size, series, transition } = space;
  const back: Float64Array[] = tracks.map(() => new Float64Array(size));
  const out = {
    transition: new Float64Array(size * series),
    noise: new Float64Array(size * size),
    start: new Float64Array(size * size),
    values: new Float64Array(gains.length * series),
  };
  let n: Float64Array = new Float64Array(size * size);
  let seen = tracks[0].errors.length;
  // rows that share their gains share the variance after them, so its part is taken once for all of them
  let shared = new Float64Array(size * size);
  const settle = (row: FilterRow) => {
    addVariancePart(out.transition, space, shared, row.after);
    for (let i = 0; i < shared.length; i++) out.noise[i] += shared[i];
    shared = new Float64Array(size * size);
  };
  for (let t = gains.length - 1; t >= 0; t--) {
    if (t < gains.length - 1) {
      addVarianceDerivative(shared, back, n, size);
      tracks.forEach(({ after }, c) => {
        for (let i = 0; i < size; i++)
          for (let k = 0; k < series; k++) out.transition[i * series + k] += back[c][i] * after[t * size + k];
        back[c] = transposeTimesDense(transition, back[c], 1);
      });
      n = transposeCongruence(transition, n, size);
      if (t === 0 || gains[t - 1] !== gains[t]) settle(gains[t]);
    }
    const { cells } = gains[t];
    for (let c = cells.length - 1; c >= 0; c--) {
      seen--;
      const cell = cells[c];
      const { series: k, variance, gain } = cell;
      tracks.forEach(({ errors }, track) => {
        const r = back[track];
        const pull = errors[seen] / variance - dotDense(gain, r);
        if (track === 0) out.values[t * series + k] = -pull;
        pullBy(r, space, k, pull);
      });
      seeCell(n, space, cell);
    }
  }
  addVarianceDerivative(out.start, back, n, size);
  return out;
}

/** ½(Σ rrᵀ − N), added to `to`. */
function addVarianceDerivative(
  to: Float64Array,
  back: readonly Float64Array[],
  n: Float64Array,
  size: number,
): void {
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      let sum = -n[i * size + j];
      for (const r of back) sum += r[i] * r[j];
      to[i * size + j] += sum / 2;
    }
  }
}

/** 2·G·T·P, its first `series` columns, added to `to`. */
function addVariancePart(to: Float64Array, space: StateSpace, g: Float64Array, p: Float64Array): void {
  const { size, series, transition } = space;
  for (let k = 0; k < series; k++) {
    for (let m = 0; m < size; m++) {
      const { at, value } = transition;
      let tp = 0;
      for (let e = 0; e < at[m].length; e++) tp += value[m][e] * p[at[m][e] * size + k];
      for (let i = 0; i < size; i++) to[i * series + k] += 2 * g[i * size + m] * tp;
    }
  }
}
