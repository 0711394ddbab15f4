import { add, multiply, scale, transpose } from "../linalg";
import { identity, zeros, type Matrix, type MutableMatrix } from "../matrix";
import type { FilterGradient } from "./adjoint";
import { sparseRows, type StateSpace } from "./state-space";
import { stationaryVariance } from "./stationary-variance";

/** A moving average on top of an autoregression, mean zero: z[t] = Σ Φ(j)z[t − j] + u[t] + Σ Θ(j)u[t − j]. */
export interface Varma {
  readonly phi: readonly Matrix[];
  readonly theta: readonly Matrix[];
  /** Σ, variance of u. */
  readonly sigma: Matrix;
}

/** What `varmaSpace` keeps for the way back. */
export interface VarmaSpace extends StateSpace {
  readonly varma: Varma;
  /** States of the autoregression, the first of the state space; the rest carries levels. */
  readonly moving: number;
  /** Their transition and stationary variance. */
  readonly movingTransition: Matrix;
  readonly movingStart: Matrix;
}

/**
 * The state space of z, or of the levels x whose differences it is.
 * The first K·r states, r = max(p, q + 1), have T = [Φ(1) I 0 …; Φ(2) 0 I …; …], η = [I; Θ(1); …; Θ(r − 1)]·u, and
 * begin in their stationary state. A series with differences undone carries its last levels, x = z + Σ d[j]·x[t − j],
 * which begin at 0.
 * @param undone per series d[1 …], empty where z itself is observed
 * @param begin  in the stationary state, or one row after a state of 0: what an unknown state adds is then taken out of
 *   the observations beforehand
 * @returns null when the autoregression is not stable
 * Source: Harvey (1989), 3.3 and 4.1; Kohn and Ansley (1986), Journal of the American Statistical Association 81, 751–761
 */
export function varmaSpace(
  varma: Varma,
  undone: readonly (readonly number[])[],
  begin: "stationary" | "unknown" = "stationary",
): VarmaSpace | null {
  const { phi, theta, sigma } = varma;
  const series = sigma.length;
  const blocks = Math.max(phi.length, theta.length + 1);
  const moving = series * blocks;
  const size = moving + undone.reduce((sum, { length }) => sum + length, 0);
  const transition = zeros(size, size);
  const observed = zeros(series, size);
  phi.forEach((matrix, j) =>
    matrix.forEach((row, i) => row.forEach((v, k) => (transition[j * series + i][k] = v))),
  );
  for (let i = 0; i + series < moving; i++) transition[i][i + series] = 1;
  let level = moving;
  undone.forEach((weights, k) => {
    observed[k][k] = 1;
    weights.forEach((weight, j) => {
      observed[k][level + j] = weight;
      if (j > 0) transition[level + j][level + j - 1] = 1;
    });
    // this row's level, which is what is observed, is the next row's first past level
    if (weights.length > 0) transition[level] = [...observed[k]];
    level += weights.length;
  });
  const movingTransition = transition.slice(0, moving).map((row) => row.slice(0, moving));
  const shocks = shockRows(varma, blocks);
  const noise = multiply(multiply(shocks, sigma), transpose(shocks));
  const movingStart = begin === "unknown" ? noise : stationaryVariance(movingTransition, noise);
  if (movingStart === null) return null;
  return {
    size,
    series,
    transition: sparseRows(transition),
    observed: sparseRows(observed),
    noise: spread(noise, size),
    start: spread(movingStart, size),
    varma,
    moving,
    movingTransition,
    movingStart,
  };
}

/** [I; Θ(1); …; Θ(r − 1)]. */
function shockRows({ theta, sigma }: Varma, blocks: number): Matrix {
  const series = sigma.length;
  const none = zeros(series, series);
  return Array.from({ length: blocks }, (_, j) =>
    j === 0 ? identity(series) : (theta[j - 1] ?? none),
  ).flat();
}

/** A matrix in the first corner of a larger one, flat. */
function spread(matrix: Matrix, size: number): Float64Array {
  const out = new Float64Array(size * size);
  matrix.forEach((row, i) => out.set(row, i * size));
  return out;
}

/** How a value changes with the model's matrices. */
export interface VarmaGradient {
  readonly phi: readonly Matrix[];
  readonly theta: readonly Matrix[];
  readonly sigma: Matrix;
}

/**
 * Carries the derivatives by T, Ω and P on to Φ, Θ and Σ. As P = T·P·Tᵀ + Ω, a derivative G by P is S by Ω and 2STP
 * by T, S = TᵀST + G.
 */
export function varmaGradient(space: VarmaSpace, by: FilterGradient): VarmaGradient {
  const { series, moving, size, varma, movingTransition, movingStart } = space;
  const corner = (flat: Float64Array): MutableMatrix =>
    Array.from({ length: moving }, (_, i) => [...flat.subarray(i * size, i * size + moving)]);
  const start = stationaryVariance(transpose(movingTransition), corner(by.start))!;
  const noise = add(corner(by.noise), start);
  const throughStart = multiply(
    multiply(start, movingTransition),
    movingStart.map((row) => row.slice(0, series)),
  );
  const transition = Array.from({ length: moving }, (_, i) =>
    Array.from({ length: series }, (__, k) => by.transition[i * series + k] + 2 * throughStart[i][k]),
  );
  const shocks = shockRows(varma, moving / series);
  const byShocks = scale(multiply(multiply(noise, shocks), varma.sigma), 2);
  const block = (matrix: Matrix, j: number) => matrix.slice(j * series, (j + 1) * series);
  return {
    phi: varma.phi.map((_, j) => block(transition, j)),
    theta: varma.theta.map((_, j) => block(byShocks, j + 1)),
    sigma: multiply(multiply(transpose(shocks), noise), shocks),
  };
}
