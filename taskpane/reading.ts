import { Issue } from "../src/core/issue";
import { surveySeries } from "../src/sheet/grid";
import { wordIssue } from "../src/sheet/messages";

/** What the pane says about a selected block. */
export interface Reading {
  readonly names: readonly string[];
  readonly hasHeader: boolean;
  /** Rows of numbers, blank rows around them left out. */
  readonly rows: number;
  /** Blank cells among the numbers. */
  readonly gaps: number;
  readonly problems: readonly string[];
}

const NOTHING: Reading = { names: [], hasHeader: false, rows: 0, gaps: 0, problems: [] };

/** Reads raw cells the way every function will, but goes on after the first problem. */
export function readSelection(cells: readonly (readonly unknown[])[]): Reading {
  // one cell is where the cursor happens to stand, not a block that somebody means
  if (cells.length <= 1 && (cells[0]?.length ?? 0) <= 1) return NOTHING;
  try {
    const { block, problems } = surveySeries(cells);
    return {
      names: block.names,
      hasHeader: block.hasHeader,
      rows: block.rows.length,
      gaps: problems.filter(({ code }) => code === "gap").length,
      problems: problems.map((facts) => wordIssue(facts)),
    };
  } catch (thrown) {
    if (!(thrown instanceof Issue)) throw thrown;
    return { ...NOTHING, problems: [wordIssue(thrown.facts)] };
  }
}
