import { inverseSymmetric, multiply, subtract } from "../linalg";
import type { Matrix } from "../matrix";
import { settledRow } from "./filter";
import { varmaSpace, type Varma } from "./varma-space";

/** Rows after which the filter has settled unless a root of the moving average lies within a hair of the unit circle. */
const MOST_ROWS = 10_000;

/**
 * The invertible model with the same covariances at every lag: the innovations are those of the settled filter,
 * Σ = ZPZᵀ, and its gain T·P·Zᵀ·Σ⁻¹ holds Φ(j) + Θ(j) in its blocks.
 * @returns null when the autoregression is not stable, or the filter does not settle
 * Source: Anderson and Moore (1979), 9.4
 */
export function invertible(varma: Varma): Varma | null {
  const series = varma.sigma.length;
  const space = varmaSpace(
    varma,
    varma.sigma.map(() => []),
  );
  const settled = space && settledRow(space, MOST_ROWS);
  if (space === null || settled === null) return null;
  const { before } = settled;
  const p = Array.from({ length: space.size }, (_, i) => [
    ...before.subarray(i * space.size, i * space.size + series),
  ]);
  const sigma = p.slice(0, series);
  const inverse = inverseSymmetric(sigma);
  if (inverse === null) return null;
  const gain = multiply(multiply(space.movingTransition, p), inverse);
  const block = (j: number): Matrix => gain.slice(j * series, (j + 1) * series);
  return {
    phi: varma.phi,
    theta: varma.theta.map((_, j) => (j < varma.phi.length ? subtract(block(j), varma.phi[j]) : block(j))),
    sigma,
  };
}
