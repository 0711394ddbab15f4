import { multiply } from "../linalg";
import { zeros, type Matrix, type MutableMatrix } from "../matrix";
import { innovationRoot } from "../var/innovation-root";
import { lagMatrices } from "../var/lag-matrices";
import type { CoefficientRoots } from "../var/coefficient-covariance";
import type { VarModel } from "../var/model";
import { impulseMatrices, integrateEffects } from "./impulse";

/**
 * Standard deviations of the forecast error with the coefficients taken as known, before log or square root
 * are undone: √diag Σ_{i<h} Ψ(i)ΣΨ(i)ᵀ, Ψ summed up where differences are undone.
 * @returns h×K
 * Source: Lütkepohl (2005), (2.2.11)
 */
export function pathDeviations(model: VarModel, horizon: number): Matrix {
  const root = innovationRoot(model);
  const effects = integrateEffects(impulseMatrices(model, horizon), model.settings.steps);
  return cumulated(effects.map((effect) => rowSquares(multiply(effect, root)))).map((row) =>
    row.map(Math.sqrt),
  );
}

/**
 * Variance that the coefficients' sampling error adds, D·Cov(β̂)·Dᵀ with Cov(β̂) = W·Wᵀ ⊗ R·Rᵀ,
 * W·Wᵀ = (ZᵀZ)⁻¹ and R·Rᵀ = Σ for least squares.
 * The forecast's derivative follows the recursion of the forecast itself, so with
 * v(h) = Wᵀz(h) each column a of W gives E(h) = v_a(h)·R + Σ_l Φ(l)E(h − l), and the variance is the sum of
 * squares over all of them. At h = 1 it is zᵀ(ZᵀZ)⁻¹z·Σ.
 * @param regressors  h×q, the rows that the forecast was made of
 * @returns           h×K variances
 * Source: Lütkepohl (2005), 3.5; here given the actual last rows and in finite-sample form
 */
export function coefficientVariances(
  model: VarModel,
  regressors: Matrix,
  { inverseRoot, root }: CoefficientRoots,
): Matrix {
  const phi = lagMatrices(model);
  const weights = multiply(regressors, inverseRoot);
  const variances = zeros(regressors.length, model.series);
  for (let a = 0; a < inverseRoot.length; a++) {
    const effects: MutableMatrix[] = [];
    weights.forEach((row, j) => {
      const effect = root.map((line) => line.map((v) => v * row[a]));
      for (const lag of model.settings.lags) {
        if (lag <= j)
          multiply(phi[lag - 1], effects[j - lag]).forEach((line, i) =>
            line.forEach((v, c) => (effect[i][c] += v)),
          );
      }
      effects.push(effect);
    });
    integrateEffects(effects, model.settings.steps).forEach((effect, j) =>
      rowSquares(effect).forEach((v, k) => (variances[j][k] += v)),
    );
  }
  return variances;
}

const rowSquares = (x: Matrix): number[] => x.map((row) => row.reduce((sum, v) => sum + v * v, 0));

function cumulated(rows: Matrix): MutableMatrix {
  const out: MutableMatrix = [];
  rows.forEach((row, j) => out.push(j === 0 ? [...row] : row.map((v, k) => v + out[j - 1][k])));
  return out;
}
