import { Issue } from "../issue";
import { requireFinite } from "./finite";
import type { Matrix, MutableMatrix } from "../matrix";
import { regressorRow } from "../var/design";
import type { VarModel } from "../var/model";
import { oneStep, predictRow } from "../var/residuals";
import { orderOf } from "../var/settings";
import type { SteppedSample } from "../var/stepped";

/** A point forecast on the stepped scale. */
export interface Path {
  /** h×K. */
  readonly forecast: Matrix;
  /** h×q regressors that each forecast row was made of. */
  readonly regressors: Matrix;
}

/**
 * Iterates the model's numbers from the last rows of the sample, each forecast feeding the next.
 * @param sample n ≥ p rows; drivers reach n + h rows when the model has any
 * @throws Issue "block-needs-rows" | "too-large"
 * Source: Lütkepohl (2005), 2.2.2
 */
export function forecastPath(model: VarModel, sample: SteppedSample, horizon: number): Path {
  const rows = sample.y.length;
  const order = orderOf(model.settings);
  if (rows < order) throw new Issue({ code: "block-needs-rows", order, rows });
  const history: MutableMatrix = sample.y.map((row) => [...row]);
  const known = model.settings.movingAverage > 0 ? oneStep(model, sample).residuals : [];
  // aligned with the rows of the sample; beyond its end innovations are not known yet and count as zero
  const innovations = [...sample.y.slice(0, rows - known.length).map((row) => row.map(() => 0)), ...known];
  const regressors: MutableMatrix = [];
  for (let at = rows; at < rows + horizon; at++) {
    const z = regressorRow(model.regressors, {
      history,
      drivers: sample.drivers,
      start: sample.start,
      cycle: model.settings.cycle,
      at,
      innovations,
    });
    regressors.push(z);
    history.push(predictRow(model.coefficients, z, model.series));
  }
  return { forecast: requireFinite(history.slice(rows)), regressors };
}
