import { zeros, type Matrix } from "../matrix";
import type { VarModel } from "./model";
import { orderOf } from "./settings";

/** Φ(1)…Φ(p), row = equation, zeros at lags left out. */
export function lagMatrices(model: VarModel): Matrix[] {
  return matricesOf(model, "lag", orderOf(model.settings));
}

/** Θ(1)…Θ(q_ma) of the moving-average part, row = equation. */
export function movingAverageMatrices(model: VarModel): Matrix[] {
  return matricesOf(model, "innovation", model.settings.movingAverage);
}

function matricesOf(model: VarModel, kind: "lag" | "innovation", count: number): Matrix[] {
  const out = Array.from({ length: count }, () => zeros(model.series, model.series));
  model.regressors.forEach((regressor, row) => {
    if (regressor.kind !== kind) return;
    model.coefficients[row].forEach(
      (v, equation) => (out[regressor.lag - 1][equation][regressor.series] = v),
    );
  });
  return out;
}
