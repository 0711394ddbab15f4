import type { ICellData, IStyleData, IWorksheetData } from "@univerjs/core";

type Content = string | number | null;

/** Collects the cells of one demo sheet; rows and columns are counted from 0. */
export class SheetBuilder {
  readonly #cells: Record<number, Record<number, ICellData>> = {};
  readonly #widths: Record<number, { w: number }> = {};

  constructor(
    private readonly id: string,
    private readonly name: string,
  ) {}

  /** Text beginning with = is a formula. */
  put(row: number, column: number, content: Content, style: IStyleData = {}): this {
    const cell: ICellData = Object.keys(style).length > 0 ? { s: style } : {};
    if (typeof content === "string" && content.startsWith("=")) cell.f = content;
    else if (content !== null) cell.v = content;
    (this.#cells[row] ??= {})[column] = cell;
    return this;
  }

  rows(row: number, column: number, contents: readonly (readonly Content[])[], style: IStyleData = {}): this {
    contents.forEach((line, i) =>
      line.forEach((content, j) => this.put(row + i, column + j, content, style)),
    );
    return this;
  }

  /** Lines of plain text, one below the other. */
  notes(row: number, column: number, lines: readonly string[]): this {
    return this.rows(
      row,
      column,
      lines.map((line) => [line]),
      NOTE,
    );
  }

  /** Gives blank cells a look, for the place where a formula will spill. */
  dress(row: number, column: number, height: number, width: number, style: IStyleData): this {
    for (let i = row; i < row + height; i++)
      for (let j = column; j < column + width; j++) {
        const cell = ((this.#cells[i] ??= {})[j] ??= {});
        cell.s = { ...(cell.s as IStyleData | undefined), ...style };
      }
    return this;
  }

  widths(widths: Readonly<Record<number, number>>): this {
    for (const [column, w] of Object.entries(widths)) this.#widths[Number(column)] = { w };
    return this;
  }

  build(freezeRows = 0): Partial<IWorksheetData> {
    return {
      id: this.id,
      name: this.name,
      rowCount: 400,
      columnCount: 40,
      defaultColumnWidth: 92,
      columnData: this.#widths,
      cellData: this.#cells,
      ...(freezeRows > 0
        ? { freeze: { xSplit: 0, ySplit: freezeRows, startRow: freezeRows, startColumn: -1 } }
        : {}),
    };
  }
}

export const TITLE: IStyleData = { fs: 15, bl: 1, cl: { rgb: "#12343b" } };
export const NOTE: IStyleData = { cl: { rgb: "#46606a" } };
export const HEAD: IStyleData = { bl: 1, cl: { rgb: "#12343b" }, bg: { rgb: "#e3eef0" }, ht: 3 };
export const HEAD_LEFT: IStyleData = { ...HEAD, ht: 1 };
export const DATE: IStyleData = { n: { pattern: "yyyy-mm-dd" }, ht: 1 };
export const ONE_DECIMAL: IStyleData = { n: { pattern: "0.0" } };
export const FORECAST: IStyleData = { n: { pattern: "0.0" }, bg: { rgb: "#fdf6e3" } };
export const FORMULA_HEAD: IStyleData = { bl: 1, cl: { rgb: "#12343b" }, bg: { rgb: "#f7e8bf" }, ht: 3 };
