import type { StepPlan } from "../prepare/steps";

/** How the coefficients are estimated. */
export type FitMethod = "least-squares" | "yule-walker" | "nuttall-strand" | "likelihood" | "shrinkage";

/** Deterministic terms; the two `inside-` forms exist only within a long-run relation. */
export type Terms = "none" | "constant" | "trend" | "quadratic" | "inside-constant" | "inside-trend";

/** What decides an automatic order. */
export type Criterion = "aicc" | "aic" | "bic" | "hq";

/** The deterministic part of every equation. */
export interface Calendar {
  readonly terms: Terms;
  /** Rows in a season, or null for no season. */
  readonly cycle: number | null;
  /** Pairs of sine and cosine that carry the season, or null for season indicators. */
  readonly waves: number | null;
}

/** Everything about a model except its order; what a model block keeps of a fit. */
export interface Shape extends Calendar {
  readonly fit: FitMethod;
  /** One list of steps per series, applied before fitting and undone after. */
  readonly steps: StepPlan;
  /** Number of long-run relations, or null for an unrestricted fit. */
  readonly longRun: number | null;
  /** Moving-average order. */
  readonly movingAverage: number;
  /** Shrinkage strength and how it grows with the lag. */
  readonly pull: number;
  readonly fade: number;
}

export interface ModelSettings extends Shape {
  /** The lags used, rising, each ≥ 1; the order is the last of them. Empty at order 0. */
  readonly lags: readonly number[];
}

/** Shrinkage when the user names none. */
export const DEFAULT_PULL = 0.2;
export const DEFAULT_FADE = 1;

export const orderOf = (settings: { readonly lags: readonly number[] }): number => settings.lags.at(-1) ?? 0;

export const allLags = (order: number): number[] => Array.from({ length: order }, (_, j) => j + 1);

/** True when some lag between 1 and the order is left out. */
export const isSubset = (lags: readonly number[]): boolean => lags.length !== (lags.at(-1) ?? 0);

/** True for terms that exist only within a long-run relation. */
export const isInside = (terms: Terms): boolean => terms === "inside-constant" || terms === "inside-trend";

/** Least squares with a constant and nothing else, for a number of series. */
export const plainShape = (series: number): Shape => ({
  fit: "least-squares",
  terms: "constant",
  cycle: null,
  waves: null,
  steps: Array.from({ length: series }, () => []),
  longRun: null,
  movingAverage: 0,
  pull: DEFAULT_PULL,
  fade: DEFAULT_FADE,
});
