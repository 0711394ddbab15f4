import { columnLetters, splitAddress } from "../address";
import { freeSheetName } from "./free-sheet-name";
import type { ChartRequest, Contents, SheetHost } from "./sheet-host";

/** A batch may come while the user edits a cell; without this the program refuses it. */
const WAIT_FOR_EDIT = { delayForCellEdit: true };

type Batch<T> = (context: Excel.RequestContext) => Promise<T>;

/** The pane's view of Excel. */
export class OfficeHost implements SheetHost {
  readonly canChart = true;

  /** The context of an undo step in progress: only what runs in one batch is taken back in one step. */
  #step: Excel.RequestContext | null = null;

  get undoesAtOnce(): boolean {
    return Office.context.requirements.isSetSupported("ExcelApi", "1.20");
  }

  selectedAddress(): Promise<string> {
    return this.#run(async (context) => {
      const range = context.workbook.getSelectedRange();
      range.load("address");
      await context.sync();
      return range.address;
    });
  }

  select(address: string): Promise<void> {
    return this.#run(async (context) => {
      const range = rangeAt(context, address);
      range.worksheet.activate();
      range.select();
      await context.sync();
    });
  }

  readBlock(address: string): Promise<unknown[][]> {
    return this.#run(async (context) => {
      const range = rangeAt(context, address);
      // a whole column is a million rows: only what is used of it is read
      const used = range.getUsedRangeOrNullObject(true);
      range.load(["rowIndex", "columnIndex", "columnCount"]);
      used.load(["values", "valueTypes", "rowIndex", "columnIndex"]);
      await context.sync();
      if (used.isNullObject) return [new Array<unknown>(range.columnCount).fill(null)];
      const cells = used.values.map((row, i) =>
        row.map((value, j) => rawValue(value, used.valueTypes[i][j])),
      );
      return placed(
        cells,
        used.rowIndex - range.rowIndex,
        used.columnIndex - range.columnIndex,
        range.columnCount,
      );
    });
  }

  writeFormulas(address: string, formulas: readonly (readonly string[])[]): Promise<void> {
    return this.#run(async (context) => {
      rangeAt(context, address).formulas = formulas.map((row) => [...row]);
      await context.sync();
    });
  }

  writeLabels(address: string, labels: readonly (readonly string[])[]): Promise<void> {
    return this.#run(async (context) => {
      // the apostrophe is not part of the value: it says that the rest is text
      rangeAt(context, address).values = labels.map((row) =>
        row.map((label) => (label === "" ? "" : `'${label}`)),
      );
      await context.sync();
    });
  }

  addSheet(name: string): Promise<string> {
    return this.#run(async (context) => {
      const { worksheets } = context.workbook;
      worksheets.load("items/name");
      await context.sync();
      const free = freeSheetName(
        name,
        worksheets.items.map((sheet) => sheet.name),
      );
      worksheets.add(free);
      await context.sync();
      return free;
    });
  }

  nameRange(name: string, address: string): Promise<void> {
    return this.#run(async (context) => {
      const { names } = context.workbook;
      const before = names.getItemOrNullObject(name);
      await context.sync();
      if (!before.isNullObject) before.delete();
      names.add(name, rangeAt(context, address));
      await context.sync();
    });
  }

  addChart({ address, title, at }: ChartRequest): Promise<void> {
    return this.#run(async (context) => {
      const corner = rangeAt(context, at);
      const { charts } = corner.worksheet;
      const chart = charts.add(Excel.ChartType.line, rangeAt(context, address), Excel.ChartSeriesBy.columns);
      chart.title.text = title;
      chart.setPosition(corner);
      await context.sync();
    });
  }

  contents(address: string): Promise<Contents> {
    return this.#run(async (context) => {
      const used = rangeAt(context, address).getUsedRangeOrNullObject(true);
      used.load(["values", "formulas", "rowIndex", "columnIndex"]);
      await context.sync();
      if (used.isNullObject) return { filled: 0, first: null };
      // a formula may show nothing and still be in the way
      const found = used.values.flatMap((row, i) =>
        row.flatMap((value, j) => (value === "" && used.formulas[i][j] === "" ? [] : [[i, j]])),
      );
      if (found.length === 0) return { filled: 0, first: null };
      const [row, column] = found[0];
      return {
        filled: found.length,
        first: `${columnLetters(used.columnIndex + column)}${used.rowIndex + row + 1}`,
      };
    });
  }

  oneUndoStep<T>(work: () => Promise<T>): Promise<T> {
    if (!this.undoesAtOnce) return work();
    return Excel.run({ ...WAIT_FOR_EDIT, mergeUndoGroup: true }, async (context) => {
      this.#step = context;
      try {
        return await work();
      } finally {
        this.#step = null;
      }
    });
  }

  onSelectionChanged(listener: () => void): () => void {
    const handler = async (): Promise<void> => listener();
    const added = Excel.run(WAIT_FOR_EDIT, async (context) => {
      const result = context.workbook.onSelectionChanged.add(handler);
      await context.sync();
      return result;
    });
    return () =>
      void added.then((result) =>
        Excel.run(result.context as Excel.RequestContext, async (context) => {
          result.remove();
          await context.sync();
        }),
      );
  }

  #run<T>(batch: Batch<T>): Promise<T> {
    return this.#step ? batch(this.#step) : Excel.run(WAIT_FOR_EDIT, batch);
  }
}

/** A range by its address, on the sheet it names or the one in front. */
function rangeAt(context: Excel.RequestContext, address: string): Excel.Range {
  const { sheet, cells } = splitAddress(address);
  const { worksheets } = context.workbook;
  return (sheet === null ? worksheets.getActiveWorksheet() : worksheets.getItem(sheet)).getRange(cells);
}

/** Excel tells a blank by "", and an error only by the type beside its text. */
function rawValue(value: unknown, type: Excel.RangeValueType | string): unknown {
  if (type === Excel.RangeValueType.error) return { type: "Error", basicValue: value };
  return value === "" ? null : value;
}

/** The used part put back where it stands in the range, so that rows count as the user counts them. */
function placed(cells: unknown[][], top: number, left: number, width: number): unknown[][] {
  const blank = () => new Array<unknown>(width).fill(null);
  const body = cells.map((row) => {
    const line = blank();
    row.forEach((value, j) => (line[left + j] = value));
    return line;
  });
  return [...Array.from({ length: top }, blank), ...body];
}
