import { factorColumns, singularValues } from "../linalg";
import type { Matrix } from "../matrix";
import type { VarModel } from "../var/model";
import { rootsOf, type Root } from "../var/roots";
import { exceedsWork } from "../var/work";
import { figure, missing, type Figure } from "./figure";

/** Whether a model is fit to be used at all. */
export interface Use {
  /** Null at order 0. */
  readonly largest: Root | null;
  readonly root: Figure;
  /** T/q. */
  readonly rowsPerCoefficient: Figure;
  /** Largest over smallest singular value of the regressors brought to unit length. */
  readonly conditioning: Figure;
}

/**
 * @param z T×q regressors
 * Source: Belsley, Kuh and Welsch (1980), ch. 3, for the conditioning
 */
export function fitToUse(model: VarModel, z: Matrix): Use {
  const q = z[0].length;
  const companion = model.series * (model.settings.lags.at(-1) ?? 0);
  const heavy = exceedsWork(10 * companion ** 3);
  const largest = companion === 0 || heavy ? null : rootsOf(model)[0];
  return {
    largest,
    root: largest ? figure({ statistic: largest.modulus }) : missing(heavy ? "heavy" : "no-lags"),
    rowsPerCoefficient: q === 0 ? missing("no-coefficients") : figure({ statistic: z.length / q }),
    conditioning: conditioning(z, q),
  };
}

function conditioning(z: Matrix, q: number): Figure {
  if (q === 0) return missing("no-coefficients");
  if (exceedsWork(z.length * q * q + 10 * q ** 3)) return missing("heavy");
  const found = factorColumns(z);
  if ("relation" in found) return missing("exact");
  const values = singularValues(found.factor.upper);
  const statistic = values[0] / values.at(-1)!;
  return Number.isFinite(statistic) ? figure({ statistic }) : missing("exact");
}
