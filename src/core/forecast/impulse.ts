import { multiply } from "../linalg";
import { identity, zeros, type Matrix, type MutableMatrix } from "../matrix";
import { integrate, rowsLost, spansOf, type StepPlan } from "../prepare/steps";
import { lagMatrices, movingAverageMatrices } from "../var/lag-matrices";
import type { VarModel } from "../var/model";

/**
 * Ψ(0)…Ψ(count − 1): what a unit innovation adds to each series j rows later, on the stepped scale.
 * Ψ(j) = Θ(j) + Σ_l Φ(l)Ψ(j − l), Ψ(0) = I.
 * Source: Lütkepohl (2005), (2.1.22), (11.3.6) with a moving-average part
 */
export function impulseMatrices(model: VarModel, count: number): Matrix[] {
  const phi = lagMatrices(model);
  const theta = movingAverageMatrices(model);
  const used = model.settings.lags;
  const psi: Matrix[] = [];
  for (let j = 0; j < count; j++) {
    const next = j === 0 ? identity(model.series) : zeros(model.series, model.series);
    if (j > 0 && j <= theta.length) accumulate(next, theta[j - 1]);
    for (const lag of used) if (lag <= j) accumulate(next, multiply(phi[lag - 1], psi[j - lag]));
    psi.push(next);
  }
  return psi;
}

function accumulate(target: MutableMatrix, extra: Matrix): void {
  extra.forEach((row, i) => row.forEach((v, j) => (target[i][j] += v)));
}

/**
 * Carries a sequence of K×m effects on the stepped scale to the scale before differencing: row k of the
 * sequence is summed up as the differences of series k are undone.
 */
export function integrateEffects(effects: readonly Matrix[], plan: StepPlan): Matrix[] {
  const rows = plan.map((steps, k) => {
    const spans = spansOf(steps);
    if (spans.length === 0) return effects.map((effect) => effect[k]);
    const still = new Array<number>(rowsLost(steps)).fill(0);
    const columns = effects[0][k].map((_, c) =>
      integrate(
        still,
        spans,
        effects.map((effect) => effect[k][c]),
      ),
    );
    return effects.map((_, j) => columns.map((sequence) => sequence[j]));
  });
  return effects.map((_, j) => rows.map((sequence) => sequence[j]));
}
