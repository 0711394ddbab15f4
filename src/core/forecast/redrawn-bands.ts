import { Issue } from "../issue";
import type { Matrix } from "../matrix";
import { integratePath } from "../prepare/steps";
import type { VarModel } from "../var/model";
import { regressorCount } from "../var/regressors";
import { stepSample } from "../var/stepped";
import { toMean, toMedian } from "./ahead";
import type { Bands, BandsRequest } from "./bands";
import { pathDeviations } from "./deviations";
import { requireFinite } from "./finite";
import { forecastPath } from "./path";
import { quantileOf } from "./quantile";
import { redrawnPaths } from "./redraw";

/**
 * A forecast with limits from redrawn paths: cell by cell the quantiles (1 ∓ coverage)/2 of the paths; jointly the
 * forecast ± c standard deviations of the paths, c the quantile `coverage` of each path's largest deviation from the
 * forecast in those units. Taken before log or square root are undone.
 * @yields after every path, so that the work can be paused or given up
 */
export function* redrawnBands(model: VarModel, request: BandsRequest): Generator<undefined, Bands> {
  const { sample, horizon, coverage, joint, draws, seed, point } = request;
  const { steps } = model.settings;
  const stepped = stepSample(sample, steps);
  requireRedraws(model, stepped.y.length, request);
  const level = integratePath(sample.series, steps, forecastPath(model, stepped, horizon).forecast);
  const paths: Matrix[] = [];
  for (const path of redrawnPaths(model, stepped, { horizon, draws, seed })) {
    paths.push(requireFinite(integratePath(sample.series, steps, path)));
    yield;
  }
  const { low, high } = joint ? jointLimits(paths, level, coverage) : cellLimits(paths, coverage);
  return {
    low: toMedian(low, steps),
    point: point === "mean" ? toMean(level, pathDeviations(model, horizon), steps) : toMedian(level, steps),
    high: toMedian(high, steps),
  };
}

/** Multiplications and numbers kept that redrawing may take: about a minute, and some 200 MB. */
const WORK_LIMIT = 2e9;
const KEPT_LIMIT = 1e7;

/** @throws Issue "redraw-heavy" */
function requireRedraws(model: VarModel, rows: number, { draws, horizon }: BandsRequest): void {
  const { series, drivers, settings } = model;
  const q = regressorCount(settings, series, drivers);
  const each = rows * q * (q + series) + horizon * q * series;
  if (draws * each > WORK_LIMIT || draws * horizon * series > KEPT_LIMIT)
    throw new Issue({ code: "redraw-heavy", draws });
}

export interface Limits {
  readonly low: Matrix;
  readonly high: Matrix;
}

/** Limits that hold the share `coverage` of the paths, cell by cell. */
export function cellLimits(paths: readonly Matrix[], coverage: number): Limits {
  const sorted = paths[0].map((row, j) =>
    row.map((_, k) => Float64Array.from(paths, (path) => path[j][k]).sort()),
  );
  const limit = (p: number) => sorted.map((row) => row.map((values) => quantileOf(values, p)));
  return { low: limit((1 - coverage) / 2), high: limit((1 + coverage) / 2) };
}

/** Limits that hold the share `coverage` of whole paths. */
export function jointLimits(paths: readonly Matrix[], level: Matrix, coverage: number): Limits {
  const deviations = level.map((row, j) =>
    row.map((centre, k) =>
      Math.sqrt(paths.reduce((sum, path) => sum + (path[j][k] - centre) ** 2, 0) / paths.length),
    ),
  );
  const largest = Float64Array.from(paths, (path) =>
    Math.max(
      ...path.map((row, j) => Math.max(...row.map((v, k) => Math.abs(v - level[j][k]) / deviations[j][k]))),
    ),
  ).sort();
  const reach = quantileOf(largest, coverage);
  const limit = (sign: number) =>
    level.map((row, j) => row.map((v, k) => v + sign * reach * deviations[j][k]));
  return { low: limit(-1), high: limit(1) };
}
