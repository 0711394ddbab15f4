import type { Matrix } from "../matrix";
import { powerOf, undoPower, type StepPlan } from "../prepare/steps";
import { fitModel } from "../var/fit";
import type { VarModel } from "../var/model";
import type { ModelRequest, Sample } from "../var/sample";
import { levelForecast } from "./level-forecast";

/** With a log or square root the middle and the mean of the forecast differ. */
export type Point = "median" | "mean";

export interface AheadRequest extends ModelRequest {
  readonly horizon: number;
  readonly point: Point;
}

/**
 * Forecasts h rows of all series in original units.
 * @returns h×K
 */
export function forecastAhead(
  request: AheadRequest,
  fit: (request: ModelRequest) => VarModel = fitModel,
): Matrix {
  const { sample, plan, horizon, point } = request;
  return pointForecast(fit({ sample, plan }), sample, horizon, point);
}

/** The point forecast of a model in original units. */
export function pointForecast(model: VarModel, sample: Sample, horizon: number, point: Point): Matrix {
  const { steps } = model.settings;
  const { level, deviations } = levelForecast(model, sample, horizon);
  if (point === "median" || steps.every((list) => powerOf(list) === null)) return toMedian(level, steps);
  return toMean(level, deviations(), steps);
}

/** Back through log and square root: the middle of the distribution. */
export const toMedian = (level: Matrix, plan: StepPlan): Matrix =>
  level.map((row) => row.map((v, k) => undoPower(v, plan[k])));

/** Mean of what a normal forecast becomes in original units: exp(μ + σ²/2) after log, μ² + σ² after square root. */
export const toMean = (level: Matrix, deviations: Matrix, plan: StepPlan): Matrix =>
  level.map((row, j) =>
    row.map((v, k) => {
      const variance = deviations[j][k] ** 2;
      const power = powerOf(plan[k]);
      if (power === "log") return Math.exp(v + variance / 2);
      return power === "sqrt" ? v ** 2 + variance : v;
    }),
  );
