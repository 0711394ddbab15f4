import { congruence, dot, timesDense, type StateSpace } from "./state-space";

/** One observed cell, as far as it does not depend on the values: its variance given all before, and the gain. */
interface Cell {
  readonly series: number;
  /** F, the variance of its one-step error. */
  readonly variance: number;
  /** P·z/F. */
  readonly gain: Float64Array;
}

/** One row of the filter, as far as it does not depend on the values. */
export interface FilterRow {
  readonly cells: readonly Cell[];
  /** Variance of the state before the row's cells are seen, and after. */
  readonly before: Float64Array;
  readonly after: Float64Array;
}

/**
 * The gains of the Kalman filter for a pattern of observed cells, the cells of a row taken one at a time.
 * @param seen rows×series, row after row: 1 where a cell is observed
 * @returns null when a cell would be known without error before it is seen
 * Source: Durbin and Koopman (2012), 4.3 and 6.4 (one cell at a time)
 */
export function filterGains(space: StateSpace, seen: Uint8Array): FilterRow[] | null {
  const { series } = space;
  const rows: FilterRow[] = [];
  let before = space.start;
  for (let t = 0; t * series < seen.length; t++) {
    const last = rows.at(-1);
    const pattern = seen.subarray(t * series, (t + 1) * series);
    // once the variance repeats itself, so does everything about a row with the same cells
    if (last && samePattern(last, pattern) && isSame(last.before, before)) {
      rows.push(last);
      continue;
    }
    const row = filterRow(space, before, pattern);
    if (row === null) return null;
    rows.push(row);
    before = nextVariance(space, row);
  }
  return rows;
}

/**
 * The row that the filter settles at when every cell is observed.
 * @returns null when it has not settled after so many rows, or a cell would be known without error
 */
export function settledRow(space: StateSpace, most: number): FilterRow | null {
  const all = new Uint8Array(space.series).fill(1);
  let before = space.start;
  for (let t = 0; t < most; t++) {
    const row = filterRow(space, before, all);
    if (row === null) return null;
    const next = nextVariance(space, row);
    if (isSame(next, before)) return row;
    before = next;
  }
  return null;
}

/** T·P·Tᵀ + Ω. */
function nextVariance(space: StateSpace, { after }: FilterRow): Float64Array {
  const next = congruence(space.transition, after, space.size);
  for (let i = 0; i < next.length; i++) next[i] += space.noise[i];
  return next;
}

/** Below this share of what the state alone gives, a variance is rounding. */
const ROUNDING = 1e-13;

function filterRow(space: StateSpace, before: Float64Array, pattern: Uint8Array): FilterRow | null {
  const { size } = space;
  const { at, value } = space.observed;
  const after = before.slice();
  const cells: Cell[] = [];
  for (let k = 0; k < pattern.length; k++) {
    if (pattern[k] === 0) continue;
    const reach = new Float64Array(size);
    for (let e = 0; e < at[k].length; e++)
      for (let i = 0; i < size; i++) reach[i] += value[k][e] * after[at[k][e] * size + i];
    const variance = dot(at[k], value[k], reach);
    if (!(variance > ROUNDING * ownSize(at[k], value[k], before, size))) return null;
    const gain = reach.map((v) => v / variance);
    for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) after[i * size + j] -= gain[i] * reach[j];
    cells.push({ series: k, variance, gain });
  }
  return { cells, before, after };
}

/** Σ z[i]²·P[i][i]: the scale on which a variance zᵀPz is judged. */
function ownSize(at: Int32Array, value: Float64Array, p: Float64Array, size: number): number {
  let sum = 0;
  for (let e = 0; e < at.length; e++) sum += value[e] ** 2 * p[at[e] * size + at[e]];
  return sum;
}

const samePattern = (row: FilterRow, pattern: Uint8Array): boolean => {
  let count = 0;
  for (const v of pattern) count += v;
  return row.cells.length === count && row.cells.every(({ series }) => pattern[series] === 1);
};

/** Equal to some units in the last place of the larger entries. */
function isSame(a: Float64Array, b: Float64Array): boolean {
  let top = 0;
  for (let i = 0; i < a.length; i++) top = Math.max(top, Math.abs(a[i]));
  for (let i = 0; i < a.length; i++) if (!(Math.abs(a[i] - b[i]) <= 2e-15 * top)) return false;
  return true;
}

/** What the filter makes of one sequence of values. */
export interface Track {
  /** One-step errors of the observed cells, in the order in which they are seen. */
  readonly errors: Float64Array;
  /** State of each row given the cells of the rows before, and given its own too: rows×size each. */
  readonly before: Float64Array;
  readonly after: Float64Array;
}

/**
 * Runs the filter over values.
 * @param values rows×series, row after row; what stands in cells not observed is not read
 */
export function runFilter(space: StateSpace, gains: readonly FilterRow[], values: Float64Array): Track {
  const { size, series, observed } = space;
  const count = gains.reduce((sum, { cells }) => sum + cells.length, 0);
  const errors = new Float64Array(count);
  const before = new Float64Array(gains.length * size);
  const after = new Float64Array(gains.length * size);
  let state: Float64Array = new Float64Array(size);
  let seen = 0;
  for (let t = 0; t < gains.length; t++) {
    before.set(state, t * size);
    for (const { series: k, gain } of gains[t].cells) {
      const error = values[t * series + k] - dot(observed.at[k], observed.value[k], state);
      errors[seen++] = error;
      for (let i = 0; i < size; i++) state[i] += gain[i] * error;
    }
    after.set(state, t * size);
    state = timesDense(space.transition, state, 1);
  }
  return { errors, before, after };
}

/** Z·state, row after row. */
export function observeAll({ observed, size, series }: StateSpace, states: Float64Array): Float64Array {
  const rows = states.length / size;
  const out = new Float64Array(rows * series);
  for (let t = 0; t < rows; t++) {
    const state = states.subarray(t * size, (t + 1) * size);
    for (let k = 0; k < series; k++) out[t * series + k] = dot(observed.at[k], observed.value[k], state);
  }
  return out;
}

/** Variances of the observed cells in the order in which they are seen. */
export const cellVariances = (gains: readonly FilterRow[]): number[] =>
  gains.flatMap(({ cells }) => cells.map(({ variance }) => variance));

/** The filter as an operator that turns values into independent errors of variance 1, seen cells only. */
export function whitening(
  space: StateSpace,
  gains: readonly FilterRow[],
): (values: Float64Array) => number[] {
  const scales = cellVariances(gains).map((f) => 1 / Math.sqrt(f));
  return (values) => Array.from(runFilter(space, gains, values).errors, (v, i) => v * scales[i]);
}
