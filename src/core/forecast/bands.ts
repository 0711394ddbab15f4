import { normalQuantile } from "../distributions";
import type { Matrix } from "../matrix";
import { fitModel } from "../var/fit";
import type { VarModel } from "../var/model";
import { shapeOf, type ModelPlan, type ModelRequest } from "../var/sample";
import { Issue } from "../issue";
import { requireFinite } from "./finite";
import { toMean, toMedian, type AheadRequest } from "./ahead";
import { coefficientSpread } from "./coefficient-spread";
import { levelForecast } from "./level-forecast";
import { redrawnBands } from "./redrawn-bands";

/** Coefficients taken as known, their sampling error included, or the whole of it redrawn from the residuals. */
export type BandsKind = "known" | "fitted" | "redrawn";

export interface BandsRequest extends AheadRequest {
  readonly coverage: number;
  readonly joint: boolean;
  readonly bands: BandsKind;
  /** Samples drawn and the seed of the draws, for redrawn bands. */
  readonly draws: number;
  readonly seed: number;
}

/** A forecast with its limits, each h×K in original units. */
export interface Bands {
  readonly low: Matrix;
  readonly point: Matrix;
  readonly high: Matrix;
}

/**
 * Forecast with limits that hold the stated share of outcomes, row by row and series by series, or for all of
 * them together (`joint`, by Bonferroni's inequality over h·K limits).
 */
export function forecastBands(
  request: BandsRequest,
  fit: (request: ModelRequest) => VarModel = fitModel,
): Bands | Generator<undefined, Bands> {
  const { sample, plan, horizon, coverage, joint } = request;
  if (request.bands === "redrawn") refuseSlowRedraw(plan);
  const model = fit({ sample, plan });
  if (request.bands === "redrawn") return redrawnBands(model, request);
  const { steps } = model.settings;
  const forecast = levelForecast(model, sample, horizon);
  const { level } = forecast;
  const known = forecast.deviations();
  const deviations =
    request.bands === "known" ? known : withSpread(known, coefficientSpread(model, sample, horizon));
  const miss = (1 - coverage) / (joint ? horizon * model.series : 1);
  const reach = -normalQuantile(miss / 2);
  const limit = (sign: number) =>
    toMedian(
      level.map((row, j) => row.map((v, k) => v + sign * reach * deviations[j][k])),
      steps,
    );
  return {
    low: limit(-1),
    point: request.point === "mean" ? toMean(level, known, steps) : toMedian(level, steps),
    high: limit(1),
  };
}

/** @throws Issue "redraw-fit" where fitting once is slow already */
function refuseSlowRedraw(plan: ModelPlan): void {
  const { fit } = shapeOf(plan);
  if (fit === "likelihood") throw new Issue({ code: "redraw-fit", fit });
}

/** Adds the coefficients' sampling error. */
const withSpread = (known: Matrix, extra: Matrix): Matrix =>
  requireFinite(known.map((row, j) => row.map((v, k) => Math.hypot(v, Math.sqrt(extra[j][k])))));
