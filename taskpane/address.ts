/** A rectangle of cells on a sheet; rows and columns counted from 0. */
export interface Region {
  /** Null for the sheet in front. */
  readonly sheet: string | null;
  readonly row: number;
  readonly column: number;
  readonly rows: number;
  readonly columns: number;
}

/** Rows of a sheet: what a whole column such as B:E holds. */
const ALL_ROWS = 1_048_576;

/** Columns of a sheet, A to XFD. */
export const ALL_COLUMNS = 16_384;

const CELL = /^\$?([A-Z]{1,3})\$?([1-9]\d{0,6})$/i;
const COLUMN = /^\$?([A-Z]{1,3})$/i;

/** Letters of a column, 0 → A. */
export function columnLetters(column: number): string {
  const rest = Math.floor(column / 26);
  return (rest > 0 ? columnLetters(rest - 1) : "") + String.fromCharCode(65 + (column % 26));
}

const columnNumber = (letters: string): number =>
  [...letters.toUpperCase()].reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0) - 1;

/** A sheet's name, quoted or without any sign that needs quotes, and the cells behind it. */
const ADDRESS = /^(?:('(?:[^']|'')+'|[^'!,:]+)!)?([^'!,]+)$/;

/** The sheet's name without its quotes, and the cells without the sheet; cells are blank in what is no address. */
export function splitAddress(address: string): { readonly sheet: string | null; readonly cells: string } {
  const [, name, cells = ""] = ADDRESS.exec(address.trim()) ?? [];
  if (name === undefined) return { sheet: null, cells };
  return { sheet: name.replace(/^'(.*)'$/, "$1").replaceAll("''", "'"), cells };
}

/** Reads an address such as Data!B4:E160, 'Cold store'!B4 or Data!B:E; null when it is none. */
export function parseAddress(address: string): Region | null {
  const { sheet, cells } = splitAddress(address);
  const [first, last = first, ...more] = cells.split(":");
  if (more.length > 0) return null;
  const columns = cells.includes(":") ? [COLUMN.exec(first), COLUMN.exec(last)] : [];
  if (columns[0] && columns[1]) {
    const [from, to] = [columns[0], columns[1]].map(([, letters]) => columnNumber(letters));
    return { sheet, row: 0, rows: ALL_ROWS, column: Math.min(from, to), columns: Math.abs(from - to) + 1 };
  }
  const corners = [CELL.exec(first), CELL.exec(last)];
  if (!corners[0] || !corners[1]) return null;
  const [from, to] = [corners[0], corners[1]].map(([, letters, digits]) => ({
    row: Number(digits) - 1,
    column: columnNumber(letters),
  }));
  return {
    sheet,
    row: Math.min(from.row, to.row),
    column: Math.min(from.column, to.column),
    rows: Math.abs(from.row - to.row) + 1,
    columns: Math.abs(from.column - to.column) + 1,
  };
}

/** Quotes a sheet's name where a formula would misread it: blanks, signs, or the look of a cell such as Q1. */
export function quoteSheet(sheet: string): string {
  const plain = /^[A-Za-z_][\w.]*$/.test(sheet) && !CELL.test(sheet) && !/^(rc?|c|r\d*c\d*)$/i.test(sheet);
  return plain ? sheet : `'${sheet.replaceAll("'", "''")}'`;
}

/** Writes an address; a sheet name is quoted where it must be. */
export function formatAddress({ sheet, row, column, rows, columns }: Region): string {
  const [left, right] = [columnLetters(column), columnLetters(column + columns - 1)];
  const first = `${left}${row + 1}`;
  const last = `${right}${row + rows}`;
  const cells = rows === ALL_ROWS ? `${left}:${right}` : first === last ? first : `${first}:${last}`;
  return sheet === null ? cells : `${quoteSheet(sheet)}!${cells}`;
}

/** The address without its sheet, as people say it. */
export const cellsOf = (address: string): string => splitAddress(address).cells;

/** Do two names mean one sheet? A spreadsheet takes no notice of capitals. */
export const isSameSheet = (a: string | null, b: string | null): boolean =>
  a?.toLowerCase() === b?.toLowerCase();

/** Does a region end within the sheet? */
export const isOnSheet = ({ row, rows, column, columns }: Region): boolean =>
  row + rows <= ALL_ROWS && column + columns <= ALL_COLUMNS;

/** Do two regions share a cell? */
export const overlap = (a: Region, b: Region): boolean =>
  isSameSheet(a.sheet, b.sheet) &&
  a.row < b.row + b.rows &&
  b.row < a.row + a.rows &&
  a.column < b.column + b.columns &&
  b.column < a.column + a.columns;

export const isOneCell = ({ rows, columns }: Region): boolean => rows === 1 && columns === 1;
