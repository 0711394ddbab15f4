import type { Contents, SheetHost } from "./sheet-host";

/** The pane's view of Excel. */
export class OfficeHost implements SheetHost {
  readonly canChart = true;
  #inOneStep = false;

  selectedAddress(): Promise<string> {
    return this.#run(async (context) => {
      const range = context.workbook.getSelectedRange();
      range.load("address");
      await context.sync();
      return range.address;
    });
  }

  readBlock(address: string): Promise<unknown[][]> {
    return this.#run(async (context) => {
      // a whole column is a million rows: only what is used of it is read
      const range = rangeAt(context, address);
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

  writeFormulas(address: string, formulas: string[][]): Promise<void> {
    return this.#run(async (context) => {
      rangeAt(context, address).formulas = formulas;
      await context.sync();
    });
  }

  writeLabels(address: string, labels: string[][]): Promise<void> {
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
      const taken = new Set(worksheets.items.map((sheet) => sheet.name.toLowerCase()));
      let free = name;
      for (let n = 2; taken.has(free.toLowerCase()); n++) free = `${name} ${n}`;
      worksheets.add(free);
      await context.sync();
      return free;
    });
  }

  nameRange(name: string, address: string): Promise<void> {
    return this.#run(async (context) => {
      context.workbook.names.add(name, rangeAt(context, address));
      await context.sync();
    });
  }

  addChart({ address, title, at }: { address: string; title: string; at: string }): Promise<void> {
    return this.#run(async (context) => {
      const corner = rangeAt(context, at);
      const chart = corner.worksheet.charts.add(
        Excel.ChartType.line,
        rangeAt(context, address),
        Excel.ChartSeriesBy.columns,
      );
      chart.title.text = title;
      chart.setPosition(corner);
      await context.sync();
    });
  }

  contents(address: string): Promise<Contents> {
    return this.#run(async (context) => {
      const range = rangeAt(context, address);
      range.load(["values", "rowIndex", "columnIndex"]);
      await context.sync();
      const found = range.values.flatMap((row, i) =>
        row.flatMap((value, j) => (value === "" ? [] : [[i, j]])),
      );
      if (found.length === 0) return { filled: 0, first: null };
      const [row, column] = found[0];
      const first = range.getCell(row, column);
      first.load("address");
      await context.sync();
      return { filled: found.length, first: first.address.slice(first.address.lastIndexOf("!") + 1) };
    });
  }

  async oneUndoStep<T>(work: () => Promise<T>): Promise<T> {
    // older programs cannot join batches into one step; there each write is taken back by itself
    this.#inOneStep = Office.context.requirements.isSetSupported("ExcelApi", "1.20");
    try {
      return await work();
    } finally {
      this.#inOneStep = false;
    }
  }

  onSelectionChanged(listener: () => void): () => void {
    const handler = async (): Promise<void> => listener();
    const added = this.#run(async (context) => {
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

  #run<T>(batch: (context: Excel.RequestContext) => Promise<T>): Promise<T> {
    // a batch may come while the user edits a cell; without the delay the program refuses it
    return Excel.run({ delayForCellEdit: true, mergeUndoGroup: this.#inOneStep }, batch);
  }
}

/** A range by its address, on the sheet it names or the one in front. */
function rangeAt(context: Excel.RequestContext, address: string): Excel.Range {
  const at = address.lastIndexOf("!");
  if (at < 0) return context.workbook.worksheets.getActiveWorksheet().getRange(address);
  const name = address
    .slice(0, at)
    .replace(/^'(.*)'$/, "$1")
    .replaceAll("''", "'");
  return context.workbook.worksheets.getItem(name).getRange(address.slice(at + 1));
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
