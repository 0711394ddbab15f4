import { Issue } from "../core/issue";
import type { Matrix } from "../core/matrix";
import { isBlank, toRectangle } from "./cell";
import { cellProblem, isHeader, readHeader, type SeriesBlock } from "./grid";

const MOST_ROWS = 10_000;

/**
 * Reads a plan: one row per row ahead and one column per series, blank = free; a header row of the series' names is
 * welcome. Blank rows count, also at the top and at the bottom.
 * @returns h×K, NaN where free
 * @throws Issue "missing-argument" | "columns-differ" | "plan-names" | "plan-rows" | "not-a-number-cell"
 */
export function readPlanRange(raw: unknown, series: SeriesBlock): Matrix {
  const cells = Array.isArray(raw) ? toRectangle(raw) : null;
  if (cells === null) throw new Issue({ code: "missing-argument", argument: "plan" });
  const need = series.names.length;
  if (cells[0].length !== need)
    throw new Issue({ code: "columns-differ", range: "plan", have: cells[0].length, need });
  const top = isHeader(cells[0]) ? 1 : 0;
  if (top === 1) requireSameNames(readHeader(cells[0], "plan").names, series.names);
  const body = cells.slice(top);
  if (body.length < 1 || body.length > MOST_ROWS)
    throw new Issue({ code: "plan-rows", have: body.length, limit: MOST_ROWS });
  return body.map((row, j) =>
    row.map((cell, k) => {
      if (typeof cell === "number") return cell;
      if (isBlank(cell)) return NaN;
      throw new Issue(cellProblem(cell, "allow", "plan", series.names[k], top + j + 1)[0]);
    }),
  );
}

function requireSameNames(plan: readonly string[], series: readonly string[]): void {
  if (plan.join("\n") !== series.join("\n")) throw new Issue({ code: "plan-names", plan, series });
}
