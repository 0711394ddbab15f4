import type { Matrix } from "../matrix";
import { spansOf } from "../prepare/steps";
import { designOf, type Design } from "./design";
import { leastSquares } from "./least-squares";
import { orderOf, type ModelSettings } from "./settings";
import type { SteppedSample } from "./stepped";
import { termCount } from "./terms";

/** A regression that carries the prior as rows of its own, and the scale of each series that the prior is built on. */
export interface ShrinkageDesign {
  readonly design: Design;
  /** Residual standard deviation of each series' own autoregression. */
  readonly scales: readonly number[];
}

/**
 * The regression behind shrinkage. Each lag coefficient of equation i has an independent normal prior, centred at 1
 * for the own first lag (0 if that series is differenced) and at 0 elsewhere, with standard deviation
 * pull·(s_i/s_k)/ℓ^fade for series k at lag ℓ; terms and drivers are flat. Given σ_i = s_i the posterior mean is
 * least squares with one more row per lag coefficient, s_k·ℓ^fade/pull in its column and that times the prior mean on
 * the left: s_i cancels, so that one regression serves all equations.
 * Source: Litterman (1986); Theil and Goldberger (1961) for the rows
 */
export function shrinkageDesign(stepped: SteppedSample, settings: ModelSettings): ShrinkageDesign {
  const scales = stepped.y[0].map((_, k) => ownDeviation(stepped, settings, k));
  const { regressors, z, y } = designOf(stepped, settings, orderOf(settings));
  const priorZ: number[][] = [];
  const priorY: number[][] = [];
  regressors.forEach((regressor, at) => {
    if (regressor.kind !== "lag") return;
    const weight = (scales[regressor.series] * regressor.lag ** settings.fade) / settings.pull;
    priorZ.push(regressors.map((_, j) => (j === at ? weight : 0)));
    const centre = regressor.lag === 1 && spansOf(settings.steps[regressor.series]).length === 0 ? 1 : 0;
    priorY.push(scales.map((_, i) => (i === regressor.series ? weight * centre : 0)));
  });
  return { design: { regressors, z: [...z, ...priorZ], y: [...y, ...priorY] }, scales };
}

/** Residual standard deviation of a series' own autoregression: same lags and terms, divisor T − |L| − m. */
function ownDeviation(stepped: SteppedSample, settings: ModelSettings, k: number): number {
  const own = { y: stepped.y.map((row) => [row[k]]), drivers: [], start: stepped.start };
  const { residuals } = leastSquares(
    designOf(own, { ...settings, steps: [settings.steps[k]] }, orderOf(settings)),
  );
  const free = residuals.length - settings.lags.length - termCount(settings);
  return Math.sqrt(residuals.reduce((sum, [u]) => sum + u * u, 0) / free);
}

/** Residuals of the data rows alone, the prior's rows left out. */
export const dataResiduals = (residuals: Matrix, stepped: SteppedSample, settings: ModelSettings): Matrix =>
  residuals.slice(0, stepped.y.length - orderOf(settings));
