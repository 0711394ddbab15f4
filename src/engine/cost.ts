import type { BandsRequest } from "../core/forecast/bands";
import { weighingWork, type WhatIfRequest } from "../core/forecast/what-if";
import type { TaskName } from "../core/tasks";
import { shapeOf, type ModelPlan, type ModelRequest } from "../core/var/sample";
import { regressorCount } from "../core/var/regressors";

/** Products in a millisecond of fitting samples anew: least squares is laid out for it, other fits are not. */
const PER_MILLISECOND = { "least-squares": 100_000, other: 10_000 };

/** Products in a millisecond of weighing the cells of a plan. */
const WEIGHED_PER_MILLISECOND = 70_000;

/** Work that the page can do by itself without being missed. */
const UNNOTICED_MILLISECONDS = 40;

/**
 * The one place that decides which work leaves the page: redrawn bands and plans by their size, and every fit by
 * likelihood.
 * Counts and guesses, good to a factor of three.
 */
export function isHeavy(task: TaskName, request: unknown): boolean {
  const { plan, sample } = request as Partial<ModelRequest>;
  if (plan === undefined || sample === undefined) return false;
  const { fit } = shapeOf(plan);
  if (fit === "likelihood" && plan.kind !== "given") return true;
  const series = sample.series[0].length;
  if (task === "whatIf") {
    const { imposed } = request as WhatIfRequest;
    const count = imposed.flat().filter((v) => !Number.isNaN(v)).length;
    return weighingWork(count, imposed.length, series) / WEIGHED_PER_MILLISECOND > UNNOTICED_MILLISECONDS;
  }
  if (task !== "bands") return false;
  const { bands, draws } = request as BandsRequest;
  // the errors of its coefficients are differences of the likelihood all around
  if (fit === "likelihood" && bands === "fitted") return true;
  if (bands !== "redrawn") return false;
  const q = coefficientsOf(plan, series, sample.drivers[0]?.length ?? 0);
  const speed = PER_MILLISECOND[fit === "least-squares" ? "least-squares" : "other"];
  return (draws * sample.series.length * q * (q + series)) / speed > UNNOTICED_MILLISECONDS;
}

/** An automatic order is taken as two. */
const coefficientsOf = (plan: ModelPlan, series: number, drivers: number): number => {
  const settings =
    plan.kind === "given"
      ? plan.model.settings
      : plan.kind === "fit"
        ? plan.settings
        : { ...plan.shape, lags: [1, 2] };
  return regressorCount(settings, series, drivers);
};
