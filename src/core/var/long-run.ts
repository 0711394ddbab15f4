import { factorColumns, inverseRoot, multiply, subtract, symmetricEigen, transpose } from "../linalg";
import { identity, zeros, type Matrix, type MutableMatrix } from "../matrix";
import { Issue } from "../issue";
import { designOf, type Design } from "./design";
import { leastSquares, nameColumns } from "./least-squares";
import { orderOf, type ModelSettings } from "./settings";
import type { SteppedSample } from "./stepped";
import { termNames, termValue, type TermName } from "./terms";

/**
 * The regression Δy[t] = Π·(y[t − 1], inside terms) + outside terms + Σ Γ(j)Δy[t − j] + drivers, cut in three.
 * Every matrix has a row per row of the fit, T = n − p.
 */
export interface LongRunDesign {
  /** Changes, T×K. */
  readonly changes: Matrix;
  /** Levels one row earlier, then the terms inside the relations, T×(K + inside). */
  readonly levels: Matrix;
  /** Terms outside, past changes and drivers, which are unrestricted. */
  readonly free: Matrix;
  /** All terms in block order, and those of them in either place. */
  readonly terms: readonly TermName[];
  readonly outside: readonly TermName[];
  readonly inside: readonly TermName[];
}

/** Canonical correlations between changes and levels once what is unrestricted has been taken out of both. */
export interface LongRunAnalysis {
  /** Squared, falling: λ(1) ≥ … ≥ λ(K). */
  readonly eigenvalues: readonly number[];
  /** Columns β with βᵀS₁₁β·T = I, (K + inside)×K, in the order of the eigenvalues. */
  readonly relations: Matrix;
  /** Residuals of changes and levels on what is unrestricted. */
  readonly changes: Matrix;
  readonly levels: Matrix;
}

/** Where a term stands: inside the relations or free in every equation. */
function placeOf(name: TermName, { terms }: ModelSettings): "inside" | "outside" {
  if (terms === "inside-constant") return name.kind === "constant" ? "inside" : "outside";
  return terms === "inside-trend" && name.kind === "trend" ? "inside" : "outside";
}

/** Lays the regression out on rows p + 1 … n. @param settings order p ≥ 1, all lags */
export function longRunDesign(sample: SteppedSample, settings: ModelSettings): LongRunDesign {
  const { y, drivers, start } = sample;
  const order = orderOf(settings);
  const terms = termNames(settings);
  const inside = terms.filter((name) => placeOf(name, settings) === "inside");
  const outside = terms.filter((name) => placeOf(name, settings) === "outside");
  const at = Array.from({ length: y.length - order }, (_, i) => order + i);
  const values = (names: readonly TermName[], t: number) =>
    names.map((name) => termValue(name, start + t, settings.cycle));
  const change = (t: number) => y[t].map((v, k) => v - y[t - 1][k]);
  const past = Array.from({ length: order - 1 }, (_, j) => j + 1);
  return {
    changes: at.map(change),
    levels: at.map((t) => [...y[t - 1], ...values(inside, t)]),
    free: at.map((t) => [
      ...values(outside, t),
      ...past.flatMap((lag) => change(t - lag)),
      ...(drivers[t] ?? []),
    ]),
    terms,
    outside,
    inside,
  };
}

/**
 * Johansen's analysis: eigenvalues of S₁₁⁻¹S₁₀S₀₀⁻¹S₀₁ and the relations that belong to them, by orthogonal factors.
 * Source: Johansen (1988), Journal of Economic Dynamics and Control 12, 231–254; Johansen (1995), 6.1
 */
