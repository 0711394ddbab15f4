import type { Matrix } from "../matrix";
import type { Criterion, ModelSettings, Shape } from "./settings";
import type { VarModel } from "./model";

/** The data of a call in original units, before any step is applied. */
export interface Sample {
  /** rows × K, oldest first; a gap is NaN (only ever present where gaps are allowed). */
  readonly series: Matrix;
  /** (rows or more) × d outside series, aligned with the first row of `series`; d may be 0. */
  readonly drivers: Matrix;
  /** Position t of the first row kept after the steps; trend and season count from it. */
  readonly start: number;
}

/** Which model is meant: to be chosen, to be fitted, or given with its numbers. */
export type ModelPlan =
  | {
      readonly kind: "auto";
      readonly shape: Shape;
      readonly criterion: Criterion;
      readonly maxOrder: number | null;
    }
  | { readonly kind: "fit"; readonly settings: ModelSettings }
  | { readonly kind: "given"; readonly model: VarModel };

/** Everything about the model meant except, where it is still to be chosen, its order. */
export const shapeOf = (plan: ModelPlan): Shape =>
  plan.kind === "auto" ? plan.shape : plan.kind === "fit" ? plan.settings : plan.model.settings;

export interface ModelRequest {
  readonly sample: Sample;
  readonly plan: ModelPlan;
}
