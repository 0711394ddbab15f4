/** The sentences of the pane. */
export const paneWords = {
  title: "Comove",
  lead: "Related series, forecast together.",
  station: "The selected block",
  nothing: "Select a block of series: one column each, oldest row first, names above if there are any.",
  seriesFound: (names: readonly string[]) => `${names.length} series: ${names.join(", ")}`,
  rowsFound: (rows: number) => (rows === 1 ? "1 row" : `${rows.toLocaleString("en-US")} rows`),
  noHeader:
    "The first row holds no names, so the series are called y1, y2 …. Include the header row to see their names in results.",
  fewRows: "Fewer than 50 rows: expect wide bands, and read every lead with care.",
  clean: "No problems found.",
  problems: (count: number) =>
    count === 1 ? "One problem to mend first" : `${count} problems to mend first`,
  more: (count: number) => `and ${count} more.`,
  horizon: "Rows ahead",
  place: "Put it at",
  write: "Write the forecast here",
  written: (formula: string, place: string) => `${formula} now stands in ${place}.`,
  badHorizon: "Rows ahead must be a whole number from 1 to 10,000.",
  badPlace: (place: string) => `'${place}' is not a cell. Give one such as H4.`,
  occupied: (filled: number, first: string) =>
    `${filled === 1 ? "One cell" : `${filled} cells`} would be in the way, the first in ${first}. Choose another place, or clear them.`,
  failed: "The spreadsheet did not take it. Leave the cell being edited and try again.",
  cautionsTitle: "Cautions",
  cautions: [
    "A forecast is not a guarantee, and a lead is not a cause.",
    "Where a decision can hurt someone (dosing, running a grid or a plant, safety stock of medicines), local codes and the licensed practitioner decide, not this sheet.",
    "Some older clients hand over blank cells as 0. If a block with blanks shows no gaps here, check them by eye.",
  ],
  help: "Help: functions, options, conventions",
} as const;
