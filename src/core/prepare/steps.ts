import { Issue } from "../issue";
import type { Matrix, MutableMatrix } from "../matrix";

/** One thing done to a series before fitting and undone after. */
export type Step =
  { readonly kind: "log" } | { readonly kind: "sqrt" } | { readonly kind: "diff"; readonly span: number };

/** One list of steps per series, each applied left to right; a log or square root can only come first. */
export type StepPlan = readonly (readonly Step[])[];

/** The log or square root that a list begins with, if any. */
export const powerOf = (steps: readonly Step[]): "log" | "sqrt" | null => {
  const first = steps[0];
  return first && first.kind !== "diff" ? first.kind : null;
};

/** Spans of the differences, in the order taken. */
export const spansOf = (steps: readonly Step[]): number[] =>
  steps.flatMap((step) => (step.kind === "diff" ? [step.span] : []));

/** Rows that a list of steps uses up at the top. */
export const rowsLost = (steps: readonly Step[]): number =>
  spansOf(steps).reduce((sum, span) => sum + span, 0);

/** Rows that a plan uses up for all series together. */
export const planLoss = (plan: StepPlan): number => Math.max(0, ...plan.map(rowsLost));

/**
 * The log or square root of one series.
 * @param x   values in original units; NaN marks a gap and stays one
 * @throws Issue "step-domain" where the value has no log or square root; row counted from 0 within x
 */
export function applyPower(x: readonly number[], steps: readonly Step[], series: number): number[] {
  const power = powerOf(steps);
  if (!power) return [...x];
  const bad = x.findIndex((v) => (power === "log" ? v <= 0 : v < 0));
  if (bad >= 0) throw new Issue({ code: "step-domain", step: power, series, row: bad, value: x[bad] });
  return x.map(power === "log" ? Math.log : Math.sqrt);
}

/** Differences of the given spans in turn; the first Σ spans entries are NaN. */
export function difference(x: readonly number[], spans: readonly number[]): number[] {
  return spans.reduce<number[]>(
    (values, span) => values.map((v, t) => (t < span ? NaN : v - values[t - span])),
    [...x],
  );
}

/**
 * Applies a plan to all series.
 * @param x n×K in original units; NaN marks a gap
 * @returns n×K, NaN where a step used the row up (or a gap reached it)
 * @throws Issue "step-domain"
 */
export function applySteps(x: Matrix, plan: StepPlan): MutableMatrix {
  const columns = plan.map((steps, k) =>
    difference(
      applyPower(
        x.map((row) => row[k]),
        steps,
        k,
      ),
      spansOf(steps),
    ),
  );
  return x.map((_, t) => columns.map((c) => c[t]));
}

/**
 * Undoes differences: the values that continue `past` when `future` continues its differences.
 * @param past   at least Σ spans values on the scale before differencing
 * @param future values on the differenced scale
 */
export function integrate(
  past: readonly number[],
  spans: readonly number[],
  future: readonly number[],
): number[] {
  const [span, ...rest] = spans;
  if (span === undefined) return [...future];
  // the differences after the first are undone first, from the past of the first difference
  const inner = integrate(difference(past, [span]), rest, future);
  const level = past.slice(-span);
  for (const change of inner) level.push(change + level[level.length - span]);
  return level.slice(span);
}

/** Takes one value back through the log or square root; a negative square root counts as 0. */
export function undoPower(value: number, steps: readonly Step[]): number {
  const power = powerOf(steps);
  if (power === "log") return Math.exp(value);
  return power === "sqrt" ? Math.max(0, value) ** 2 : value;
}

/**
 * Takes a path on the stepped scale back to the scale just before the first log or square root.
 * @param x      n×K in original units
 * @param future h×K on the stepped scale
 * @returns      h×K
 */
export function integratePath(x: Matrix, plan: StepPlan, future: Matrix): MutableMatrix {
  const columns = plan.map((steps, k) => {
    // only the last rows matter to an integral, and reading only those lets older gaps be
    const tail = x.slice(-Math.max(1, rowsLost(steps))).map((row) => row[k]);
    return integrate(
      applyPower(tail, steps, k),
      spansOf(steps),
      future.map((row) => row[k]),
    );
  });
  return future.map((_, t) => columns.map((c) => c[t]));
}

/** Takes a path on the stepped scale back to original units (a logged series comes back as its median). */
export function undoSteps(x: Matrix, plan: StepPlan, future: Matrix): MutableMatrix {
  return integratePath(x, plan, future).map((row) => row.map((v, k) => undoPower(v, plan[k])));
}
