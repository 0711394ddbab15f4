import { column, identity, zeros, type Matrix } from "../matrix";
import { multiply, scale, solveSquare, subtract, transpose } from "../linalg";
import { productMoments } from "../moments/lag-covariance";
import { symmetric } from "../moments/whittle";
import type { MomentFit } from "./yule-walker";

/**
 * The multichannel recursion of Nuttall and Strand: at each order the reflection that makes the weighted forward
 * and backward errors together smallest; with one series, Burg's recursion.
 * At order k, with E = Σ e·eᵀ, B = Σ b·bᵀ, G = Σ e·bᵀ over rows k+1 … n (e forward, b backward errors of the order
 * below, b one row earlier) and Σf, Σb their recursive covariances, Δ solves  E Σf⁻¹ Δ + Δ Σb⁻¹ B = 2G.
 * @param rest  n×K deviations from the terms; no further mean is removed
 * @param order p, rows n > p
 * @throws Issue "singular-system"
 * Source: Strand (1977), IEEE Trans. Automatic Control 22, 634–640; Nuttall (1976)
 */
export function nuttallStrand(rest: Matrix, order: number): MomentFit {
  const columns = rest[0].map((_, k) => Float64Array.from(column(rest, k)));
  let forwardNoise: Matrix = productMoments(columns, 0, rest.length);
  let backwardNoise = forwardNoise;
  let forward: Matrix[] = [];
  let backward: Matrix[] = [];
  let forwardErrors: Matrix = rest;
  let backwardErrors: Matrix = rest;
  for (let k = 1; k <= order; k++) {
    const e = forwardErrors.slice(1);
    const b = backwardErrors.slice(0, -1);
    const forwardWeight = inverse(forwardNoise);
    const backwardWeight = inverse(backwardNoise);
    const delta = solveSylvester(
      multiply(crossProducts(e, e), forwardWeight),
      multiply(backwardWeight, crossProducts(b, b)),
      scale(crossProducts(e, b), 2),
    );
    const reflection = multiply(delta, backwardWeight);
    const backReflection = multiply(transpose(delta), forwardWeight);
    const nextForward = forward.map((phi, j) => subtract(phi, multiply(reflection, backward[k - 2 - j])));
    const nextBackward = backward.map((psi, j) =>
      subtract(psi, multiply(backReflection, forward[k - 2 - j])),
    );
    forward = [...nextForward, reflection];
    backward = [...nextBackward, backReflection];
    forwardNoise = symmetric(subtract(forwardNoise, multiply(reflection, transpose(delta))));
    backwardNoise = symmetric(subtract(backwardNoise, multiply(backReflection, delta)));
    forwardErrors = subtract(e, multiply(b, transpose(reflection)));
    backwardErrors = subtract(b, multiply(e, transpose(backReflection)));
  }
  return { lagMatrices: forward, innovation: forwardNoise };
}

/** Σ_t a[t]·b[t]ᵀ. */
const crossProducts = (a: Matrix, b: Matrix): Matrix => multiply(transpose(a), b);

const inverse = (a: Matrix): Matrix => solveSquare(a, identity(a.length));

/** X with A·X + X·B = C, as one system of K² equations in the columns of X. */
function solveSylvester(a: Matrix, b: Matrix, c: Matrix): Matrix {
  const k = a.length;
  const system = zeros(k * k, k * k);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i < k; i++) {
      for (let m = 0; m < k; m++) {
        system[j * k + i][j * k + m] += a[i][m];
        system[j * k + i][m * k + i] += b[m][j];
      }
    }
  }
  const stacked = solveSquare(
    system,
    Array.from({ length: k * k }, (_, r) => [c[r % k][Math.floor(r / k)]]),
  );
  return a.map((_, i) => b.map((_, j) => stacked[j * k + i][0]));
}
