import { CellValueType, IUndoRedoService, type ICellData, type IRange } from "@univerjs/core";
import { ILayoutService } from "@univerjs/preset-sheets-core";
import { columnLetters, parseAddress, quoteSheet, splitAddress } from "../../taskpane/address";
import { freeSheetName } from "../../taskpane/host/free-sheet-name";
import type { Contents, SheetHost } from "../../taskpane/host/sheet-host";
import { onSelectionMoved } from "./selection-moves";
import { cellReader, rawValue, type Worksheet } from "./sheet-cells";
import type { Grid } from "./workbook";

const ROWS = 2000;
const COLUMNS = 60;

/** Rows and columns kept in sight before a selection that is scrolled to. */
const MARGIN = 3;

/** The pane's view of the embedded sheet. */
export class EmbeddedHost implements SheetHost {
  /** The grid draws no charts. */
  readonly canChart = false;
  readonly undoesAtOnce = true;

  constructor(private readonly grid: Grid) {}

  selectedAddress(): Promise<string> {
    const sheet = this.#book.getActiveSheet();
    const range = sheet.getSelection()?.getActiveRange() ?? sheet.getRange(0, 0);
    return Promise.resolve(`${quoteSheet(sheet.getSheetName())}!${range.getA1Notation()}`);
  }

  select(address: string): Promise<void> {
    const { sheet, cells } = this.#locate(address);
    const book = this.#book;
    if (book.getActiveSheet().getSheetId() !== sheet.getSheetId()) book.setActiveSheet(sheet);
    const range = sheet.getRange(cells).activate();
    sheet.scrollToCell(Math.max(0, range.getRow() - MARGIN), Math.max(0, range.getColumn() - MARGIN));
    // so that the next key goes to the cell, not to the button that led here
    this.grid.injector.get(ILayoutService).focus();
    return Promise.resolve();
  }

  readBlock(address: string): Promise<unknown[][]> {
    const { sheet, range } = this.#region(address);
    const at = cellReader(this.grid, sheet);
    return Promise.resolve(
      Array.from({ length: range.endRow - range.startRow + 1 }, (_, i) =>
        Array.from({ length: range.endColumn - range.startColumn + 1 }, (_, j) =>
          rawValue(at(range.startRow + i, range.startColumn + j)),
        ),
      ),
    );
  }

  writeFormulas(address: string, formulas: readonly (readonly string[])[]): Promise<void> {
    const { sheet, cells } = this.#locate(address);
    sheet.getRange(cells).setValues(formulas.map((row) => row.map((formula): ICellData => ({ f: formula }))));
    return Promise.resolve();
  }

  writeLabels(address: string, labels: readonly (readonly string[])[]): Promise<void> {
    const { sheet, cells } = this.#locate(address);
    // a forced text stays text whatever it begins with
    const forced = (label: string): ICellData => ({ v: label, t: CellValueType.FORCE_STRING, f: null });
    sheet.getRange(cells).setValues(labels.map((row) => row.map(forced)));
    return Promise.resolve();
  }

  addSheet(name: string): Promise<string> {
    const book = this.#book;
    const free = freeSheetName(
      name,
      book.getSheets().map((sheet) => sheet.getSheetName()),
    );
    const front = book.getActiveSheet();
    book.create(free, ROWS, COLUMNS);
    // the grid brings a new sheet to the front; a spreadsheet does so only when asked
    book.setActiveSheet(front);
    return Promise.resolve(free);
  }

  nameRange(name: string, address: string): Promise<void> {
    const book = this.#book;
    const named = book.getDefinedName(name);
    // a name taken away and put back would leave #REF! in the formulas that use it
    if (named) named.setRef(address);
    else book.insertDefinedName(name, address);
    return Promise.resolve();
  }

  addChart(): Promise<void> {
    return Promise.reject(new Error("The embedded sheet draws no charts."));
  }

  contents(address: string): Promise<Contents> {
    const { sheet, range } = this.#region(address);
    const at = cellReader(this.grid, sheet);
    let filled = 0;
    let first: string | null = null;
    for (let row = range.startRow; row <= range.endRow; row++) {
      for (let column = range.startColumn; column <= range.endColumn; column++) {
        const cell = at(row, column);
        // a formula may show nothing and still be in the way
        if (rawValue(cell) === null && !cell?.f && !cell?.si) continue;
        filled++;
        first ??= `${columnLetters(column)}${row + 1}`;
      }
    }
    return Promise.resolve({ filled, first });
  }

  async oneUndoStep<T>(work: () => Promise<T>): Promise<T> {
    const batch = this.grid.injector.get(IUndoRedoService).__tempBatchingUndoRedo(this.#book.getId());
    try {
      return await work();
    } finally {
      batch.dispose();
    }
  }

  onSelectionChanged(listener: () => void): () => void {
    return onSelectionMoved(this.grid, listener);
  }

  get #book() {
    return this.grid.api.getActiveWorkbook()!;
  }

  #locate(address: string): { sheet: Worksheet; cells: string } {
    const { sheet: name, cells } = splitAddress(address);
    if (name === null) return { sheet: this.#book.getActiveSheet(), cells };
    const sheet = this.#book.getSheetByName(name);
    if (!sheet) throw new Error(`There is no sheet ${name}.`);
    return { sheet, cells };
  }

  /** The cells of an address; rows beyond the sheet's last are left out. */
  #region(address: string): { sheet: Worksheet; range: IRange } {
    const { sheet } = this.#locate(address);
    const region = parseAddress(address);
    if (!region) throw new Error(`${address} is no address of cells.`);
    const { row, column, rows, columns } = region;
    const endRow = Math.min(row + rows, sheet.getMaxRows()) - 1;
    return { sheet, range: { startRow: row, endRow, startColumn: column, endColumn: column + columns - 1 } };
  }
}
