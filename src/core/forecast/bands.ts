import { normalQuantile } from "../distributions";
import type { Matrix } from "../matrix";
import { integratePath } from "../prepare/steps";
import { coefficientRoots } from "../var/coefficient-covariance";
import { fitModel } from "../var/fit";
import type { VarModel } from "../var/model";
import type { ModelPlan, ModelRequest } from "../var/sample";
import { Issue } from "../issue";
import { stepSample, type SteppedSample } from "../var/stepped";
import { requireFinite } from "./finite";
import { toMean, toMedian, type AheadRequest } from "./ahead";
import { coefficientVariances, pathDeviations } from "./deviations";
import { forecastPath } from "./path";
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
  const stepped = stepSample(sample, steps);
  const { forecast, regressors } = forecastPath(model, stepped, horizon);
  const level = integratePath(sample.series, steps, forecast);
  const known = pathDeviations(model, horizon);
  const deviations = requireFinite(
    request.bands === "known" ? known : withCoefficients(model, stepped, known, regressors),
  );
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
  const { fit } =
    plan.kind === "fit" ? plan.settings : plan.kind === "auto" ? plan.shape : plan.model.settings;
  if (fit === "likelihood") throw new Issue({ code: "redraw-fit", fit });
}

/** Adds the coefficients' sampling error, its regressors Z taken from the range at hand. */
function withCoefficients(
  model: VarModel,
  stepped: SteppedSample,
  known: Matrix,
  regressors: Matrix,
): Matrix {
  const extra = coefficientVariances(model, regressors, coefficientRoots(model, stepped));
  return known.map((row, j) => row.map((v, k) => Math.hypot(v, Math.sqrt(extra[j][k]))));
}
