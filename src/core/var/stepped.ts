import { Issue } from "../issue";
import type { Matrix } from "../matrix";
import { applySteps, planLoss, type StepPlan } from "../prepare/steps";
import type { Sample } from "./sample";

/** A sample on the scale a model is fitted on. */
export interface SteppedSample {
  /** n×K on the stepped scale. */
  readonly y: Matrix;
  /** (n or more)×d, aligned with the first row of y. */
  readonly drivers: Matrix;
  /** Position t of the first row of y. */
  readonly start: number;
}

/** Observed cells of the series that has fewest. */
export const leastObserved = (y: Matrix): number =>
  Math.min(...y[0].map((_, k) => y.reduce((count, row) => count + (Number.isNaN(row[k]) ? 0 : 1), 0)));

/**
 * Applies the steps of a plan and drops the rows that they use up.
 * @throws Issue "steps-leave-nothing" | "step-domain"
 */
export function stepSample(sample: Sample, plan: StepPlan): SteppedSample {
  const lost = planLoss(plan);
  const rows = sample.series.length;
  if (lost >= rows) throw new Issue({ code: "steps-leave-nothing", lost, rows });
  return {
    y: applySteps(sample.series, plan).slice(lost),
    drivers: sample.drivers.slice(lost),
    start: sample.start,
  };
}
