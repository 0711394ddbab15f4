import { invertTriangle, multiply, transpose } from "../linalg";
import { column, type Matrix } from "../matrix";
import { innovationRoot } from "../var/innovation-root";
import { fitModel } from "../var/fit";
import type { VarModel } from "../var/model";
import { oneStep } from "../var/residuals";
import type { ModelRequest } from "../var/sample";
import { orderOf } from "../var/settings";
import { stepSample } from "../var/stepped";
import { requireFinite } from "./finite";
import { forecastPath } from "./path";
import { propagate } from "./propagate";

export interface ShockPastRequest extends ModelRequest {
  /** Which series is taken apart. */
  readonly target: number;
}

/** One series taken apart, a number per row used, on the stepped scale. */
export interface ShockPast {
  readonly actual: readonly number[];
  /** Where terms, drivers and the first rows alone would have led. */
  readonly baseline: readonly number[];
  /** rows × K: what the past shocks to each series added. */
  readonly contributions: Matrix;
}

/**
 * Historical decomposition: y[t] = baseline[t] + Σ_j Σ_i (Ψ(i)R)[·][j]·ε_j[t − i], ε = R⁻¹u the orthogonal shocks in
 * column order behind the one-step errors u of rows p + 1 … n.
 * @throws Issue "block-needs-rows" | "covariance-not-positive" | "too-large"
 * Source: Lütkepohl (2005), 2.3; Burbidge and Harrison (1985), Journal of Monetary Economics 16, 45–54
 */
export function shockPast(
  { sample, plan, target }: ShockPastRequest,
  fit: (request: ModelRequest) => VarModel = fitModel,
): ShockPast {
  const model = fit({ sample, plan });
  const stepped = stepSample(sample, model.settings.steps);
  const order = orderOf(model.settings);
  const first = { ...stepped, y: stepped.y.slice(0, order) };
  const { forecast } = forecastPath(model, first, stepped.y.length - order);
  const root = innovationRoot(model);
  const shocks = multiply(oneStep(model, stepped).residuals, transpose(invertTriangle(root)));
  const byShock = shocks[0].map((_, j) => {
    const strikes = column(root, j);
    return column(
      propagate(
        model,
        shocks.map((row) => strikes.map((v) => v * row[j])),
      ),
      target,
    );
  });
  return {
    actual: column(stepped.y.slice(order), target),
    baseline: column(forecast, target),
    contributions: requireFinite(transpose(byShock)),
  };
}
