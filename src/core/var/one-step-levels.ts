import type { Matrix } from "../matrix";
import { applyPower, applySteps, integrate, rowsLost, spansOf, undoPower } from "../prepare/steps";
import { oneStepLevels } from "./filtered";
import { hasGaps } from "./observed";
import type { VarModel } from "./model";
import { oneStep } from "./residuals";
import type { Sample } from "./sample";
import { orderOf } from "./settings";
import { stepSample } from "./stepped";

/** One row per row of the sample; rows before the first forecast are NaN throughout. */
const below = (rows: Matrix, total: number): Matrix => [
  ...Array.from({ length: total - rows.length }, () => rows[0].map(() => NaN)),
  ...rows,
];

/**
 * What a model's numbers forecast one row ahead, in original units: the steps are undone from the actual rows
 * before, and a logged series comes back as its median.
 * @returns n×K, NaN in the rows that steps and lags use up
 */
export function fittedLevels(model: VarModel, sample: Sample): Matrix {
  const { steps } = model.settings;
  if (hasGaps(sample)) return fittedPastGaps(model, sample);
  const { fitted } = oneStep(model, stepSample(sample, steps));
  const first = sample.series.length - fitted.length;
  const columns = steps.map((list, k) => {
    const powered = applyPower(
      sample.series.map((row) => row[k]),
      list,
      k,
    );
    const lost = rowsLost(list);
    return fitted.map((row, t) => {
      const [level] = integrate(powered.slice(first + t - lost, first + t), spansOf(list), [row[k]]);
      return undoPower(level, list);
    });
  });
  return below(
    fitted.map((_, t) => columns.map((column) => column[t])),
    sample.series.length,
  );
}

/** The same where gaps are: from the observed cells of the rows before. */
function fittedPastGaps(model: VarModel, sample: Sample): Matrix {
  const levels = oneStepLevels(model, sample).slice(orderOf(model.settings));
  return below(
    levels.map((row) => row.map((v, k) => undoPower(v, model.settings.steps[k]))),
    sample.series.length,
  );
}

/** What a model's numbers leave over where gaps are: nothing is known of a gap. */
function residualsPastGaps(model: VarModel, sample: Sample): Matrix {
  const { steps } = model.settings;
  const powered = applySteps(
    sample.series,
    steps.map((list) => list.filter(({ kind }) => kind !== "diff")),
  );
  const levels = oneStepLevels(model, sample).slice(orderOf(model.settings));
  const first = powered.length - levels.length;
  return below(
    levels.map((row, t) => row.map((v, k) => powered[first + t][k] - v)),
    powered.length,
  );
}

/** What a model's numbers leave over, on the stepped scale. @returns n×K, NaN in the rows that steps and lags use up */
export function residualRows(model: VarModel, sample: Sample): Matrix {
  if (hasGaps(sample)) return residualsPastGaps(model, sample);
  return below(oneStep(model, stepSample(sample, model.settings.steps)).residuals, sample.series.length);
}
