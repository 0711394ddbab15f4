import { Issue, type IssueFacts } from "../src/core/issue";
import { surveySeries } from "../src/sheet/grid";
import { wordIssue } from "../src/sheet/messages";
import { formatAddress, parseAddress } from "./address";

/** Something wrong with a block, in words. */
export interface Problem {
  readonly text: string;
  /** The cell it stands in, when it stands in one. */
  readonly cell: string | null;
}

/** One series of a block: its name and its numbers, NaN for what is not a number. */
export interface SeriesFound {
  readonly name: string;
  readonly values: readonly number[];
}

/** What the pane says about a selected block. */
export interface Reading {
  readonly series: readonly SeriesFound[];
  readonly hasHeader: boolean;
  /** Rows of numbers, blank rows around them left out. */
  readonly rows: number;
  /** Blank cells among the numbers. */
  readonly gaps: number;
  readonly problems: readonly Problem[];
}

/**
 * Reads raw cells the way every function will, but goes on after the first problem.
 * @param address where the cells stand, so that a problem can be pointed at
 */
export function readSelection(cells: readonly (readonly unknown[])[], address: string): Reading {
  try {
    const { block, problems } = surveySeries(cells);
    return {
      series: block.names.map((name, k) => ({ name, values: block.rows.map((row) => row[k]) })),
      hasHeader: block.hasHeader,
      rows: block.rows.length,
      gaps: problems.filter(({ code }) => code === "gap").length,
      problems: problems.map((facts) => ({
        text: wordIssue(facts),
        cell: cellOf(facts, block.names, address),
      })),
    };
  } catch (thrown) {
    if (!(thrown instanceof Issue)) throw thrown;
    const problems = [{ text: wordIssue(thrown.facts), cell: null }];
    return { series: [], hasHeader: false, rows: 0, gaps: 0, problems };
  }
}

/** The cell that an issue speaks of; rows and columns of an issue are counted in the range as passed. */
function cellOf(facts: IssueFacts, names: readonly string[], address: string): string | null {
  const region = parseAddress(address);
  if (!region || !("name" in facts) || !("row" in facts)) return null;
  const column = names.indexOf(facts.name);
  if (column < 0) return null;
  const place = { row: region.row + facts.row - 1, column: region.column + column, rows: 1, columns: 1 };
  return formatAddress({ sheet: region.sheet, ...place });
}
