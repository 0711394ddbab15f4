import { Issue } from "../core/issue";
import type { Matrix } from "../core/matrix";
import type { OutCell, OutTable } from "./cell";
import type { Options } from "./options";
import type { SeriesBlock } from "./grid";

/** Cells that one result may have. */
export const CELL_LIMIT = 250_000;

/** Refuses a result too large for a sheet before it is computed. @throws Issue "too-many-cells" */
export function requireCells(rows: number, columns: number): void {
  const cells = rows * columns;
  if (cells > CELL_LIMIT) throw new Issue({ code: "too-many-cells", cells, limit: CELL_LIMIT });
}

/** Header in, header out, unless the option says otherwise. */
export const wantsLabels = (options: Options, series: SeriesBlock): boolean =>
  options.labels === "yes" || (options.labels !== "no" && series.hasHeader);

/** For tables that hold words: their labels cannot be left out. @throws Issue "labels-needed" */
export function requireLabels(options: Options): void {
  if (options.labels === "no") throw new Issue({ code: "labels-needed" });
}

/** A number for a cell, or the blank that stands for a figure which does not exist. */
export const orBlank = (value: number | null): OutCell => value ?? "";

/** Rows of numbers under their names where labels are wanted; NaN stands for a blank. */
export function numberRows(rows: Matrix, names: readonly string[] | null): OutTable {
  const body = rows.map((row) => row.map((v): OutCell => (Number.isNaN(v) ? "" : v)));
  return names === null ? body : [[...names], ...body];
}

/**
 * The last look at a result: a rectangle of finite numbers, text and logical values, and nothing else.
 * @throws Issue "too-large" when a number ran out of range
 */
export function checkTable(table: OutTable): OutTable {
  const width = table[0]?.length ?? 0;
  if (width === 0 || table.some((row) => row.length !== width))
    throw new Error("a result is not a rectangle");
  requireCells(table.length, width);
  for (const row of table) {
    for (const cell of row)
      if (typeof cell === "number" && !Number.isFinite(cell)) throw new Issue({ code: "too-large" });
  }
  return table;
}
