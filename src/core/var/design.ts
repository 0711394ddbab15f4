import type { Matrix } from "../matrix";
import { regressorsOf, type Regressor } from "./regressors";
import type { ModelSettings } from "./settings";
import type { SteppedSample } from "./stepped";
import { termValue } from "./terms";

/** The regression behind a vector autoregression: y = Z·B + U, one column of y and B per equation. */
export interface Design {
  readonly regressors: readonly Regressor[];
  /** T×q regressors. */
  readonly z: Matrix;
  /** T×K left-hand sides. */
  readonly y: Matrix;
}

/**
 * The regressors of one row.
 * @param history     rows of the stepped series; row `at` may lie one past the end
 * @param innovations rows of past innovations, read only when the model has a moving-average part
 */
export function regressorRow(
  regressors: readonly Regressor[],
  {
    history,
    drivers,
    start,
    cycle,
    at,
    innovations,
  }: {
    readonly history: Matrix;
    readonly drivers: Matrix;
    readonly start: number;
    readonly cycle: number | null;
    readonly at: number;
    readonly innovations?: Matrix;
  },
): number[] {
  return regressors.map((regressor) => {
    switch (regressor.kind) {
      case "lag":
        return history[at - regressor.lag][regressor.series];
      case "driver":
        return drivers[at][regressor.driver];
      case "innovation":
        // innovations before the sample are not known and count as their mean
        return innovations?.[at - regressor.lag]?.[regressor.series] ?? 0;
      default:
        return termValue(regressor, start + at, cycle);
    }
  });
}

/**
 * Lays out the regression on rows presample+1 … n.
 * @param presample rows spent as lags: the order, or more when several orders share the same rows
 */
export function designOf(sample: SteppedSample, settings: ModelSettings, presample: number): Design {
  const regressors = regressorsOf(settings, sample.y[0].length, sample.drivers[0]?.length ?? 0).filter(
    ({ kind }) => kind !== "innovation",
  );
  const z: number[][] = [];
  for (let at = presample; at < sample.y.length; at++) {
    z.push(
      regressorRow(regressors, {
        history: sample.y,
        drivers: sample.drivers,
        start: sample.start,
        cycle: settings.cycle,
        at,
      }),
    );
  }
  return { regressors, z, y: sample.y.slice(presample) };
}
