import type { TaskName } from "../core/tasks";
import type { ModelPlan, ModelRequest } from "../core/var/sample";
import { regressorCount } from "../core/var/regressors";

/** Products in a millisecond of fitting samples anew: least squares is laid out for it, other fits are not. */
const PER_MILLISECOND = { "least-squares": 100_000, other: 10_000 };

/** Work that the page can do by itself without being missed. */
const UNNOTICED_MILLISECONDS = 40;

/**
 * The one place that decides which work leaves the page: redrawn bands by their size, and every fit by likelihood.
 * Counts and guesses, good to a factor of three.
 */
export function isHeavy(task: TaskName, request: unknown): boolean {
  const { plan, sample } = request as Partial<ModelRequest>;
  if (plan === undefined || sample === undefined) return false;
  if (fitOf(plan) === "likelihood") return plan.kind !== "given";
  const { bands, draws } = request as { readonly bands?: string; readonly draws?: number };
  if (task !== "bands" || bands !== "redrawn" || draws === undefined) return false;
  const series = sample.series[0].length;
  const q = coefficientsOf(plan, series, sample.drivers[0]?.length ?? 0);
  const speed = PER_MILLISECOND[fitOf(plan) === "least-squares" ? "least-squares" : "other"];
  return (draws * sample.series.length * q * (q + series)) / speed > UNNOTICED_MILLISECONDS;
}

const fitOf = (plan: ModelPlan) =>
  plan.kind === "given" ? plan.model.settings.fit : plan.kind === "fit" ? plan.settings.fit : plan.shape.fit;

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
