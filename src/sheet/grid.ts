import { Issue, type IssueFacts } from "../core/issue";
import type { Matrix } from "../core/matrix";
import { describeCell, isBlank, toCells, type Cell } from "./cell";

/** A range of series, read: numbers with names, and where they stood. */
export interface SeriesBlock {
  readonly names: readonly string[];
  readonly hasHeader: boolean;
  /** rows × K from the first to the last row that is not all blank; NaN marks a gap. */
  readonly rows: Matrix;
  /** Where the first of these rows stands in the range as passed, 1 = its first row. */
  readonly firstRow: number;
  /** Blank body rows before it, under the header if there is one. */
  readonly skipped: number;
}

/** A range as it was found, with everything that is wrong with it. */
export interface SeriesSurvey {
  readonly block: SeriesBlock;
  readonly problems: readonly IssueFacts[];
}

/** What becomes of a blank cell: refused, refused with the hint that the call can allow it, or allowed. */
export type Gaps = "refuse" | "offer" | "allow";

/**
 * Reads a range of series: header, names, numbers, gaps.
 * @param raw   what the host passed for the range
 * @param range the argument's name, for messages
 * @throws Issue for the first thing wrong with it
 */
export function readSeries(raw: unknown, range = "series", gaps: Gaps = "refuse"): SeriesBlock {
  const { block, problems } = surveySeries(raw, range, gaps);
  if (problems.length > 0) throw new Issue(problems[0]);
  return block;
}

/** The same reading, but it goes on after the first problem: what the pane shows. */
export function surveySeries(raw: unknown, range = "series", gaps: Gaps = "refuse"): SeriesSurvey {
  const cells = toCells(raw);
  if (cells === null) throw new Issue({ code: "missing-argument", argument: range });
  const top = cells.findIndex((row) => !row.every(isBlank));
  const hasHeader = isHeader(cells[top]);
  const { names, problems } = hasHeader
    ? readHeader(cells[top], range)
    : { names: defaultNames(cells[top].length, "y"), problems: [] };
  const bodyStart = hasHeader ? top + 1 : 0;
  const from = cells.findIndex((row, i) => i >= bodyStart && !row.every(isBlank));
  if (from < 0) throw new Issue({ code: "no-numbers", range });
  const to = cells.findLastIndex((row) => !row.every(isBlank));
  const body = cells.slice(from, to + 1);
  const bodyProblems = body.flatMap((row, t) =>
    row.flatMap((cell, k) => cellProblem(cell, gaps, range, names[k], from + t + 1)),
  );
  const blankSeries = names.flatMap((name, k): IssueFacts[] =>
    body.every((row) => isBlank(row[k])) ? [{ code: "blank-series", name }] : [],
  );
  return {
    block: {
      names,
      hasHeader,
      rows: body.map((row) => row.map((cell) => (typeof cell === "number" ? cell : NaN))),
      firstRow: from + 1,
      skipped: from - bodyStart,
    },
    problems: [...problems, ...blankSeries, ...bodyProblems],
  };
}

/** Text and no numbers in the first row that is not blank. */
export const isHeader = (row: readonly Cell[]): boolean =>
  row.some((cell) => typeof cell === "string" && !isBlank(cell)) &&
  !row.some((cell) => typeof cell === "number");

export const defaultNames = (count: number, letter: string): string[] =>
  Array.from({ length: count }, (_, k) => `${letter}${k + 1}`);

const NUMBER_LIKE = /^[+-]?[\d.,'\s\u00a0\u202f]*\d[\d.,'\s\u00a0\u202f]*(e[+-]?\d+)?\s*%?$/i;

export function readHeader(row: readonly Cell[], range: string): { names: string[]; problems: IssueFacts[] } {
  const names: string[] = [];
  const problems: IssueFacts[] = [];
  row.forEach((cell, k) => {
    const name = typeof cell === "string" ? cell.trim() : "";
    if (name === "") problems.push({ code: "header-blank", range, column: k + 1 });
    else if (NUMBER_LIKE.test(name))
      problems.push({ code: "header-number", range, column: k + 1, text: name });
    else if (names.includes(name)) problems.push({ code: "header-twice", range, name });
    names.push(name === "" ? `column ${k + 1}` : name);
  });
  return { names, problems };
}

export function cellProblem(cell: Cell, gaps: Gaps, range: string, name: string, row: number): IssueFacts[] {
  if (typeof cell === "number") return [];
  if (isBlank(cell))
    return gaps === "allow" ? [] : [{ code: "gap", range, name, row, allowable: gaps === "offer" }];
  return [{ code: "not-a-number-cell", range, name, row, found: describeCell(cell) }];
}

/** Outside series beside a block of series. */
export interface DriverBlock {
  readonly names: readonly string[];
  /** needed rows × d, aligned with the first row of the block's `rows`. */
  readonly rows: Matrix;
}

export const NO_DRIVERS: DriverBlock = { names: [], rows: [] };

/**
 * Reads the drivers of a block of series, row beside row with the series' first body row as passed.
 * @param future rows needed beyond the last row of the series
 * @throws Issue "drivers-short" | "gap" | "not-a-number-cell"
 */
export function readDrivers(raw: unknown, series: SeriesBlock, future: number): DriverBlock {
  const cells = toCells(raw);
  if (cells === null) return NO_DRIVERS;
  const range = "drivers";
  const top = cells.findIndex((row) => !row.every(isBlank));
  const hasHeader = isHeader(cells[top]);
  const header = hasHeader
    ? readHeader(cells[top], range)
    : { names: defaultNames(cells[top].length, "x"), problems: [] };
  if (header.problems.length > 0) throw new Issue(header.problems[0]);
  const start = (hasHeader ? top + 1 : 0) + series.skipped;
  const length = series.rows.length + future;
  const last = cells.findLastIndex((row) => !row.every(isBlank)) + 1;
  if (last - start < length) {
    throw new Issue({ code: "drivers-short", have: Math.max(0, last - start), need: length, future });
  }
  const rows = cells.slice(start, start + length).map((row, t) =>
    row.map((cell, k) => {
      if (typeof cell === "number") return cell;
      const [problem] = cellProblem(cell, "refuse", range, header.names[k], start + t + 1);
      throw new Issue(problem);
    }),
  );
  return { names: header.names, rows };
}
