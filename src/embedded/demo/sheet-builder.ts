import {
  BooleanNumber,
  CellValueType,
  type ICellData,
  type IRange,
  type IStyleData,
  type IWorksheetData,
} from "@univerjs/core";
import { NOTE, SAMPLE } from "./styles";

type Content = string | number | null;

const LINE = 20;

/** Collects the cells of one demo sheet; rows and columns are counted from 0. */
export class SheetBuilder {
  readonly #cells: Record<number, Record<number, ICellData>> = {};
  readonly #widths: Record<number, { w: number }> = {};
  readonly #heights: Record<number, { h: number }> = {};
  readonly #merged: IRange[] = [];

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

  /** A formula shown as text, for copying. */
  sample(row: number, column: number, width: number, text: string): this {
    this.#merged.push({ startRow: row, endRow: row, startColumn: column, endColumn: column + width - 1 });
    (this.#cells[row] ??= {})[column] = { v: text, t: CellValueType.FORCE_STRING, s: SAMPLE };
    return this;
  }

  rows(row: number, column: number, contents: readonly (readonly Content[])[], style: IStyleData = {}): this {
    contents.forEach((line, i) =>
      line.forEach((content, j) => this.put(row + i, column + j, content, style)),
    );
    return this;
  }

  /** A sentence across several columns, in a row as high as its lines need. */
  note(
    row: number,
    column: number,
    width: number,
    lines: number,
    text: string,
    style: IStyleData = NOTE,
  ): this {
    this.#merged.push({ startRow: row, endRow: row, startColumn: column, endColumn: column + width - 1 });
    this.#heights[row] = { h: Math.max(this.#heights[row]?.h ?? 0, LINE * lines + 6) };
    return this.put(row, column, text, style);
  }

  /** A sentence in a block of merged cells. */
  block(
    row: number,
    column: number,
    height: number,
    width: number,
    text: string,
    style: IStyleData = NOTE,
  ): this {
    const [endRow, endColumn] = [row + height - 1, column + width - 1];
    this.#merged.push({ startRow: row, endRow, startColumn: column, endColumn });
    return this.put(row, column, text, style);
  }

  /** Gives blank cells a look, for the place where a formula will spill. */
  dress(row: number, column: number, height: number, width: number, style: IStyleData): this {
    for (let i = row; i < row + height; i++) {
      for (let j = column; j < column + width; j++) {
        const cell = ((this.#cells[i] ??= {})[j] ??= {});
        cell.s = { ...(cell.s as IStyleData | undefined), ...style };
      }
    }
    return this;
  }

  widths(widths: Readonly<Record<number, number>>): this {
    for (const [column, w] of Object.entries(widths)) this.#widths[Number(column)] = { w };
    return this;
  }

  height(row: number, h: number): this {
    this.#heights[row] = { h };
    return this;
  }

  build(freezeRows: number): Partial<IWorksheetData> {
    return {
      id: this.id,
      name: this.name,
      rowCount: 2000,
      columnCount: 60,
      defaultColumnWidth: 88,
      defaultRowHeight: 24,
      columnData: this.#widths,
      rowData: this.#heights,
      mergeData: this.#merged,
      cellData: this.#cells,
      showGridlines: BooleanNumber.TRUE,
      gridlinesColor: "#e6eded",
      freeze: { xSplit: 0, ySplit: freezeRows, startRow: freezeRows, startColumn: -1 },
    };
  }
}
