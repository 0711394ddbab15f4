import { termCount, termNames, type TermName } from "./terms";
import type { ModelSettings } from "./settings";

/** One row of a model block: what an equation multiplies by a coefficient. */
export type Regressor =
  | TermName
  | { readonly kind: "lag"; readonly series: number; readonly lag: number }
  | { readonly kind: "driver"; readonly driver: number }
  | { readonly kind: "innovation"; readonly series: number; readonly lag: number };

/**
 * The regressors of every equation in block order: terms and season, then all series at the first
 * lag used, all at the next, then drivers, then past innovations.
 * @returns m + K·|L| + d + K·q_ma descriptors
 */
export function regressorsOf(settings: ModelSettings, series: number, drivers: number): Regressor[] {
  const each = Array.from({ length: series }, (_, k) => k);
  const maLags = Array.from({ length: settings.movingAverage }, (_, j) => j + 1);
  return [
    ...termNames(settings),
    ...settings.lags.flatMap((lag) => each.map((k) => ({ kind: "lag", series: k, lag }) as const)),
    ...Array.from({ length: drivers }, (_, driver) => ({ kind: "driver", driver }) as const),
    ...maLags.flatMap((lag) => each.map((k) => ({ kind: "innovation", series: k, lag }) as const)),
  ];
}

/** Coefficients per equation, without the moving-average part: q = m + K·|L| + d. */
export function regressorCount(settings: ModelSettings, series: number, drivers: number): number {
  return termCount(settings) + series * settings.lags.length + drivers;
}
