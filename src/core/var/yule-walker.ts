import { multiply, solveSquare, subtract, transpose } from "../linalg";
import { column, zeros, type Matrix } from "../matrix";
import { productMoments } from "../moments/lag-covariance";
import { symmetric, whittleRecursion } from "../moments/whittle";
import { leastSquares } from "./least-squares";
import { isSubset, orderOf, type ModelSettings } from "./settings";
import type { SteppedSample } from "./stepped";
import { termNames, termRow, termShift } from "./terms";

/** Lag matrices Φ with the innovation covariance that the moment equations leave. */
export interface MomentFit {
  /** One K×K matrix per lag used, row = equation. */
  readonly lagMatrices: readonly Matrix[];
  /** The recursion's Σ, no correction for degrees of freedom. */
  readonly innovation: Matrix;
}

/** Deviations from the terms, and the coefficients (m×K) that were taken out. */
export function removeTerms(sample: SteppedSample, settings: ModelSettings): { rest: Matrix; taken: Matrix } {
  const regressors = termNames(settings);
  if (regressors.length === 0) return { rest: sample.y, taken: [] };
  const z = sample.y.map((_, t) => termRow(settings, sample.start + t));
  const { coefficients, residuals } = leastSquares({ regressors, z, y: sample.y });
  return { rest: residuals, taken: coefficients };
}

/**
 * Carries a mean d[t]ᵀB through the lags: the terms of y[t] = d[t]ᵀC + Σ Φ(j) y[t − j] whose deviations follow Φ.
 * C = B − Σ_j S(j)ᵀ B Φ(j)ᵀ, S(j) the shift of the terms by j rows.
 * @returns m×K
 */
export function carryTerms(settings: ModelSettings, taken: Matrix, lagMatrices: readonly Matrix[]): Matrix {
  return settings.lags.reduce<Matrix>(
    (terms, lag, i) =>
      subtract(
        terms,
        multiply(multiply(transpose(termShift(settings, lag)), taken), transpose(lagMatrices[i])),
      ),
    taken,
  );
}

/**
 * Multivariate Yule–Walker estimates from lagged covariances with divisor n (Whittle's recursion; the block
 * system when lags are left out).
 * @param rest n×K deviations from the terms; no further mean is removed
 * @throws Issue "singular-system"
 * Source: Lütkepohl (2005), 3.3.4; Whittle (1963)
 */
export function yuleWalker(rest: Matrix, settings: ModelSettings): MomentFit {
  const order = orderOf(settings);
  const columns = rest[0].map((_, k) => Float64Array.from(column(rest, k)));
  const gamma = Array.from({ length: order + 1 }, (_, k) => productMoments(columns, k, rest.length));
  if (isSubset(settings.lags)) return subsetSystem(gamma, settings.lags);
  const { coefficients, innovation } = whittleRecursion(gamma).at(-1)!;
  return { lagMatrices: coefficients, innovation };
}

/** Solves Σ_{l∈L} Φ(l)Γ(k − l) = Γ(k), k ∈ L, as one block system. */
function subsetSystem(gamma: readonly Matrix[], lags: readonly number[]): MomentFit {
  const k = gamma[0].length;
  const at = (lag: number) => (lag >= 0 ? gamma[lag] : transpose(gamma[-lag]));
  const size = k * lags.length;
  const system = zeros(size, size);
  lags.forEach((row, r) =>
    lags.forEach((col, c) => {
      // block (r, c) of the transposed system holds Γ(row − col)ᵀ
      at(row - col).forEach((line, i) => line.forEach((v, j) => (system[r * k + j][c * k + i] = v)));
    }),
  );
  const right = lags.flatMap((lag) => transpose(gamma[lag]));
  const solution = solveSquare(system, right);
  const lagMatrices = lags.map((_, c) => transpose(solution.slice(c * k, (c + 1) * k)));
  const innovation = lags.reduce<Matrix>(
    (rest, lag, c) => subtract(rest, multiply(lagMatrices[c], transpose(gamma[lag]))),
    gamma[0],
  );
  return { lagMatrices, innovation: symmetric(innovation) };
}
