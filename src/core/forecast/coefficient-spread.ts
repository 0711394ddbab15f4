import { Issue } from "../issue";
import { zeros, type Matrix, type MutableMatrix } from "../matrix";
import { coefficientRoots } from "../var/coefficient-covariance";
import { hasGaps } from "../var/observed";
import { levelStates } from "../var/filtered";
import { requireFilterWork } from "../var/work";
import { likelihoodDirections } from "../var/likelihood-covariance";
import type { VarModel } from "../var/model";
import type { Sample } from "../var/sample";
import { stepSample } from "../var/stepped";
import { coefficientVariances } from "./deviations";
import { levelForecast } from "./level-forecast";
import { forecastPath } from "./path";

/** Step of the differences, in standard errors of the coefficients. */
const STEP = 1e-3;

/**
 * Variance that the coefficients' sampling error adds to the forecast before log or square root are undone: exact
 * derivatives for regressions, differences of the forecast itself for a likelihood, whose filter depends on them too.
 * @returns h×K
 * @throws Issue "filter-heavy" | "gaps-not-here" with gaps and numbers that do not come from a likelihood
 */
export function coefficientSpread(model: VarModel, sample: Sample, horizon: number): Matrix {
  if (model.settings.fit === "likelihood") {
    const directions = likelihoodDirections(model, sample);
    if (hasGaps(sample))
      requireFilterWork(sample.series.length + horizon, levelStates(model), 2 * directions.length);
    return directions.reduce<MutableMatrix>(
      (sum, direction) => {
        const up = moved(model, sample, horizon, direction, STEP);
        const down = moved(model, sample, horizon, direction, -STEP);
        up.forEach((row, j) => row.forEach((v, k) => (sum[j][k] += ((v - down[j][k]) / (2 * STEP)) ** 2)));
        return sum;
      },
      zeros(horizon, model.series),
    );
  }
  if (hasGaps(sample)) throw new Issue({ code: "gaps-not-here", call: "bands=fitted" });
  const stepped = stepSample(sample, model.settings.steps);
  const { regressors } = forecastPath(model, stepped, horizon);
  return coefficientVariances(model, regressors, coefficientRoots(model, stepped));
}

/** The forecast of the model a little way along a direction of its coefficients. */
function moved(model: VarModel, sample: Sample, horizon: number, direction: Matrix, step: number): Matrix {
  const coefficients = model.coefficients.map((row, r) => row.map((v, k) => v + step * direction[r][k]));
  return levelForecast({ ...model, coefficients }, sample, horizon).level;
}
