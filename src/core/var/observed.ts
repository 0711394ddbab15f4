import { applyPower, planLoss, rowsLost, spansOf, type StepPlan } from "../prepare/steps";
import type { Sample } from "./sample";

/** True where a sample has gaps, which only a filter can look past. */
export const hasGaps = (sample: Sample): boolean =>
  sample.series.some((row) => row.some((v) => Number.isNaN(v)));

/**
 * The observed cells of a sample as a state space sees them. A series whose differences a gap would reach is observed
 * as the level it is, so that no observed cell is lost; every other series as its stepped values.
 */
export interface Observed {
  /** n, rows on the stepped scale. */
  readonly rows: number;
  readonly series: number;
  /** rows×series, row after row, what known first levels lead to taken out; 0 in gaps. */
  readonly values: Float64Array;
  /** 1 where a cell is observed. */
  readonly seen: Uint8Array;
  /** Per series the weights d[1 …] of its own past in x[t] = z[t] + Σ d[j]·x[t − j], empty where z is observed. */
  readonly undone: readonly (readonly number[])[];
  /** What a unit in each first level that is not known would add, rows×series each. */
  readonly unknown: readonly Float64Array[];
  /** What was taken out of the values: what the known first levels lead to. */
  readonly known: Float64Array;
}

/**
 * @param levels whether every differenced series is wanted as a level
 */
export function observedSample(
  sample: Sample,
  plan: StepPlan,
  { levels = false }: { readonly levels?: boolean } = {},
): Observed {
  const lost = planLoss(plan);
  const rows = sample.series.length - lost;
  const series = plan.length;
  const out = {
    rows,
    series,
    values: new Float64Array(rows * series),
    seen: new Uint8Array(rows * series),
    known: new Float64Array(rows * series),
  };
  const undone: number[][] = [];
  const unknown: Float64Array[] = [];
  plan.forEach((steps, k) => {
    const level = applyPower(
      sample.series.map((row) => row[k]),
      steps,
      k,
    );
    const weights = pastWeights(spansOf(steps));
    const first = level.slice(lost - rowsLost(steps), lost);
    const gaps = level.slice(lost - rowsLost(steps)).some(Number.isNaN);
    const asLevel = weights.length > 0 && (levels || gaps);
    const past = first.map((v) => (Number.isNaN(v) ? 0 : v));
    const led = continued(weights, past, rows);
    undone.push(asLevel ? weights : []);
    for (let t = 0; t < rows; t++) {
      const cell = t * series + k;
      const x = level[lost + t];
      out.known[cell] = asLevel ? led[t] : 0;
      if (Number.isNaN(x)) continue;
      out.seen[cell] = 1;
      const before = weights.reduce((sum, w, j) => sum + w * level[lost + t - 1 - j], 0);
      out.values[cell] = asLevel ? x - led[t] : x - before;
    }
    first.forEach((v, i) => {
      if (!asLevel || !Number.isNaN(v)) return;
      const path = continued(weights, first.map((_, j) => (i === j ? 1 : 0)), rows); // prettier-ignore
      const track = new Float64Array(rows * series);
      path.forEach((w, t) => (track[t * series + k] = w));
      unknown.push(track);
    });
  });
  return { ...out, undone, unknown };
}

/** d[1 …] with 1 − Σ d[j]B^j = Π (1 − B^span). */
export function pastWeights(spans: readonly number[]): number[] {
  const polynomial = spans.reduce<number[]>(
    (p, span) =>
      Array.from({ length: p.length + span }, (_, j) => (p[j] ?? 0) - (j >= span ? p[j - span] : 0)),
    [1],
  );
  return polynomial.slice(1).map((v) => -v || 0);
}

/** Where x[t] = Σ d[j]·x[t − j] leads from its past. */
function continued(weights: readonly number[], past: readonly number[], rows: number): number[] {
  const x = [...past];
  for (let t = 0; t < rows; t++)
    x.push(weights.reduce((sum, w, j) => sum + w * x[past.length + t - 1 - j], 0));
  return x.slice(past.length);
}

/** Values on the stepped scale as levels that begin at 0, where a series is observed as its level. */
export function lift(
  path: Float64Array,
  { undone, series }: Pick<Observed, "undone" | "series">,
): Float64Array {
  if (undone.every((weights) => weights.length === 0)) return path;
  const out = path.slice();
  undone.forEach((weights, k) => {
    for (let cell = k; cell < out.length; cell += series)
      for (let j = 0; j < weights.length && cell - (j + 1) * series >= 0; j++)
        out[cell] += weights[j] * out[cell - (j + 1) * series];
  });
  return out;
}

/** The transpose of `lift`: derivatives by levels as derivatives by stepped values. */
export function unlift(
  by: Float64Array,
  { undone, series }: Pick<Observed, "undone" | "series">,
): Float64Array {
  const out = by.slice();
  undone.forEach((weights, k) => {
    for (let cell = out.length - series + k; cell >= 0; cell -= series)
      for (let j = 0; j < weights.length && cell + (j + 1) * series < out.length; j++)
        out[cell] += weights[j] * out[cell + (j + 1) * series];
  });
  return out;
}

/** Σ weight·track, of so many values. */
export function combination(
  tracks: readonly Float64Array[],
  weights: readonly number[],
  length: number,
): Float64Array {
  const out = new Float64Array(length);
  tracks.forEach((track, c) => {
    for (let i = 0; i < length; i++) out[i] += weights[c] * track[i];
  });
  return out;
}
