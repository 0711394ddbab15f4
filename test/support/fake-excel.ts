import { parseAddress, formatAddress, type Region } from "../../taskpane/address";

type Value = string | number | boolean;

/** A cell as Excel keeps it: what it comes to, of which type that is, and its formula if it has one. */
interface KeptCell {
  readonly value: Value;
  readonly type: string;
  readonly formula?: string;
}

const BLANK: KeptCell = { value: "", type: "Empty" };

/** The content of one sheet, row and column counted from 0. */
class KeptSheet {
  readonly cells = new Map<string, KeptCell>();
  constructor(readonly name: string) {}
  at(row: number, column: number): KeptCell {
    return this.cells.get(`${row} ${column}`) ?? BLANK;
  }
}

/** A cell with a formula: a sum of two numbers, a name, a text of no length, or an error written out. */
const computed = (formula: string, names: ReadonlyMap<string, () => Value>): KeptCell => ({
  ...evaluate(formula, names),
  formula,
});

function evaluate(formula: string, names: ReadonlyMap<string, () => Value>): KeptCell {
  const sum = /^=(\d+)\+(\d+)$/.exec(formula);
  if (sum) return { value: Number(sum[1]) + Number(sum[2]), type: "Double" };
  if (formula === '=""') return { value: "", type: "String" };
  if (formula === "=NA()") return { value: "#N/A", type: "Error" };
  const named = names.get(formula.slice(1).toLowerCase());
  return named ? kept(named()) : { value: "#NAME?", type: "Error" };
}

const kept = (value: Value): KeptCell =>
  value === ""
    ? BLANK
    : {
        value,
        type: typeof value === "number" ? "Double" : typeof value === "boolean" ? "Boolean" : "String",
      };

/**
 * An object of the host whose properties can be read only after `load` and a `sync`: Excel throws there, and so does this.
 */
abstract class Loadable {
  #wanted = new Set<string>();
  #loaded = new Set<string>();

  constructor(protected readonly book: FakeExcel) {}

  load(properties: string | string[]): void {
    for (const property of [properties].flat()) this.#wanted.add(property);
    this.book.pending.push(() => {
      this.#loaded = new Set(this.#wanted);
    });
  }

  protected read<T>(property: string, get: () => T): T {
    if (!this.#loaded.has(property)) throw new Error(`PropertyNotLoaded: ${property}`);
    return get();
  }
}

class FakeRange extends Loadable {
  constructor(
    book: FakeExcel,
    private readonly sheet: KeptSheet,
    private readonly region: Region | null,
  ) {
    super(book);
  }

  get isNullObject(): boolean {
    return this.region === null;
  }
  get address(): string {
    return this.read("address", () => formatAddress({ ...this.region!, sheet: this.sheet.name }));
  }
  get rowIndex(): number {
    return this.read("rowIndex", () => this.region!.row);
  }
  get columnIndex(): number {
    return this.read("columnIndex", () => this.region!.column);
  }
  get columnCount(): number {
    return this.read("columnCount", () => this.region!.columns);
  }
  get values(): Value[][] {
    return this.read("values", () => this.#map(({ value }) => value));
  }
  set values(rows: Value[][]) {
    // an apostrophe at the front says that the rest is text; a text beginning with = is a formula
    this.#write(rows, (value) => {
      if (typeof value !== "string") return kept(value);
      if (value.startsWith("'")) return kept(value.slice(1));
      return value.startsWith("=") ? computed(value, this.book.names) : kept(value);
    });
  }
  get valueTypes(): string[][] {
    return this.read("valueTypes", () => this.#map(({ type }) => type));
  }
  get formulas(): Value[][] {
    return this.read("formulas", () => this.#map(({ formula, value }) => formula ?? value));
  }
  set formulas(rows: string[][]) {
    this.#write(rows, (formula) => computed(formula as string, this.book.names));
  }
  get worksheet() {
    return {
      activate: () => undefined,
      charts: { add: (kind: string, source: FakeRange) => this.book.chart(kind, source.region!) },
    };
  }
  select(): void {
    this.book.pending.push(() => this.book.choose(this.sheet, this.region!));
  }
  getCell(row: number, column: number): FakeRange {
    const { region } = this;
    return new FakeRange(this.book, this.sheet, {
      sheet: null,
      row: region!.row + row,
      column: region!.column + column,
      rows: 1,
      columns: 1,
    });
  }
  getUsedRangeOrNullObject(): FakeRange {
    const { row, column, rows, columns } = this.region!;
    const used = [...this.sheet.cells.entries()]
      .filter(([, cell]) => cell.value !== "" || cell.formula !== undefined)
      .map(([key]) => key.split(" ").map(Number))
      .filter(([r, c]) => r >= row && r < row + rows && c >= column && c < column + columns);
    if (used.length === 0) return new FakeRange(this.book, this.sheet, null);
    const [top, bottom] = [Math.min(...used.map(([r]) => r)), Math.max(...used.map(([r]) => r))];
    const [left, right] = [Math.min(...used.map(([, c]) => c)), Math.max(...used.map(([, c]) => c))];
    return new FakeRange(this.book, this.sheet, {
      sheet: null,
      row: top,
      column: left,
      rows: bottom - top + 1,
      columns: right - left + 1,
    });
  }
  /** The first cell's value, for names. */
  first = (): Value => this.sheet.at(this.region!.row, this.region!.column).value;

  #map<T>(take: (cell: KeptCell) => T): T[][] {
    const { row, column, rows, columns } = this.region!;
    return Array.from({ length: rows }, (_, i) =>
      Array.from({ length: columns }, (_, j) => take(this.sheet.at(row + i, column + j))),
    );
  }
  #write(rows: Value[][], make: (value: Value) => KeptCell): void {
    const region = this.region!;
    if (rows.length !== region.rows || rows.some((row) => row.length !== region.columns)) {
      throw new Error("InvalidArgument: the array does not have the size of the range");
    }
    this.book.pending.push(() =>
      rows.forEach((row, i) =>
        row.forEach((value, j) =>
          this.sheet.cells.set(`${region.row + i} ${region.column + j}`, make(value)),
        ),
      ),
    );
  }
}

