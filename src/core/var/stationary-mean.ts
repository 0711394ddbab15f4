import { solveSquare, transpose } from "../linalg";
import { zeros, type Matrix } from "../matrix";
import { lagMatrices } from "./lag-matrices";
import type { VarModel } from "./model";
import { termCount, termShift } from "./terms";
import { requireWork } from "./work";

/**
 * The mean that a stable model settles at, as coefficients of its terms: the B with mean[t] = Bᵀd[t] that solves
 * B − Σ_j S(j)ᵀ B Φ(j)ᵀ = C, C the model's own coefficients of the terms d and S(j) their shift by j rows.
 * For a constant alone it is (I − ΣΦ(j))⁻¹c.
 * @returns m×K
 * @throws Issue "singular-system" | "too-heavy"
 */
export function stationaryMean(model: VarModel): Matrix {
  const count = termCount(model.settings);
  const { series, settings } = model;
  if (count === 0) return [];
  const size = count * series;
  requireWork({ rows: size, coefficients: size, series });
  const phi = lagMatrices(model);
  // unknown B[a][k] stands at a·K + k, as does the equation for C[a][k]
  const system = zeros(size, size);
  for (let i = 0; i < size; i++) system[i][i] = 1;
  for (const lag of settings.lags) {
    const shift = transpose(termShift(settings, lag));
    shift.forEach((row, a) =>
      row.forEach((weight, b) => {
        if (weight === 0) return;
        phi[lag - 1].forEach((line, k) =>
          line.forEach((v, i) => (system[a * series + k][b * series + i] -= weight * v)),
        );
      }),
    );
  }
  const right = model.coefficients.slice(0, count).flatMap((row) => row.map((v) => [v]));
  const solution = solveSquare(system, right);
  return Array.from({ length: count }, (_, a) =>
    solution.slice(a * series, (a + 1) * series).map(([v]) => v),
  );
}
