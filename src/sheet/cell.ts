/** What a spreadsheet hands to a function for one cell, after the host's wrappings are taken off. */
export type Cell = number | string | boolean | null | CellError;

/** What a function hands back: a rectangle of these. */
export type OutCell = number | string | boolean;
export type OutTable = OutCell[][];

/** An error value that stands in a cell, such as #N/A. */
export class CellError {
  constructor(readonly code: string) {}
}

/**
 * Takes the host's wrapping off one raw value: rich values carry `basicValue`, errors come as an object with a
 * `code` or as {type: "Error"}, and a blank may be null, undefined or "".
 */
export function toCell(raw: unknown): Cell {
  if (raw === null || raw === undefined || raw === "") return null;
  if (typeof raw === "number") return Number.isFinite(raw) ? raw : new CellError("#NUM!");
  if (typeof raw === "string" || typeof raw === "boolean") return raw;
  if (raw instanceof CellError) return raw;
  if (typeof raw === "bigint") return toCell(Number(raw));
  if (typeof raw !== "object") return new CellError("#VALUE!");
  const { type, basicValue, code, text } = raw as Record<string, unknown>;
  if (type === "Error") return new CellError(typeof basicValue === "string" ? basicValue : "#VALUE!");
  if (basicValue !== undefined && typeof basicValue !== "object") return toCell(basicValue);
  if (typeof code === "string") return new CellError(code);
  // an entity shows its text; anything else is what arithmetic on it would give
  return typeof text === "string" ? toCell(text) : new CellError("#VALUE!");
}

export const isBlank = (cell: Cell): cell is null =>
  cell === null || (typeof cell === "string" && cell.trim() === "");

/**
 * A range argument as a rectangle of cells: accepts the 2-D array of a range, a bare value, or a single row.
 * Ragged rows are padded with blanks; an omitted argument is null.
 */
export function toCells(raw: unknown): Cell[][] | null {
  const cells = toRectangle(raw);
  return cells === null || cells.every((row) => row.every(isBlank)) ? null : cells;
}

/** The same where blanks count: only an argument that is left out, or holds no cell at all, is null. */
export function toRectangle(raw: unknown): Cell[][] | null {
  if (raw === null || raw === undefined) return null;
  const rows = Array.isArray(raw)
    ? raw.map((row: unknown) => (Array.isArray(row) ? (row as unknown[]) : [row]))
    : [[raw]];
  const width = rows.reduce((w, row) => Math.max(w, row.length), 0);
  const cells = rows.map((row) => Array.from({ length: width }, (_, j) => toCell(row[j])));
  return cells.length === 0 || width === 0 ? null : cells;
}

/** How a cell is quoted in a message. */
export function describeCell(cell: Cell): string {
  if (cell === null) return "a blank cell";
  if (cell instanceof CellError) return `the error ${cell.code}`;
  if (typeof cell === "string") return `text '${cell.length > 30 ? `${cell.slice(0, 29)}…` : cell}'`;
  return typeof cell === "boolean" ? String(cell).toUpperCase() : String(cell);
}
