import { multiply } from "../linalg";
import { identity, type Matrix, type MutableMatrix } from "../matrix";
import { innovationRoot } from "../var/innovation-root";
import type { VarModel } from "../var/model";
import { requireFinite } from "./finite";
import { impulseMatrices } from "./impulse";

/** What strikes: one standard deviation in column order, one unit of one series alone, or what usually comes with it. */
export type Shock = "orthogonal" | "unit" | "generalised";

export interface ResponseRequest {
  readonly model: VarModel;
  readonly horizon: number;
  readonly shock: Shock;
}

/**
 * Responses of every series to a shock in every series, on the stepped scale: Ψ(j)·P with P = R (lower Cholesky
 * factor of Σ), I, or Σ·diag(Σ)^−½.
 * @returns matrices for j = 0 … horizon, row = responding series, column = series struck
 * @throws Issue "covariance-asymmetric" | "covariance-not-positive" (not for unit shocks) | "too-large"
 * Source: Lütkepohl (2005), 2.3.2; Pesaran and Shin (1998), Economics Letters 58, 17–29
 */
export function responsesTo({ model, horizon, shock }: ResponseRequest): Matrix[] {
  const impact = impactOf(model, shock);
  return impulseMatrices(model, horizon + 1).map((psi) => requireFinite(multiply(psi, impact)));
}

function impactOf(model: VarModel, shock: Shock): Matrix {
  if (shock === "unit") return identity(model.series);
  const root = innovationRoot(model);
  if (shock === "orthogonal") return root;
  const sigma = model.noiseCovariance;
  return sigma.map((row) => row.map((v, j) => v / Math.sqrt(sigma[j][j])));
}

/**
 * Share of each orthogonal shock (column order) in the variance of the forecast error, on the stepped scale:
 * Σ_{i<h} (Ψ(i)R)[k][j]² / Σ_j Σ_{i<h} (Ψ(i)R)[k][j]².
 * @returns matrices for h = 1 … horizon, row = series, column = shock; every row adds up to 1
 * Source: Lütkepohl (2005), (2.3.37)
 */
export function shockShares({ model, horizon }: Omit<ResponseRequest, "shock">): Matrix[] {
  const sums: MutableMatrix = Array.from({ length: model.series }, () =>
    new Array<number>(model.series).fill(0),
  );
  return responsesTo({ model, horizon: horizon - 1, shock: "orthogonal" }).map((response) => {
    response.forEach((row, k) => row.forEach((v, j) => (sums[k][j] += v * v)));
    return sums.map((row) => {
      const total = row.reduce((sum, v) => sum + v, 0);
      return row.map((v) => v / total);
    });
  });
}