/** As much of Excel's programming interface as the pane's host uses, and as strict about load and sync. */
export class FakeExcel {
  pending: (() => void)[] = [];
  readonly names = new Map<string, () => Value>();
  readonly charts: { kind: string; source: string; title: string }[] = [];
  readonly #sheets: KeptSheet[];
  #selected: { sheet: KeptSheet; region: Region };
  readonly #listeners = new Set<() => Promise<void>>();

  // the enumerations of the platform's global
  readonly ChartType = { line: "Line" };
  readonly ChartSeriesBy = { columns: "Columns" };
  readonly RangeValueType = { error: "Error" };

  constructor(sheetNames: readonly string[]) {
    this.#sheets = sheetNames.map((name) => new KeptSheet(name));
    this.#selected = { sheet: this.#sheets[0], region: parseAddress("A1")! };
  }

  /** Whether each batch so far asked to be joined to the undo step before. */
  readonly joined: boolean[] = [];

  readonly run = async <T>(
    options: { mergeUndoGroup?: boolean } | null,
    batch: (context: unknown) => Promise<T>,
  ): Promise<T> => {
    this.joined.push(options?.mergeUndoGroup ?? false);
    return batch(this.#context());
  };

  /** What the user does: selects a region. */
  async select(address: string): Promise<void> {
    const region = parseAddress(address)!;
    this.choose(this.#named(region.sheet!), region);
  }

  choose(sheet: KeptSheet, region: Region): void {
    this.#selected = { sheet, region };
    for (const listener of this.#listeners) void listener();
  }

  chart(kind: string, source: Region) {
    const chart = { kind, source: formatAddress({ ...source, sheet: null }), title: "" };
    this.charts.push(chart);
    return {
      title: {
        set text(text: string) {
          chart.title = text;
        },
      },
      setPosition: () => undefined,
    };
  }

  #named(name: string): KeptSheet {
    const found = this.#sheets.find((sheet) => sheet.name.toLowerCase() === name.toLowerCase());
    if (!found) throw new Error(`ItemNotFound: ${name}`);
    return found;
  }

  #context() {
    const range = (sheet: KeptSheet) => ({
      getRange: (a1: string) => new FakeRange(this, sheet, parseAddress(a1)),
    });
    let loadedNames = false;
    const sheets = this.#sheets;
    return {
      sync: async () => {
        const work = this.pending;
        this.pending = [];
        work.forEach((step) => step());
      },
      workbook: {
        getSelectedRange: () => new FakeRange(this, this.#selected.sheet, this.#selected.region),
        worksheets: {
          load: () => this.pending.push(() => (loadedNames = true)),
          get items() {
            if (!loadedNames) throw new Error("PropertyNotLoaded: items");
            return sheets.map(({ name }) => ({ name }));
          },
          add: (name: string) => this.pending.push(() => sheets.push(new KeptSheet(name))),
          getItem: (name: string) => range(this.#named(name)),
          getActiveWorksheet: () => range(this.#selected.sheet),
        },
        names: {
          getItemOrNullObject: (name: string) => {
            const key = name.toLowerCase();
            return { isNullObject: !this.names.has(key), delete: () => this.names.delete(key) };
          },
          add: (name: string, target: FakeRange) => {
            if (this.names.has(name.toLowerCase())) throw new Error(`ItemAlreadyExists: ${name}`);
            this.names.set(name.toLowerCase(), target.first);
          },
        },
        onSelectionChanged: {
          add: (handler: () => Promise<void>) => {
            this.#listeners.add(handler);
            return { context: null, remove: () => this.#listeners.delete(handler) };
          },
        },
      },
    };
  }
}
