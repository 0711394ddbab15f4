/** What lies in a region of a sheet. */
export interface Contents {
  /** Cells that hold something. */
  readonly filled: number;
  /** The first of them, such as H4; null when the region is blank. */
  readonly first: string | null;
}

/** A line chart of a range, its upper left corner at a cell. */
export interface ChartRequest {
  readonly address: string;
  readonly title: string;
  readonly at: string;
}

/** All that the pane knows of a spreadsheet. Addresses are like Data!B4:E160; a sheet name with blanks is quoted. */
export interface SheetHost {
  /** False where charts cannot be drawn; `addChart` is then refused. */
  readonly canChart: boolean;

  /** False where `oneUndoStep` leaves one step per write. */
  readonly undoesAtOnce: boolean;

  selectedAddress(): Promise<string>;

  /** Puts the selection there and brings the sheet in front. */
  select(address: string): Promise<void>;

  /**
   * Raw values: numbers, texts, logical values, null for blank, {type: "Error", basicValue} for errors.
   * Rows count from the first of the address; blank rows at its end may be left out.
   */
  readBlock(address: string): Promise<unknown[][]>;

  /** Formulas in English notation; what a formula fills beyond its own cell is the spreadsheet's affair. */
  writeFormulas(address: string, formulas: readonly (readonly string[])[]): Promise<void>;

  /** Texts that stay texts, whatever they begin with. */
  writeLabels(address: string, labels: readonly (readonly string[])[]): Promise<void>;

  /** Adds a sheet and returns the name it got, which differs from the one asked for when that is taken. */
  addSheet(name: string): Promise<string>;

  /** Gives a range a name; a name that is already there moves. */
  nameRange(name: string, address: string): Promise<void>;

  addChart(chart: ChartRequest): Promise<void>;

  contents(address: string): Promise<Contents>;

  /** Work that the user takes back in one step, where `undoesAtOnce`. */
  oneUndoStep<T>(work: () => Promise<T>): Promise<T>;

  /** @returns a function that stops listening */
  onSelectionChanged(listener: () => void): () => void;
}
