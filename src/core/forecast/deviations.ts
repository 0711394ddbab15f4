import { multiply } from "../linalg";
import { zeros, type Matrix, type MutableMatrix } from "../matrix";
import { spansOf } from "../prepare/steps";
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
  const { series } = model;
  const weights = multiply(regressors, inverseRoot);
  const flatRoot = Float64Array.from(root.flat());
  const lags = lagMatrices(model).map((phi) => Float64Array.from(phi.flat()));
  const used = model.settings.lags.map((lag) => ({ lag, phi: lags[lag - 1] }));
  const spans = model.settings.steps.map(spansOf);
  const variances = zeros(regressors.length, series);
  // thousands of rows by dozens of columns: one flat array serves them all
  const effects = new Float64Array(regressors.length * series * series);
  for (let a = 0; a < inverseRoot.length; a++) {
    propagateColumn(effects, weights, a, flatRoot, used, series);
    integrateInPlace(effects, spans, series);
    addSquares(variances, effects, series);
  }
  return variances;
}

/** E(h) = v_a(h)·R + Σ_l Φ(l)E(h − l), every E K×K, row after row. */
function propagateColumn(
  effects: Float64Array,
  weights: Matrix,
  a: number,
  root: Float64Array,
  used: readonly { readonly lag: number; readonly phi: Float64Array }[],
  series: number,
): void {
  const size = series * series;
  for (let j = 0; j < weights.length; j++) {
    const at = j * size;
    for (let c = 0; c < size; c++) effects[at + c] = weights[j][a] * root[c];
    for (const { lag, phi } of used) {
      if (lag > j) break;
      const from = at - lag * size;
      for (let i = 0; i < series; i++) {
        for (let k = 0; k < series; k++) {
          const factor = phi[i * series + k];
          for (let c = 0; c < series; c++)
            effects[at + i * series + c] += factor * effects[from + k * series + c];
        }
      }
    }
  }
}

/** Sums up the effects on each differenced series as its differences are undone, nothing before the first row. */
function integrateInPlace(
  effects: Float64Array,
  spans: readonly (readonly number[])[],
  series: number,
): void {
  const size = series * series;
  spans.forEach((list, k) => {
    for (const span of list) {
      for (let at = span * size + k * series; at < effects.length; at += size)
        for (let c = 0; c < series; c++) effects[at + c] += effects[at - span * size + c];
    }
  });
}

function addSquares(variances: MutableMatrix, effects: Float64Array, series: number): void {
  for (let j = 0, at = 0; j < variances.length; j++) {
    for (let k = 0; k < series; k++) {
      for (let c = 0; c < series; c++, at++) variances[j][k] += effects[at] ** 2;
    }
  }
}

const rowSquares = (x: Matrix): number[] => x.map((row) => row.reduce((sum, v) => sum + v * v, 0));

function cumulated(rows: Matrix): MutableMatrix {
  const out: MutableMatrix = [];
  rows.forEach((row, j) => out.push(j === 0 ? [...row] : row.map((v, k) => v + out[j - 1][k])));
  return out;
}
