import { transpose } from "../../src/core/linalg";
import type { Matrix } from "../../src/core/matrix";
import type { VarModel } from "../../src/core/var/model";
import { regressorsOf } from "../../src/core/var/regressors";
import type { ModelSettings } from "../../src/core/var/settings";
import { settingsOfOrder } from "./requests";

/** A model with the given lag matrices (row = equation), innovation covariance and rows of terms. */
export function modelWith(
  phi: readonly Matrix[],
  sigma: Matrix,
  { terms = [], ...changes }: { readonly terms?: Matrix } & Omit<Partial<ModelSettings>, "terms"> = {},
): VarModel {
  const series = sigma.length;
  const kind = (["none", "constant", "trend", "quadratic"] as const)[terms.length];
  const settings = settingsOfOrder(series, phi.length, { terms: kind, ...changes });
  return {
    settings,
    series,
    drivers: 0,
    regressors: regressorsOf(settings, series, 0),
    coefficients: [...terms, ...phi.flatMap((matrix) => transpose(matrix))],
    noiseCovariance: sigma,
    rows: 100,
    start: 1,
  };
}

/** Two lags of three series, asymmetric and stable, with correlated innovations of different size. */
export const threeSeries = (): VarModel =>
  modelWith(
    [
      [[0.5, 0.1, 0], [0.3, 0.4, -0.2], [0, 0.6, 0.2]],
      [[0.1, 0, 0.05], [-0.1, 0.2, 0], [0.2, 0, -0.3]],
    ],
    [[1, 0.3, -0.4], [0.3, 2, 0.5], [-0.4, 0.5, 4]],
    { terms: [[1, 2, 3]] },
  ); // prettier-ignore

/** The same model with its series in another order. */
export function permuted(model: VarModel, order: readonly number[]): VarModel {
  const pick = (row: readonly number[]) => order.map((k) => row[k]);
  const { lags } = model.settings;
  const terms = model.coefficients.length - lags.length * model.series;
  return {
    ...model,
    coefficients: model.coefficients.map((_, r) => {
      if (r < terms) return pick(model.coefficients[r]);
      const [lag, k] = [Math.floor((r - terms) / model.series), (r - terms) % model.series];
      return pick(model.coefficients[terms + lag * model.series + order[k]]);
    }),
    noiseCovariance: order.map((k) => pick(model.noiseCovariance[k])),
  };
}

/** The same model with series k measured in units 1/factor[k] as large. */
export function rescaled(model: VarModel, factor: readonly number[]): VarModel {
  return {
    ...model,
    coefficients: model.coefficients.map((row, r) => {
      const regressor = model.regressors[r];
      const from = regressor.kind === "lag" ? factor[regressor.series] : 1;
      return row.map((v, k) => (v * factor[k]) / from);
    }),
    noiseCovariance: model.noiseCovariance.map((row, i) => row.map((v, j) => v * factor[i] * factor[j])),
  };
}
