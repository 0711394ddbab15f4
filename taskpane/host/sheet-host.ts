/** What lies in a region of a sheet. */
export interface Contents {
  /** Cells that hold something. */
  readonly filled: number;
  /** The first of them, such as "H4"; null when the region is blank. */
  readonly first: string | null;
}

/** All that the pane knows of a spreadsheet. Addresses are like Data!B4:E160; a sheet name with spaces is quoted. */
export interface SheetHost {
  /** False where charts cannot be drawn; `addChart` is then not to be called. */
  readonly canChart: boolean;

  selectedAddress(): Promise<string>;

  /** Raw values: numbers, texts, logical values, null for blank, {type: "Error", basicValue} for errors. */
  readBlock(address: string): Promise<unknown[][]>;

  writeFormulas(address: string, formulas: string[][]): Promise<void>;

  /** Texts that stay texts, whatever they begin with. */
  writeLabels(address: string, labels: string[][]): Promise<void>;

  /** Adds a sheet and returns the name it got, which differs from the one asked for when that is taken. */
  addSheet(name: string): Promise<string>;

  nameRange(name: string, address: string): Promise<void>;

  /** A line chart of a range, its upper left corner at a cell. */
  addChart(chart: { readonly address: string; readonly title: string; readonly at: string }): Promise<void>;

  contents(address: string): Promise<Contents>;

  /** Work that the user takes back in one step, where the program can do that. */
  oneUndoStep<T>(work: () => Promise<T>): Promise<T>;

  /** @returns a function that stops listening */
  onSelectionChanged(listener: () => void): () => void;
}
