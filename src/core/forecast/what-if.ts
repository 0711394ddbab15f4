import { Issue } from "../issue";
import { factorColumns, inverseRoot, multiply, transpose } from "../linalg";
import { column, zeros, type Matrix, type MutableMatrix } from "../matrix";
import { applyPower, powerOf } from "../prepare/steps";
import { fitModel } from "../var/fit";
import { innovationRoot } from "../var/innovation-root";
import type { VarModel } from "../var/model";
import type { ModelRequest } from "../var/sample";
import { expectedLevels } from "../var/filtered";
import { hasGaps } from "../var/observed";
import { toMean, toMedian, type Point } from "./ahead";
import { pathDeviations } from "./deviations";
import { requireFinite } from "./finite";
import { impulseMatrices, integrateEffects } from "./impulse";
import { levelForecast } from "./level-forecast";
import { propagate } from "./propagate";

export interface WhatIfRequest extends ModelRequest {
  /** h×K in original units, NaN where the path is free. */
  readonly imposed: Matrix;
  readonly point: Point;
}

/** One imposed cell and how far it lies from the forecast, on the scale before log or square root are undone. */
interface Condition {
  readonly ahead: number;
  readonly series: number;
  readonly gap: number;
}

/** Products that weighing the conditions against each other may take: about two seconds. */
const WORK_LIMIT = 1.5e8;

/**
 * The forecast given that some future cells hold stated values. A path deviates from the forecast by E·ε, ε the
 * standardised innovations ahead and E their effects with differences undone; imposed cells state C·ε = gap, and the
 * conditional mean is ε = Cᵀ(CCᵀ)⁻¹·gap, the least surprising innovations that do it.
 * @returns h×K in original units, imposed cells exactly as imposed
 * @throws Issue "plan-domain" | "plan-too-large" | "plan-singular" | "covariance-not-positive" | "too-large" | …
 * Source: Doan, Litterman and Sims (1984), Econometric Reviews 3, 1–100; Waggoner and Zha (1999), Review of Economics
 * and Statistics 81, 639–651
 */
export function whatIf(request: WhatIfRequest, fit: (request: ModelRequest) => VarModel = fitModel): Matrix {
  const { sample, plan, imposed, point } = request;
  const model = fit({ sample, plan });
  const { steps } = model.settings;
  if (hasGaps(sample)) return whatIfPastGaps(model, request);
  const { level } = levelForecast(model, sample, imposed.length);
  const conditions = conditionsOf(imposed, level, model);
  const { basis, inverse } = weigh(model, conditions);
  const pulls = multiply(
    transpose(inverse),
    conditions.map(({ gap }) => [gap]),
  );
  const shift = levelEffects(model, column(multiply(basis, pulls), 0), imposed.length);
  const moved = level.map((row, j) => row.map((v, k) => v + shift[j][k]));
  const back =
    point === "median" || steps.every((list) => powerOf(list) === null)
      ? toMedian(moved, steps)
      : toMean(moved, spreadLeft(model, basis, imposed), steps);
  return asImposed(back, imposed);
}

/** With gaps what came before is uncertain too: the imposed cells are observed, and everything else expected given them. */
function whatIfPastGaps(model: VarModel, { sample, imposed, point }: WhatIfRequest): Matrix {
  const { steps } = model.settings;
  conditionsOf(imposed, imposed, model);
  const { expected, deviations } = expectedLevels(model, sample, imposed);
  const level = expected.slice(-imposed.length);
  const back =
    point === "median" ? toMedian(level, steps) : toMean(level, deviations.slice(-imposed.length), steps);
  return asImposed(back, imposed);
}

const asImposed = (path: Matrix, imposed: Matrix): Matrix =>
  requireFinite(path.map((row, j) => row.map((v, k) => (Number.isNaN(imposed[j][k]) ? v : imposed[j][k]))));

