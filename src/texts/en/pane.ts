const counted = (count: number, thing: string): string =>
  `${count.toLocaleString("en-US")} ${thing}${count === 1 ? "" : "s"}`;

/** The sentences of the pane. */
export const paneWords = {
  title: "Comove",
  lead: "Related series, forecast together",
  station: "Your series",
  nothing:
    "Select a block of series in the sheet: one column each, oldest row first, names above if there are any.",
  oneBlock: "Select one block of cells.",
  found: (series: number, rows: number) =>
    `${series.toLocaleString("en-US")} series, ${counted(rows, "row")}`,
  noHeader:
    "The first row holds no names, so the series are called y1, y2 …. Include the header row to see their names in results.",
  fewRows: "Fewer than 50 rows: expect wide bands, and read every lead with care.",
  clean: "Nothing to mend.",
  problems: (count: number) =>
    count === 1 ? "One thing to mend first" : `${count.toLocaleString("en-US")} things to mend first`,
  more: (count: number) => `and ${count.toLocaleString("en-US")} more.`,
  blanksAsZero:
    "Some older clients hand a blank cell to a formula as 0, without a word. Fill the blanks before you trust a result there.",
  goTo: (cell: string) => `Go to ${cell}`,
  writing: "Forecast",
  horizon: "Rows ahead",
  cycle: "Season, in rows",
  cycleHint: "none",
  waves: "Smooth waves in it",
  wavesHint: "no smoothing",
  place: "First cell",
  placeHint: "To choose the place, select a cell beside the block, or type one of another sheet.",
  formula: "The formula",
  write: "Write the forecast here",
  written: (cell: string, rows: number, columns: number) =>
    `The formula stands in ${cell} and fills ${counted(rows, "row")} of ${counted(columns, "column")}. It follows the data.`,
  undoSteps: "Undo takes it back step by step.",
  faulty: {
    horizon: "Rows ahead must be a whole number from 1 to 10,000.",
    cycle:
      "A season is a whole number of rows, 2 or more: 52 for weeks in a year, 12 for months. Leave it blank for none.",
    waves:
      "The waves are a whole number from 1 to half the season. Leave it blank for a value of its own for each row.",
  },
  badPlace: (place: string) => `'${place}' is not a cell. Give one such as H4.`,
  inTheWay: "The forecast would cover the data it reads. Choose a cell outside the block.",
  overTheEdge:
    "The forecast would run over the edge of the sheet. Choose a cell further up or left, or fewer rows ahead.",
  occupied: (filled: number, first: string) =>
    `${filled === 1 ? "One cell" : `${filled.toLocaleString("en-US")} cells`} would be in the way, the first at ${first}. Choose another place, or clear ${filled === 1 ? "it" : "them"}.`,
  changed: "The data have changed and need mending first.",
  failed: "The spreadsheet did not take it. Leave the cell being edited and try again.",
  outside: "This pane belongs inside Excel. Open it there with the Comove button.",
  cautionsTitle: "Cautions",
  cautions: [
    "A forecast is not a guarantee, and a lead is not a cause.",
    "Where a decision can hurt someone (dosing, running a grid or a plant, safety stock of medicines), local codes and the licensed practitioner decide, not this sheet.",
  ],
  help: "Help: functions, options, conventions",
} as const;
