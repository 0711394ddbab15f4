import { zeros, type Matrix } from "../matrix";
import { designOf } from "./design";
import { innovationRoot } from "./innovation-root";
import { leastSquares } from "./least-squares";
import type { VarModel } from "./model";
import { requireRows } from "./rows-needed";
import { orderOf } from "./settings";
import { shrinkageDesign } from "./shrinkage";
import type { SteppedSample } from "./stepped";

/** Roots of the coefficients' covariance: Cov(B[a,i], B[b,j]) = (W·Wᵀ)[a,b] · (R·Rᵀ)[i,j]. */
export interface CoefficientRoots {
  /** W, q×q. */
  readonly inverseRoot: Matrix;
  /** R, K×K. */
  readonly root: Matrix;
}

/**
 * The sampling covariance of a model's coefficients, its regressors taken from the sample at hand:
 * (ZᵀZ)⁻¹ ⊗ Σ, Σ the model's own; for shrinkage the posterior, whose equations are independent with variance s_i².
 * @throws Issue "too-few-rows" | "exact-combination" | "covariance-not-positive" | "covariance-asymmetric"
 * Source: Lütkepohl (2005), (3.2.21)
 */
export function coefficientRoots(model: VarModel, stepped: SteppedSample): CoefficientRoots {
  const { settings } = model;
  requireRows(settings, { rows: stepped.y.length, series: model.series, drivers: model.drivers });
  if (settings.fit === "shrinkage") {
    const { design, scales } = shrinkageDesign(stepped, settings);
    const root = zeros(model.series, model.series);
    scales.forEach((scale, k) => (root[k][k] = scale));
    return { inverseRoot: leastSquares(design).inverseRoot, root };
  }
  const { inverseRoot } = leastSquares(designOf(stepped, settings, orderOf(settings)));
  return { inverseRoot, root: innovationRoot(model) };
}
