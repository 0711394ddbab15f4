import { Issue, refuse } from "../issue";
import { add, multiply, transpose } from "../linalg";
import { zeros, type Matrix, type MutableMatrix } from "../matrix";
import { stationaryVariance } from "../state-space/stationary-variance";
import { innovationRoot } from "../var/innovation-root";
import { lagMatrices, movingAverageMatrices } from "../var/lag-matrices";
import type { VarModel } from "../var/model";
import { companionMatrix, largestRoot } from "../var/roots";
import { orderOf } from "../var/settings";
import { requireStates } from "../var/work";

/**
 * Γ(0) … Γ(lags) that a model's numbers imply for the stepped series, Γ(k)[i][j] = Cov(i at t, j at t − k).
 * The state holds y(t) … y(t − r + 1), r the larger of p and q + 1, and the innovations of a moving average of
 * order q; P = F·P·Fᵀ + Q. Its first blocks are Γ(0) … Γ(r − 1), and Γ(k) = Σ_l Φ(l)Γ(k − l) beyond.
 * @throws Issue "unstable" | "too-many-states" | "covariance-not-positive" | "covariance-asymmetric"
 * Source: Lütkepohl (2005), (2.1.32), (2.1.36), 11.3.2
 */
export function impliedCovariances(model: VarModel, lags: number): Matrix[] {
  const k = model.series;
  const remembered = Math.max(orderOf(model.settings), model.settings.movingAverage + 1);
  requireStates(k * (remembered + model.settings.movingAverage));
  const modulus = largestRoot(model);
  if (modulus >= 1) throw new Issue({ code: "unstable", modulus });
  const root = innovationRoot(model);
  const phi = lagMatrices(model);
  const state = stateCovariance(model, remembered, multiply(root, transpose(root)));
  const gamma = Array.from({ length: remembered }, (_, lag): Matrix =>
    state.slice(0, k).map((row) => row.slice(lag * k, (lag + 1) * k)),
  );
  for (let lag = remembered; lag <= lags; lag++) {
    gamma.push(
      model.settings.lags.reduce<Matrix>(
        (sum, l) => add(sum, multiply(phi[l - 1], gamma[lag - l])),
        zeros(k, k),
      ),
    );
  }
  return gamma.slice(0, lags + 1);
}

/** Covariance of the stationary state: `remembered` rows of the series, then the past innovations. */
function stateCovariance(model: VarModel, remembered: number, noise: Matrix): Matrix {
  const k = model.series;
  const theta = movingAverageMatrices(model);
  const none = Array.from({ length: remembered - orderOf(model.settings) }, () => zeros(k, k));
  const newest = remembered * k;
  // one shifted identity serves both parts, once the newest innovation takes nothing over from the oldest y
  const transition = companionMatrix([...lagMatrices(model), ...none, ...theta]).map((row, i) =>
    i >= newest && i < newest + k ? row.map(() => 0) : row,
  );
  const enters = theta.length > 0 ? [0, newest] : [0];
  const start: MutableMatrix = zeros(transition.length, transition.length);
  for (const row of enters) {
    for (const column of enters)
      noise.forEach((values, i) => values.forEach((v, j) => (start[row + i][column + j] = v)));
  }
  return stationaryVariance(transition, start) ?? refuse({ code: "unstable", modulus: largestRoot(model) });
}
