/** A rectangle of cells on a sheet; rows and columns counted from 0. */
export interface Region {
  /** Null for the sheet in front. */
  readonly sheet: string | null;
  readonly row: number;
  readonly column: number;
  readonly rows: number;
  readonly columns: number;
}

const CELL = /^\$?([A-Z]{1,3})\$?(\d{1,7})$/i;

/** Letters of a column, 0 → A. */
export function columnLetters(column: number): string {
  const rest = Math.floor(column / 26);
  return (rest > 0 ? columnLetters(rest - 1) : "") + String.fromCharCode(65 + (column % 26));
}

const columnNumber = (letters: string): number =>
  [...letters.toUpperCase()].reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0) - 1;

/** Reads an address such as Data!B4:E160 or 'Cold store'!B4; null when it is none. */
export function parseAddress(address: string): Region | null {
  const at = address.lastIndexOf("!");
  const sheet =
    at < 0
      ? null
      : address
          .slice(0, at)
          .replace(/^'(.*)'$/, "$1")
          .replaceAll("''", "'");
  const [first, last = first, ...more] = address
    .slice(at + 1)
    .trim()
    .split(":");
  const from = CELL.exec(first);
  const to = CELL.exec(last);
  if (!from || !to || more.length > 0 || from[2] === "0" || to[2] === "0") return null;
  const corners = [from, to].map(([, letters, digits]) => ({
    row: Number(digits) - 1,
    column: columnNumber(letters),
  }));
  const row = Math.min(corners[0].row, corners[1].row);
  const column = Math.min(corners[0].column, corners[1].column);
  return {
    sheet,
    row,
    column,
    rows: Math.abs(corners[0].row - corners[1].row) + 1,
    columns: Math.abs(corners[0].column - corners[1].column) + 1,
  };
}

const quoted = (sheet: string): string =>
  /^[A-Za-z_][\w.]*$/.test(sheet) ? sheet : `'${sheet.replaceAll("'", "''")}'`;

/** Writes an address; a sheet name is quoted where it must be. */
export function formatAddress({ sheet, row, column, rows, columns }: Region): string {
  const first = `${columnLetters(column)}${row + 1}`;
  const last = `${columnLetters(column + columns - 1)}${row + rows}`;
  return `${sheet === null ? "" : `${quoted(sheet)}!`}${first}${first === last ? "" : `:${last}`}`;
}
