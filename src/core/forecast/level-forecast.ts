import type { Matrix } from "../matrix";
import { integratePath } from "../prepare/steps";
import { expectedLevels } from "../var/filtered";
import { hasGaps } from "../var/observed";
import type { VarModel } from "../var/model";
import type { Sample } from "../var/sample";
import { stepSample } from "../var/stepped";
import { pathDeviations } from "./deviations";
import { requireFinite } from "./finite";
import { forecastPath } from "./path";

/** A forecast with differences undone, log or square root not yet. */
export interface LevelForecast {
  /** h×K. */
  readonly level: Matrix;
  /** Standard deviations of its error, the coefficients taken as known. */
  deviations(): Matrix;
}

/**
 * Forecasts from the last rows of a sample; where it has gaps, from all that is observed.
 * @throws Issue "block-needs-rows" | "gaps-too-many" | "too-large"
 */
export function levelForecast(model: VarModel, sample: Sample, horizon: number): LevelForecast {
  const { steps } = model.settings;
  if (hasGaps(sample)) {
    const free = Array.from({ length: horizon }, () => steps.map(() => NaN));
    const { expected, deviations } = expectedLevels(model, sample, free);
    return {
      level: requireFinite(expected.slice(-horizon)),
      deviations: () => requireFinite(deviations.slice(-horizon)),
    };
  }
  const { forecast } = forecastPath(model, stepSample(sample, steps), horizon);
  return {
    level: integratePath(sample.series, steps, forecast),
    deviations: () => requireFinite(pathDeviations(model, horizon)),
  };
}
