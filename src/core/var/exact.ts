import { Issue } from "../issue";
import { factorColumns } from "../linalg";
import type { Matrix } from "../matrix";
import type { Calendar } from "./settings";
import { termNames, termRow } from "./terms";

/**
 * Refuses series that are constant, or an exact combination of each other and the terms in the same row:
 * no joint model exists for them.
 * @param y     n×K
 * @param start position of the first row
 * @throws Issue "constant-series" | "exact-combination"
 */
export function refuseExactSeries(y: Matrix, calendar: Calendar, start: number): void {
  const constant = y[0].findIndex((first, k) => y.every((row) => row[k] === first));
  if (constant >= 0) throw new Issue({ code: "constant-series", series: constant });
  const terms = termNames(calendar);
  if (y.length < terms.length + y[0].length) return;
  const found = factorColumns(y.map((row, t) => [...termRow(calendar, start + t), ...row]));
  if ("factor" in found) return;
  const { columns, weights } = found.relation;
  throw new Issue({
    code: "exact-combination",
    columns: columns.map((c, i) => ({
      column: c < terms.length ? terms[c] : { kind: "series", series: c - terms.length },
      weight: weights[i],
    })),
  });
}
