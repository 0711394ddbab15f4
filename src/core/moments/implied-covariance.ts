import { Issue } from "../issue";
import { add, multiply, transpose } from "../linalg";
import { zeros, type Matrix, type MutableMatrix } from "../matrix";
import { innovationRoot } from "../var/innovation-root";
import { lagMatrices } from "../var/lag-matrices";
import type { VarModel } from "../var/model";
import { companionMatrix, largestRoot } from "../var/roots";
import { symmetric } from "./whittle";

/** Doublings after which a sum of powers has settled even for a largest root of 1 − 1e-12. */
const DOUBLINGS = 60;

/**
 * Γ(0) … Γ(lags) that a model's numbers imply for the stepped series, Γ(k)[i][j] = Cov(i at t, j at t − k).
 * The state of the companion form has P = F·P·Fᵀ + Q; its first blocks are Γ(0) … Γ(p − 1), and
 * Γ(k) = Σ_l Φ(l)Γ(k − l) beyond.
 * @throws Issue "unstable" | "covariance-not-positive" | "covariance-asymmetric"
 * Source: Lütkepohl (2005), (2.1.32), (2.1.36); doubling after Anderson and Moore (1979), 6.7
 */
export function impliedCovariances(model: VarModel, lags: number): Matrix[] {
  const modulus = largestRoot(model);
  if (modulus >= 1) throw new Issue({ code: "unstable", modulus });
  const root = innovationRoot(model);
  const noise = multiply(root, transpose(root));
  const k = model.series;
  const phi = lagMatrices(model);
  if (phi.length === 0) return [noise, ...Array.from({ length: lags }, () => zeros(k, k))];
  const state = stationaryCovariance(companionMatrix(phi), noise);
  const block = (lag: number): Matrix => state.slice(0, k).map((row) => row.slice(lag * k, (lag + 1) * k));
  const gamma: Matrix[] = phi.map((_, lag) => block(lag));
  for (let lag = phi.length; lag <= lags; lag++) {
    gamma.push(
      model.settings.lags.reduce<Matrix>(
        (sum, l) => add(sum, multiply(phi[l - 1], gamma[lag - l])),
        zeros(k, k),
      ),
    );
  }
  return gamma.slice(0, lags + 1);
}

/** P = Σ_j F^j·Q·(F^j)ᵀ, Q the innovation covariance in the first block; each pass doubles the powers summed. */
function stationaryCovariance(companion: Matrix, noise: Matrix): Matrix {
  const start: MutableMatrix = zeros(companion.length, companion.length);
  noise.forEach((row, i) => row.forEach((v, j) => (start[i][j] = v)));
  let sum: Matrix = start;
  let power: Matrix = companion;
  for (let pass = 0; pass < DOUBLINGS; pass++) {
    const next = symmetric(add(sum, multiply(multiply(power, sum), transpose(power))));
    const settled = next.every((row, i) => row.every((v, j) => v === sum[i][j]));
    sum = next;
    if (settled) break;
    power = multiply(power, power);
  }
  return sum;
}
