import { add, multiply, solveSquare, subtract, transpose } from "../linalg";
import { identity, type Matrix } from "../matrix";

/** One order of the recursion: coefficients Φ(1…k), the innovation covariance, and the last coefficient. */
export interface RecursionStep {
  readonly order: number;
  readonly coefficients: readonly Matrix[];
  readonly innovation: Matrix;
}

/**
 * Solves the multivariate Yule–Walker equations for every order 0…p by Whittle's recursion.
 * Σ_j Φ(j)Γ(k − j) = Γ(k), k = 1…p, with Γ(k)[i][j] = Cov(i at t, j at t − k) and Γ(−k) = Γ(k)ᵀ.
 * @param gamma Γ(0)…Γ(p), K×K each
 * @returns     p + 1 steps, the last holding the fit of order p
 * @throws Issue "singular-system" when a forward or backward innovation covariance is singular
 * Source: Whittle (1963), Biometrika 50, 129–134
 */
export function whittleRecursion(gamma: readonly Matrix[]): RecursionStep[] {
  let forward: Matrix[] = [];
  let backward: Matrix[] = [];
  let forwardNoise = gamma[0];
  let backwardNoise = gamma[0];
  const steps: RecursionStep[] = [{ order: 0, coefficients: [], innovation: gamma[0] }];
  for (let k = 1; k < gamma.length; k++) {
    // what Γ(k) holds beyond the fit of order k − 1
    const surplus = forward.reduce<Matrix>(
      (rest, phi, j) => subtract(rest, multiply(phi, gamma[k - 1 - j])),
      gamma[k],
    );
    const reflection = divideRight(surplus, backwardNoise);
    const backReflection = divideRight(transpose(surplus), forwardNoise);
    const nextForward = forward.map((phi, j) => subtract(phi, multiply(reflection, backward[k - 2 - j])));
    const nextBackward = backward.map((psi, j) =>
      subtract(psi, multiply(backReflection, forward[k - 2 - j])),
    );
    forward = [...nextForward, reflection];
    backward = [...nextBackward, backReflection];
    forwardNoise = symmetric(
      multiply(subtract(identity(surplus.length), multiply(reflection, backReflection)), forwardNoise),
    );
    backwardNoise = symmetric(
      multiply(subtract(identity(surplus.length), multiply(backReflection, reflection)), backwardNoise),
    );
    steps.push({ order: k, coefficients: forward, innovation: forwardNoise });
  }
  return steps;
}

/** a·b⁻¹ for a symmetric b. */
const divideRight = (a: Matrix, b: Matrix): Matrix => transpose(solveSquare(b, transpose(a)));

/** The mean of a matrix and its transpose: removes the rounding that would make a covariance asymmetric. */
export const symmetric = (a: Matrix): Matrix => {
  const sum = add(a, transpose(a));
  return sum.map((row) => row.map((v) => v / 2));
};
