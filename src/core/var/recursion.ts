import { regressorRow } from "./design";
import type { VarModel } from "./model";
import type { SteppedSample } from "./stepped";

/**
 * A vector autoregression laid out flat, for running it thousands of times over the same rows: terms and drivers are
 * computed once, lags are read where they stand.
 */
export interface Recursion {
  readonly series: number;
  readonly regressors: number;
  /** For each regressor its values row after row, or where it is read: `lag` rows back in column `series`. */
  readonly columns: readonly (
    { readonly values: Float64Array } | { readonly lag: number; readonly series: number }
  )[];
}

/** @param rows rows that will be run over, those of the sample included */
export function recursionOf(model: VarModel, { drivers, start }: SteppedSample, rows: number): Recursion {
  const { cycle } = model.settings;
  const columns = model.regressors.map((regressor) => {
    if (regressor.kind === "lag") return { lag: regressor.lag, series: regressor.series };
    if (regressor.kind === "innovation") throw new Error("a moving-average part is not laid out flat");
    const row = (at: number) => regressorRow([regressor], { history: [], drivers, start, cycle, at })[0];
    return { values: Float64Array.from({ length: rows }, (_, at) => row(at)) };
  });
  return { series: model.series, regressors: columns.length, columns };
}

/**
 * Fills rows from … of y with what the coefficients make of the rows before, plus one of the innovations each.
 * @param y            rows×K, row after row
 * @param coefficients q×K, row after row
 * @param innovations  any number of rows of K, row after row
 * @param picked       which of them strikes in each of the rows to fill
 */
export function runOn(
  { series, columns }: Recursion,
  y: Float64Array,
  coefficients: Float64Array,
  from: number,
  innovations: Float64Array,
  picked: Int32Array,
): void {
  for (let i = 0; i < picked.length; i++) {
    const at = from + i;
    for (let k = 0; k < series; k++) y[at * series + k] = innovations[picked[i] * series + k];
    for (let r = 0; r < columns.length; r++) {
      const column = columns[r];
      const z = "lag" in column ? y[(at - column.lag) * series + column.series] : column.values[at];
      for (let k = 0; k < series; k++) y[at * series + k] += z * coefficients[r * series + k];
    }
  }
}

/** The regression's columns Z and Y for rows `from` … `to` − 1 of y, each T long, column after column. */
export function flatDesign(
  { series, columns }: Recursion,
  y: Float64Array,
  from: number,
  to: number,
): { readonly z: Float64Array; readonly left: Float64Array } {
  const rows = to - from;
  const z = new Float64Array(columns.length * rows);
  const left = new Float64Array(series * rows);
  columns.forEach((column, r) => {
    if ("lag" in column) {
      for (let t = 0; t < rows; t++) z[r * rows + t] = y[(from + t - column.lag) * series + column.series];
    } else z.set(column.values.subarray(from, to), r * rows);
  });
  for (let k = 0; k < series; k++)
    for (let t = 0; t < rows; t++) left[k * rows + t] = y[(from + t) * series + k];
  return { z, left };
}
