import { Issue } from "../issue";
import { factorColumns } from "../linalg";
import { column, type Matrix } from "../matrix";
import type { Calendar } from "./settings";
import { termNames, termRow } from "./terms";

/** Residuals smaller than this beside their series are rounding, as are pivots of unit-length columns. */
const ROUNDING = 1e-10;

/**
 * Refuses an equation that leaves nothing over: its tests would be of rounding.
 * @param noise K×K innovation covariance
 * @param y     n×K, the series on the scale of the fit
 * @throws Issue "nothing-left-over"
 */
export function refuseNoiseless(noise: Matrix, y: Matrix): void {
  const series = noise.findIndex((row, k) => {
    const size = Math.sqrt(y.reduce((sum, now) => sum + now[k] ** 2, 0) / y.length);
    return Math.sqrt(row[k]) < ROUNDING * size;
  });
  if (series >= 0) throw new Issue({ code: "nothing-left-over", series });
}

const neverChanges = (values: readonly number[]): boolean => values.every((v) => v === values[0]);

/**
 * Refuses series that are constant, or an exact combination of each other and the terms in the same row:
 * no joint model exists for them.
 * Rows with gaps are left out.
 * @param y     n×K
 * @param start position of the first row
 * @throws Issue "constant-series" | "exact-combination"
 */
export function refuseExactSeries(y: Matrix, calendar: Calendar, start: number): void {
  const constant = y[0].findIndex((_, k) => neverChanges(column(y, k).filter(Number.isFinite)));
  if (constant >= 0) throw new Issue({ code: "constant-series", series: constant });
  const terms = termNames(calendar);
  const whole = y.flatMap((row, t) =>
    row.every(Number.isFinite) ? [[...termRow(calendar, start + t), ...row]] : [],
  );
  if (whole.length < terms.length + y[0].length) return;
  const found = factorColumns(whole);
  if ("factor" in found) return;
  const { columns, weights } = found.relation;
  throw new Issue({
    code: "exact-combination",
    columns: columns.map((c, i) => ({
      column: c < terms.length ? terms[c] : { kind: "series", series: c - terms.length },
      weight: weights[i],
    })),
  });
}
