import { add, multiply, solveSquare, transpose } from "../linalg";
import { identity, type Matrix } from "../matrix";
import type { Varma } from "../state-space/varma-space";
import type { LikelihoodData } from "./likelihood";
import { lift, unlift } from "./observed";

/** What one unit of each coefficient of the mean adds to the observed values: terms first, equations within. */
export function meanTracks({ observed, terms, drivers }: LikelihoodData, { phi }: Varma): Float64Array[] {
  const { rows, series } = observed;
  const equations = Array.from({ length: series }, (_, k) => k);
  const ofTerms = (terms[0] ?? []).flatMap((_, a) =>
    equations.map((k) => {
      const track = new Float64Array(rows * series);
      for (let t = 0; t < rows; t++) track[t * series + k] = terms[t][a];
      return lift(track, observed);
    }),
  );
  const ofDrivers = (drivers[0] ?? []).flatMap((_, d) =>
    equations.map((k) =>
      lift(
        driverPath(
          drivers.map((row) => row[d]),
          identity(series)[k],
          phi,
        ),
        observed,
      ),
    ),
  );
  return [...ofTerms, ...ofDrivers];
}

/**
 * m[t] = Σ Φ(j)m[t − j] + weight·x[t], settled at the mean of x before the sample.
 * @param sampled rows of x that the mean is taken over
 * @returns rows×series, row after row
 */
export function driverPath(
  x: readonly number[],
  weight: readonly number[],
  phi: readonly Matrix[],
  sampled = x.length,
): Float64Array {
  const series = weight.length;
  const settled = settledAt(x.slice(0, sampled), weight, phi);
  const out = new Float64Array(x.length * series);
  for (let t = 0; t < x.length; t++) {
    for (let i = 0; i < series; i++) {
      let sum = weight[i] * x[t];
      phi.forEach((matrix, j) => {
        const at = t - j - 1;
        for (let k = 0; k < series; k++) sum += matrix[i][k] * (at < 0 ? settled[k] : out[at * series + k]);
      });
      out[t * series + i] = sum;
    }
  }
  return out;
}

function settledAt(x: readonly number[], weight: readonly number[], phi: readonly Matrix[]): number[] {
  const mean = x.reduce((sum, v) => sum + v, 0) / x.length;
  return solveSquare(
    stillness(phi, weight.length),
    weight.map((w) => [w * mean]),
  ).map(([v]) => v);
}

/** I − Σ Φ(j). */
const stillness = (phi: readonly Matrix[], series: number): Matrix =>
  phi.reduce<Matrix>(
    (rest, matrix) => rest.map((row, i) => row.map((v, k) => v - matrix[i][k])),
    identity(series),
  );

/** What Φ does to the likelihood by way of the path that the drivers take through the lags. */
export function throughDrivers(
  { observed, drivers }: LikelihoodData,
  { phi }: Varma,
  coefficients: Matrix,
  byValues: Float64Array,
): Matrix[] {
  const { series, rows } = observed;
  const none = () => phi.map(() => identity(series).map((row) => row.map(() => 0)));
  if (coefficients.length === 0) return none();
  const column = (d: number) => drivers.map((row) => row[d]);
  const path = new Float64Array(rows * series);
  const settled = new Array<number>(series).fill(0);
  coefficients.forEach((weight, d) => {
    driverPath(column(d), weight, phi).forEach((v, i) => (path[i] += v));
    settledAt(column(d), weight, phi).forEach((v, k) => (settled[k] += v));
  });
  // λ[t] = −h[t] + Σ Φ(j)ᵀλ[t + j], h the derivatives by the stepped values
  const back = unlift(byValues, observed).map((v) => -v);
  const out = none();
  const bySettled = new Array<number>(series).fill(0);
  for (let t = rows - 1; t >= 0; t--) {
    phi.forEach((matrix, j) => {
      const at = t - j - 1;
      for (let i = 0; i < series; i++) {
        const weight = back[t * series + i];
        for (let k = 0; k < series; k++) {
          out[j][i][k] += weight * (at < 0 ? settled[k] : path[at * series + k]);
          if (at < 0) bySettled[k] += matrix[i][k] * weight;
          else back[at * series + k] += matrix[i][k] * weight;
        }
      }
    });
  }
  const pulled = solveSquare(
    transpose(stillness(phi, series)),
    bySettled.map((v) => [v]),
  );
  const outer = multiply(pulled, [settled]);
  return out.map((matrix) => add(matrix, outer));
}
