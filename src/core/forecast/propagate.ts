import { zeros, type Matrix } from "../matrix";
import { lagMatrices, movingAverageMatrices } from "../var/lag-matrices";
import type { VarModel } from "../var/model";

/**
 * What innovations add to the series from their own row on, on the stepped scale:
 * d[t] = u[t] + Σ_l Θ(l)u[t − l] + Σ_l Φ(l)d[t − l], nothing before the first row.
 * @param innovations h×K
 * @returns           h×K
 */
export function propagate(model: VarModel, innovations: Matrix): Matrix {
  const phi = lagMatrices(model);
  const theta = movingAverageMatrices(model);
  const out = zeros(innovations.length, model.series);
  out.forEach((row, t) => {
    innovations[t].forEach((v, k) => (row[k] = v));
    theta.forEach((matrix, l) => accumulate(row, matrix, innovations[t - l - 1]));
    for (const lag of model.settings.lags) accumulate(row, phi[lag - 1], out[t - lag]);
  });
  return out;
}

/** row += matrix·earlier, where there is an earlier row. */
function accumulate(row: number[], matrix: Matrix, earlier: readonly number[] | undefined): void {
  if (earlier === undefined) return;
  for (let i = 0; i < row.length; i++)
    for (let j = 0; j < earlier.length; j++) row[i] += matrix[i][j] * earlier[j];
}
