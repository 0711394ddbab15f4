import { Issue } from "../issue";
import { eigenvalues } from "../linalg";
import { zeros, type Matrix } from "../matrix";
import { lagMatrices } from "./lag-matrices";
import type { VarModel } from "./model";
import { requireStates } from "./work";

/** An eigenvalue of the companion matrix. */
export interface Root {
  readonly modulus: number;
  readonly real: number;
  readonly imaginary: number;
  /** Rows per cycle, 2π/|angle|; null for a positive real root, which does not swing. */
  readonly period: number | null;
}

/**
 * Companion matrix of a vector autoregression: pK×pK, the lag matrices over a shifted identity.
 * Source: Lütkepohl (2005), (2.1.8)
 */
export function companionMatrix(phi: readonly Matrix[]): Matrix {
  const k = phi[0]?.length ?? 0;
  const out = zeros(k * phi.length, k * phi.length);
  phi.forEach((matrix, lag) => matrix.forEach((row, i) => row.forEach((v, j) => (out[i][lag * k + j] = v))));
  for (let i = k; i < out.length; i++) out[i][i - k] = 1;
  return out;
}

/**
 * Roots of the autoregressive part, largest modulus first; of a pair the one with positive imaginary part first.
 * @throws Issue "no-lags" at order 0 | "too-many-states"
 */
export function rootsOf(model: VarModel): Root[] {
  const phi = lagMatrices(model);
  if (phi.length === 0) throw new Issue({ code: "no-lags" });
  requireStates(phi.length * model.series);
  const roots = eigenvalues(companionMatrix(phi)).map(({ real, imaginary }) => {
    const angle = Math.abs(Math.atan2(imaginary, real));
    return {
      modulus: Math.hypot(real, imaginary),
      real,
      imaginary,
      period: angle > 1e-9 ? (2 * Math.PI) / angle : null,
    };
  });
  return roots.sort((a, b) =>
    Math.abs(a.modulus - b.modulus) > 1e-12 * a.modulus ? b.modulus - a.modulus : b.imaginary - a.imaginary,
  );
}

/** Largest modulus, 0 at order 0. */
export const largestRoot = (model: VarModel): number =>
  model.settings.lags.length === 0 ? 0 : rootsOf(model)[0].modulus;