export function analyseLongRun({ changes, levels, free }: LongRunDesign): LongRunAnalysis {
  const restOf = (y: Matrix) => leastSquares({ regressors: free[0].map(unnamed), z: free, y }).residuals;
  const [from, to] = [restOf(changes), restOf(levels)];
  const [rootFrom, rootTo] = [rootOf(from), rootOf(to)];
  const correlations = multiply(transpose(multiply(from, rootFrom)), multiply(to, rootTo));
  const { values, vectors } = symmetricEigen(multiply(transpose(correlations), correlations));
  return {
    eigenvalues: values.slice(0, changes[0].length),
    relations: multiply(rootTo, vectors),
    changes: from,
    levels: to,
  };
}

/** Exact relations are refused, by name, before the regression is cut up. */
const unnamed = () => ({ kind: "constant" }) as const;

/** W with (XᵀX)⁻¹ = WWᵀ. @throws Issue "singular-system" */
function rootOf(x: Matrix): Matrix {
  const found = factorColumns(x);
  if ("relation" in found) throw new Issue({ code: "singular-system" });
  return inverseRoot(found.factor);
}

/**
 * The model in levels that r long-run relations leave: Π = αβᵀ of rank r, everything else least squares given Π.
 * With Γ(0) = Γ(p) = 0 and Π acting on the levels, Φ(1) = I + Π + Γ(1) and Φ(j) = Γ(j) − Γ(j − 1).
 * @param settings all lags 1 … p, p ≥ 1; longRun = r in 0 … K
 * @returns coefficients q×K in block order, and residuals T×K
 * @throws Issue "exact-combination" | "singular-system"
 * Source: Johansen (1995), 6.1; Lütkepohl (2005), 7.2.3
 */
export function longRunFit(
  sample: SteppedSample,
  settings: ModelSettings,
): { readonly coefficients: Matrix; readonly residuals: Matrix } {
  const design = designOf(sample, settings, orderOf(settings));
  refuseRelated(design);
  const cut = longRunDesign(sample, settings);
  const pull = longRunPull(analyseLongRun(cut), settings.longRun!);
  const left = subtract(cut.changes, multiply(cut.levels, transpose(pull)));
  const { coefficients: free } = leastSquares({ regressors: cut.free[0].map(unnamed), z: cut.free, y: left });
  const coefficients = toLevels(cut, pull, free, settings);
  return { coefficients, residuals: subtract(design.y, multiply(design.z, coefficients)) };
}

function refuseRelated({ z, regressors }: Design): void {
  const found = factorColumns(z);
  if ("relation" in found)
    throw new Issue({ code: "exact-combination", columns: nameColumns(found.relation, regressors) });
}

/** Π = αβᵀ, K×(K + inside), from the first r relations: α = S₀₁β, as βᵀS₁₁β = I. */
function longRunPull({ relations, changes, levels }: LongRunAnalysis, rank: number): Matrix {
  if (rank === 0) return zeros(changes[0].length, levels[0].length);
  const beta = relations.map((row) => row.slice(0, rank));
  const alpha = multiply(transpose(changes), multiply(levels, beta));
  return multiply(alpha, transpose(beta));
}

/** Coefficients in block order: terms, lags of the levels, drivers. */
function toLevels(
  { terms, outside, inside, changes }: LongRunDesign,
  pull: Matrix,
  free: Matrix,
  settings: ModelSettings,
): Matrix {
  const series = changes[0].length;
  const order = orderOf(settings);
  const past = (lag: number): Matrix =>
    lag < 1 || lag >= order
      ? zeros(series, series)
      : free.slice(outside.length + (lag - 1) * series, outside.length + lag * series);
  const termRows = terms.map((name) =>
    inside.includes(name)
      ? pull.map((row) => row[series + inside.indexOf(name)])
      : free[outside.indexOf(name)],
  );
  const lags = settings.lags.flatMap((lag) => {
    const rows: MutableMatrix = subtract(past(lag), past(lag - 1));
    if (lag > 1) return rows;
    return identity(series).map((row, k) => row.map((v, i) => v + pull[i][k] + rows[k][i]));
  });
  return [...termRows, ...lags, ...free.slice(outside.length + (order - 1) * series)];
}
