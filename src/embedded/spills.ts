import type { ICellData, IRange } from "@univerjs/core";
import type { FormulaDataModel } from "@univerjs/preset-sheets-core";

/** A result that fills several cells. */
export interface Spill {
  readonly unitId: string;
  readonly sheetId: string;
  readonly range: IRange;
}

type CellsByPlace = Record<string, Record<string, ICellData | undefined> | undefined>;

/** Reads the cells that results fill on a sheet, the first of each included: the engine keeps them apart from the cells. */
export function spilledCells(formulas: FormulaDataModel, unitId: string, sheetId: string) {
  const data = formulas.getArrayFormulaCellData()?.[unitId]?.[sheetId] as unknown as CellsByPlace | undefined;
  return (row: number | string, column: number | string): ICellData | undefined => data?.[row]?.[column];
}

/** Every range that is spilled now, by its first cell; what is blocked does not count. */
export function currentSpills(formulas: FormulaDataModel): Map<string, Spill> {
  const found = new Map<string, Spill>();
  for (const [unitId, sheets] of Object.entries(formulas.getArrayFormulaRange() ?? {})) {
    for (const [sheetId, rows] of Object.entries(sheets ?? {})) {
      const at = spilledCells(formulas, unitId, sheetId);
      for (const [row, columns] of Object.entries(rows ?? {})) {
        for (const [column, range] of Object.entries((columns ?? {}) as Record<string, IRange>)) {
          if (!range || at(row, column)?.v === "#SPILL!") continue;
          found.set([unitId, sheetId, row, column].join(" "), { unitId, sheetId, range: { ...range } });
        }
      }
    }
  }
  return found;
}
