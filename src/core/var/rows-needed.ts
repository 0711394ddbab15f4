import { Issue } from "../issue";
import { termCount } from "./terms";
import { orderOf, type Calendar } from "./settings";
import { requireWork } from "./work";

/** What of the past the equations hold. */
interface Lags {
  readonly lags: readonly number[];
  readonly movingAverage?: number;
}

/**
 * Rows that a fit needs: p are spent as lags, and each equation's residuals must outnumber its
 * coefficients by the number of series for their covariance to exist, n ≥ p + q + K.
 */
export function rowsNeeded(calendar: Calendar & Lags, series: number, drivers: number): number {
  const lagged = calendar.lags.length + (calendar.movingAverage ?? 0);
  const coefficients = termCount(calendar) + drivers + series * lagged;
  return orderOf(calendar) + coefficients + series;
}

/** The largest order 0… that n rows can carry with all its lags, or null when not even order 0 fits. */
export function largestOrder(
  calendar: Calendar,
  rows: number,
  series: number,
  drivers: number,
): number | null {
  const spare = rows - rowsNeeded({ ...calendar, lags: [] }, series, drivers);
  return spare < 0 ? null : Math.floor(spare / (1 + series));
}

/** What there is to fit on. */
export interface Extent {
  readonly rows: number;
  readonly series: number;
  readonly drivers: number;
}

/**
 * Refuses a fit with too few rows, or one so wide and long that the page would stand still.
 * @param fits how many fits of this size the call asks for
 * @throws Issue "too-few-rows" | "too-heavy"
 */
export function requireRows(calendar: Calendar & Lags, extent: Extent, fits = 1): void {
  const { rows, series, drivers } = extent;
  const need = rowsNeeded(calendar, series, drivers);
  refuseBelow(need, calendar, orderOf(calendar), extent);
  requireWork({ rows, coefficients: need - orderOf(calendar) - series, series }, fits);
}

/**
 * The same for all lags up to an order, by arithmetic alone: an order of a billion is refused before anything
 * of its size is laid out.
 * @throws Issue "too-few-rows"
 */
export function requireOrder(calendar: Calendar, order: number, extent: Extent): void {
  const base = rowsNeeded({ ...calendar, lags: [] }, extent.series, extent.drivers);
  refuseBelow(base + order * (1 + extent.series), calendar, order, extent);
}

function refuseBelow(
  need: number,
  calendar: Calendar,
  order: number,
  { rows, series, drivers }: Extent,
): void {
  if (rows >= need) return;
  const largest = largestOrder(calendar, rows, series, drivers);
  throw new Issue({ code: "too-few-rows", order, series, rows, need, largest });
}
