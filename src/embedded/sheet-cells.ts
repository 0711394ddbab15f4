import { CellValueType, type ICellData } from "@univerjs/core";
import { FormulaDataModel } from "@univerjs/preset-sheets-core";
import { spilledCells } from "./spills";
import type { Grid } from "./workbook";

export type Worksheet = ReturnType<
  NonNullable<ReturnType<Grid["api"]["getActiveWorkbook"]>>["getActiveSheet"]
>;

/**
 * Reads cells of a sheet as they stand now. The engine keeps spilled values apart from the cells, and its own
 * getters round to 12 digits.
 */
export function cellReader(
  { injector }: Grid,
  sheet: Worksheet,
): (row: number, column: number) => ICellData | null {
  const own = sheet.getSheet().getCellMatrix();
  const unit = sheet.getWorkbook().getUnitId();
  const spilled = spilledCells(injector.get(FormulaDataModel), unit, sheet.getSheetId());
  return (row, column) => {
    const cell = own.getValue(row, column);
    const hasValue = cell?.v !== undefined && cell.v !== null;
    return (hasValue ? cell : (spilled(row, column) ?? cell)) ?? null;
  };
}

const ERROR = /^#(N\/A|[A-Z]+[!?]|DIV\/0!)$/;

/** A cell's value as the platform hands it over: null for blank, errors as rich values. */
export function rawValue(cell: ICellData | null): unknown {
  const value = cell?.v;
  if (value === undefined || value === null || value === "") return null;
  if (cell!.t === CellValueType.BOOLEAN) return Boolean(value);
  if (typeof value === "string" && cell!.t !== CellValueType.FORCE_STRING && ERROR.test(value)) {
    return { type: "Error", basicValue: value };
  }
  return value;
}

/** The error value that a cell shows, such as #VALUE!; null when it shows none. */
export function errorShown(cell: ICellData | null): string | null {
  const value = rawValue(cell);
  return typeof value === "object" && value !== null ? (value as { basicValue: string }).basicValue : null;
}
