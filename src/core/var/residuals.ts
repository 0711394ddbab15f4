import type { Matrix, MutableMatrix } from "../matrix";
import { regressorRow } from "./design";
import type { VarModel } from "./model";
import { orderOf } from "./settings";
import type { SteppedSample } from "./stepped";

/** One-step forecasts and what was left over, on the stepped scale, rows p+1 … n. */
export interface OneStep {
  readonly fitted: Matrix;
  readonly residuals: Matrix;
}

/** B applied to one row of regressors: Σ_r z[r]·B[r][·]. */
export function predictRow(coefficients: Matrix, z: readonly number[], series: number): number[] {
  const out = new Array<number>(series).fill(0);
  for (let r = 0; r < z.length; r++) for (let k = 0; k < series; k++) out[k] += z[r] * coefficients[r][k];
  return out;
}

/** Runs a model's numbers over a sample, one step ahead at a time; past innovations start at zero. */
export function oneStep(model: VarModel, sample: SteppedSample): OneStep {
  const order = orderOf(model.settings);
  const fitted: MutableMatrix = [];
  const innovations: MutableMatrix = sample.y.slice(0, order).map((row) => row.map(() => 0));
  for (let at = order; at < sample.y.length; at++) {
    const z = regressorRow(model.regressors, {
      history: sample.y,
      drivers: sample.drivers,
      start: sample.start,
      cycle: model.settings.cycle,
      at,
      innovations,
    });
    const forecast = predictRow(model.coefficients, z, model.series);
    fitted.push(forecast);
    innovations.push(forecast.map((v, k) => sample.y[at][k] - v));
  }
  return { fitted, residuals: innovations.slice(order) };
}