/** @throws Issue "plan-domain" where an imposed value has no log or square root */
function conditionsOf(imposed: Matrix, level: Matrix, { settings }: VarModel): Condition[] {
  return imposed.flatMap((row, ahead) =>
    row.flatMap((value, series) => {
      if (Number.isNaN(value)) return [];
      const steps = settings.steps[series];
      const step = powerOf(steps);
      if ((step === "log" && value <= 0) || (step === "sqrt" && value < 0))
        throw new Issue({ code: "plan-domain", step, series, ahead: ahead + 1, value });
      return [{ ahead, series, gap: applyPower([value], steps, series)[0] - level[ahead][series] }];
    }),
  );
}

/** Products of an orthogonal factor of so many conditions' effects over so many rows. */
export const weighingWork = (conditions: number, rows: number, series: number): number =>
  conditions ** 2 * rows * series;

/** The conditions' effects as Cᵀ = Q·R: Q = Cᵀ·W with W = R⁻¹, so that Cᵀ(CCᵀ)⁻¹ = Q·Wᵀ. */
interface Weighing {
  /** Q, (rows up to the last condition · K) × conditions, innovations stacked row after row. */
  readonly basis: Matrix;
  /** W, conditions × conditions. */
  readonly inverse: Matrix;
}

function weigh(model: VarModel, conditions: readonly Condition[]): Weighing {
  if (conditions.length === 0) return { basis: [], inverse: [] };
  const rows = 1 + conditions.at(-1)!.ahead;
  const { series } = model;
  if (weighingWork(conditions.length, rows, series) > WORK_LIMIT)
    throw new Issue({ code: "plan-too-large", imposed: conditions.length });
  const root = innovationRoot(model);
  const effects = integrateEffects(impulseMatrices(model, rows), model.settings.steps).map((effect) =>
    multiply(effect, root),
  );
  const none = new Array<number>(series).fill(0);
  const stacked = conditions.map(({ ahead, series: k }) =>
    Array.from({ length: rows }, (_, i) => (i <= ahead ? effects[ahead - i][k] : none)).flat(),
  );
  const transposed = transpose(requireFinite(stacked));
  const found = factorColumns(transposed);
  if ("relation" in found) throw new Issue({ code: "plan-singular" });
  const inverse = inverseRoot(found.factor);
  return { basis: multiply(transposed, inverse), inverse };
}

/**
 * What standardised innovations, stacked row after row and none beyond, add to each cell with differences undone.
 * @returns h×K
 */
function levelEffects(model: VarModel, stacked: readonly number[], horizon: number): Matrix {
  const { series } = model;
  const root = stacked.length === 0 ? zeros(series, series) : innovationRoot(model);
  const innovations = Array.from({ length: horizon }, (_, j) =>
    root.map((row) => row.reduce((sum, v, i) => sum + v * (stacked[j * series + i] ?? 0), 0)),
  );
  return integrateEffects(
    propagate(model, innovations).map((row) => row.map((v) => [v])),
    model.settings.steps,
  ).map((rows) => rows.map(([v]) => v));
}

/**
 * Standard deviations that are left once the conditions hold: Var(E·ε) less Σ (E·q)² over the columns q of Q.
 * @returns h×K
 */
function spreadLeft(model: VarModel, basis: Matrix, imposed: Matrix): Matrix {
  const left: MutableMatrix = pathDeviations(model, imposed.length).map((row) => row.map((v) => v * v));
  for (let c = 0; c < (basis[0]?.length ?? 0); c++) {
    levelEffects(model, column(basis, c), imposed.length).forEach((row, j) =>
      row.forEach((v, k) => (left[j][k] -= v * v)),
    );
  }
  // an imposed cell has no spread; elsewhere rounding may leave less than nothing of a variance that is all explained
  return left.map((row, j) =>
    row.map((v, k) => (Number.isNaN(imposed[j][k]) ? Math.sqrt(Math.max(0, v)) : 0)),
  );
}
