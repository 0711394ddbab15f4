import type { SheetHost } from "../../taskpane/host/sheet-host";
import { CellValueType, type ICellData } from "@univerjs/core";
import { FormulaDataModel } from "@univerjs/preset-sheets-core";
import type { Grid } from "./workbook";

type Worksheet = ReturnType<NonNullable<ReturnType<Grid["api"]["getActiveWorkbook"]>>["getActiveSheet"]>;

/** The pane's view of the embedded sheet. */
export class EmbeddedHost implements SheetHost {
  constructor(private readonly grid: Grid) {}

  selectedAddress(): Promise<string> {
    const sheet = this.#book.getActiveSheet();
    const range = sheet.getSelection()?.getActiveRange() ?? sheet.getRange(0, 0);
    return Promise.resolve(`${quoted(sheet.getSheetName())}!${range.getA1Notation()}`);
  }

  readBlock(address: string): Promise<unknown[][]> {
    const { sheet, a1 } = this.#locate(address);
    const { startRow, endRow, startColumn, endColumn } = sheet.getRange(a1).getRange();
    const own = sheet.getSheet().getCellMatrix();
    const spilled = this.#spilledCells(sheet);
    const at = (row: number, column: number): unknown => {
      const cell = own.getValue(row, column) ?? null;
      const shown = cell?.v === undefined || cell.v === null ? (spilled?.[row]?.[column] ?? cell) : cell;
      return rawValue(shown as ICellData | null);
    };
    return Promise.resolve(
      Array.from({ length: endRow - startRow + 1 }, (_, i) =>
        Array.from({ length: endColumn - startColumn + 1 }, (_, j) => at(startRow + i, startColumn + j)),
      ),
    );
  }

  writeFormulas(address: string, formulas: string[][]): Promise<void> {
    const { sheet, a1 } = this.#locate(address);
    sheet.getRange(a1).setValues(formulas.map((row) => row.map((formula) => ({ f: formula }))));
    return Promise.resolve();
  }

  writeLabels(address: string, labels: string[][]): Promise<void> {
    const { sheet, a1 } = this.#locate(address);
    // a forced text stays text whatever it begins with
    const cells = labels.map((row) =>
      row.map((label): ICellData => ({ v: label, t: CellValueType.FORCE_STRING, f: null })),
    );
    sheet.getRange(a1).setValues(cells);
    return Promise.resolve();
  }

  addSheet(name: string): Promise<string> {
    const taken = new Set(this.#book.getSheets().map((sheet) => sheet.getSheetName().toLowerCase()));
    let free = name;
    for (let n = 2; taken.has(free.toLowerCase()); n++) free = `${name} ${n}`;
    this.#book.create(free, 400, 40);
    return Promise.resolve(free);
  }

  nameRange(name: string, address: string): Promise<void> {
    this.#book.insertDefinedName(name, address);
    return Promise.resolve();
  }

  /** The embedded grid has no charts; the pane asks first. */
  readonly canChart = false;

  addChart(): Promise<void> {
    return Promise.reject(new Error("The embedded sheet draws no charts."));
  }

  async contents(address: string): Promise<{ filled: number; first: string | null }> {
    const block = await this.readBlock(address);
    const { sheet, a1 } = this.#locate(address);
    const corner = sheet.getRange(a1).getRange();
    let filled = 0;
    let first: string | null = null;
    block.forEach((row, i) =>
      row.forEach((cell, j) => {
        if (cell === null) return;
        filled++;
        first ??= sheet.getRange(corner.startRow + i, corner.startColumn + j).getA1Notation();
      }),
    );
    return { filled, first };
  }

  /** The grid records each write as a step of its own. */
  oneUndoStep<T>(work: () => Promise<T>): Promise<T> {
    return work();
  }

  onSelectionChanged(listener: () => void): () => void {
    const { api } = this.grid;
    const heard = [api.Event.SelectionMoveEnd, api.Event.SelectionChanged, api.Event.ActiveSheetChanged].map(
      (event) => api.addEvent(event, listener),
    );
    return () => heard.forEach((one) => one.dispose());
  }

  get #book() {
    return this.grid.api.getActiveWorkbook()!;
  }

  #locate(address: string): { sheet: Worksheet; a1: string } {
    const at = address.lastIndexOf("!");
    if (at < 0) return { sheet: this.#book.getActiveSheet(), a1: address };
    const name = address.slice(0, at).replace(/^'|'$/g, "").replaceAll("''", "'");
    const sheet = this.#book.getSheetByName(name);
    if (!sheet) throw new Error(`There is no sheet ${name}.`);
    return { sheet, a1: address.slice(at + 1) };
  }

  #spilledCells(sheet: Worksheet): Record<number, Record<number, ICellData>> | undefined {
    const spilled = this.grid.injector.get(FormulaDataModel).getArrayFormulaCellData();
    return spilled?.[this.#book.getId()]?.[sheet.getSheetId()] as
      Record<number, Record<number, ICellData>> | undefined;
  }
}

const quoted = (name: string): string =>
  /^[A-Za-z_][\w.]*$/.test(name) ? name : `'${name.replaceAll("'", "''")}'`;

/** A cell's value as the platform hands it over: null for blank, errors as rich values. */
function rawValue(cell: ICellData | null | undefined): unknown {
  const value = cell?.v;
  if (value === undefined || value === null || value === "") return null;
  if (cell!.t === CellValueType.BOOLEAN) return Boolean(value);
  if (typeof value === "string" && /^#(N\/A|[A-Z]+[!?/0]*)$/.test(value))
    return { type: "Error", basicValue: value };
  return value;
}
