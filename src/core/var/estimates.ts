import { studentQuantile, studentTwoSided } from "../distributions";
import { coefficientRoots } from "./coefficient-covariance";
import { refuseNoiseless } from "./exact";
import type { Matrix } from "../matrix";
import { likelihoodDirections } from "./likelihood-covariance";
import type { VarModel } from "./model";
import type { Regressor } from "./regressors";
import type { Sample } from "./sample";
import { orderOf } from "./settings";
import { leastObserved, stepSample, type SteppedSample } from "./stepped";

/** One coefficient with what is known of it. */
export interface CoefficientEstimate {
  readonly equation: number;
  readonly regressor: Regressor;
  readonly coefficient: number;
  readonly low: number;
  readonly high: number;
  readonly error: number;
  readonly t: number;
  readonly p: number;
}

const length = (row: readonly number[]) => Math.sqrt(row.reduce((sum, v) => sum + v * v, 0));

/** q×K, the roots of the covariance's diagonal. */
function standardErrors(model: VarModel, sample: Sample, stepped: SteppedSample): Matrix {
  if (model.settings.fit === "likelihood") {
    const directions = likelihoodDirections(model, sample);
    return model.coefficients.map((row, r) => row.map((_, k) => length(directions.map((d) => d[r][k]))));
  }
  const { inverseRoot, root } = coefficientRoots(model, stepped);
  return inverseRoot.map((w) => root.map((noise) => length(w) * length(noise)));
}

/**
 * Every coefficient of a fitted model, equation by equation in block order, with standard error, Student t on
 * T − q degrees of freedom and limits that hold with the stated coverage.
 * @throws Issue "nothing-left-over" | "covariance-not-positive"
 * Source: Lütkepohl (2005), 3.2.2
 */
export function estimates(model: VarModel, sample: Sample, coverage: number): CoefficientEstimate[] {
  const stepped = stepSample(sample, model.settings.steps);
  refuseNoiseless(model.noiseCovariance, stepped.y);
  const errors = standardErrors(model, sample, stepped);
  const freedom = leastObserved(stepped.y) - orderOf(model.settings) - model.regressors.length;
  const reach = studentQuantile((1 + coverage) / 2, freedom);
  return model.noiseCovariance.flatMap((_, equation) =>
    model.regressors.map((regressor, r) => {
      const coefficient = model.coefficients[r][equation];
      const error = errors[r][equation];
      const t = coefficient / error;
      return {
        equation,
        regressor,
        coefficient,
        low: coefficient - reach * error,
        high: coefficient + reach * error,
        error,
        t,
        p: studentTwoSided(t, freedom),
      };
    }),
  );
}
