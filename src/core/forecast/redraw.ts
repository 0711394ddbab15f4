import { Issue } from "../issue";
import type { Matrix } from "../matrix";
import { mean } from "../moments/centre";
import { randomSource, type RandomSource } from "../random";
import { estimate } from "../var/fit";
import { flatLeastSquares } from "../var/flat-least-squares";
import type { VarModel } from "../var/model";
import { flatDesign, recursionOf, runOn, type Recursion } from "../var/recursion";
import { regressorCount } from "../var/regressors";
import { oneStep } from "../var/residuals";
import { orderOf } from "../var/settings";
import type { SteppedSample } from "../var/stepped";

/**
 * Paths that the series might take ahead, by redrawing: residuals are centred, scaled by √(T/(T − q)) and redrawn with
 * replacement into a new sample that begins with the observed first p rows; the model is fitted to it again (settings
 * kept, coefficients not), and forecasts from the observed last p rows with redrawn residuals on top.
 * A new sample that cannot be fitted is replaced by another.
 * @yields each path, h×K on the stepped scale
 * @throws Issue "redraws-fail" when more than one in ten cannot be fitted
 * Source: Pascual, Romo and Ruiz (2004), Journal of Time Series Analysis 25, 449–465; Fresoli, Ruiz and Pascual (2015)
 * for several series
 */
export function* redrawnPaths(
  model: VarModel,
  sample: SteppedSample,
  { horizon, draws, seed }: { readonly horizon: number; readonly draws: number; readonly seed: number },
): Generator<Matrix, void> {
  const { series, settings } = model;
  const order = orderOf(settings);
  const rows = sample.y.length;
  const recursion = recursionOf(model, sample, rows + horizon);
  const coefficients = flat(model.coefficients);
  const residuals = flat(scaledResiduals(model, sample));
  const observed = flat(sample.y);
  const random = randomSource(seed);
  // one array serves all draws: the new sample stands in its first n rows, then the observed one with its path
  const y = new Float64Array((rows + horizon) * series);
  for (let drawn = 0, failed = 0; drawn < draws;) {
    y.set(observed.subarray(0, order * series));
    runOn(recursion, y, coefficients, order, residuals, picks(rows - order, rows - order, random));
    const again = refitted(model, sample, recursion, y);
    const ahead = picks(horizon, rows - order, random);
    if (again === null) {
      if (++failed > draws / 10) throw new Issue({ code: "redraws-fail", failed, drawn });
      continue;
    }
    y.set(observed);
    runOn(recursion, y, again, rows, residuals, ahead);
    yield Array.from({ length: horizon }, (_, j) => [
      ...y.subarray((rows + j) * series, (rows + j + 1) * series),
    ]);
    drawn++;
  }
}

/** One-step residuals less their means, times √(T/(T − q)). */
function scaledResiduals(model: VarModel, sample: SteppedSample): Matrix {
  const { residuals } = oneStep(model, sample);
  const rows = residuals.length;
  const factor = Math.sqrt(rows / (rows - regressorCount(model.settings, model.series, model.drivers)));
  const means = residuals[0].map((_, k) => mean(residuals.map((row) => row[k])));
  return residuals.map((row) => row.map((v, k) => (v - means[k]) * factor));
}

/** Coefficients of the same settings on a new sample, q×K; null when it cannot be fitted. */
function refitted(
  { settings, series }: VarModel,
  sample: SteppedSample,
  recursion: Recursion,
  y: Float64Array,
): Float64Array | null {
  const rows = sample.y.length;
  if (settings.fit === "least-squares" && settings.longRun === null) {
    const order = orderOf(settings);
    const { z, left } = flatDesign(recursion, y, order, rows);
    return flatLeastSquares(z, left, { rows: rows - order, regressors: recursion.regressors, series });
  }
  try {
    const rowsOf = sample.y.map((_, t) => [...y.subarray(t * series, (t + 1) * series)]);
    return flat(estimate({ ...sample, y: rowsOf }, settings).coefficients);
  } catch (thrown) {
    if (thrown instanceof Issue) return null;
    throw thrown;
  }
}

const flat = (x: Matrix): Float64Array => Float64Array.from(x.flat());

const picks = (count: number, among: number, random: RandomSource): Int32Array =>
  Int32Array.from({ length: count }, () => random.below(among));
