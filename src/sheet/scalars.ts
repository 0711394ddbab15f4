import { Issue, type Allowed } from "../core/issue";
import { describeCell, isBlank, toCells, type Cell } from "./cell";

export const HORIZON: Allowed = { kind: "whole", from: 1, to: 10_000 };

/** The one cell of a scalar argument. @throws Issue "missing-argument" | "bad-argument" */
export function readCell(raw: unknown, argument: string, allowed: Allowed): Cell {
  const cells = toCells(raw);
  if (cells === null) throw new Issue({ code: "missing-argument", argument });
  if (cells.length > 1 || cells[0].length > 1) {
    throw new Issue({ code: "bad-argument", argument, found: "a range of several cells", allowed });
  }
  return cells[0][0];
}

/** A whole number argument. @throws Issue "missing-argument" | "bad-argument" */
export function readWhole(raw: unknown, argument: string, from: number, to: number | null): number {
  const allowed: Allowed = { kind: "whole", from, to };
  const cell = readCell(raw, argument, allowed);
  if (typeof cell === "number" && Number.isSafeInteger(cell) && cell >= from && (to === null || cell <= to))
    return cell;
  throw new Issue({ code: "bad-argument", argument, found: describeCell(cell), allowed });
}

/** Rows ahead, 1 … 10,000. */
export const readHorizon = (raw: unknown): number => readWhole(raw, "horizon", 1, 10_000);

/** One of the series, by name or by column number from 1. @returns its column counted from 0 */
export function readTarget(raw: unknown, names: readonly string[]): number {
  const values = ["the name of a series", `a column number from 1 to ${names.length}`];
  const allowed: Allowed = { kind: "one-of", values };
  const cell = readCell(raw, "target", allowed);
  const column =
    typeof cell === "string"
      ? names.indexOf(cell.trim())
      : typeof cell === "number" && Number.isInteger(cell)
        ? cell - 1
        : -1;
  if (column >= 0 && column < names.length) return column;
  throw new Issue({ code: "bad-argument", argument: "target", found: describeCell(cell), allowed });
}

/**
 * The lags of a look: one number L means 0 … L, several cells mean just those lags, negative and repeated allowed.
 * @param rows rows of the series, which bound the lags
 */
export function readLags(raw: unknown, rows: number): number[] {
  const cells = toCells(raw);
  if (cells === null) throw new Issue({ code: "missing-argument", argument: "lags" });
  const given = cells.flat().filter((cell) => !isBlank(cell));
  if (cells.length === 1 && cells[0].length === 1) {
    const last = readWhole(given[0], "lags", 0, rows - 1);
    return Array.from({ length: last + 1 }, (_, k) => k);
  }
  return given.map((cell) => {
    if (typeof cell === "number" && Number.isInteger(cell) && Math.abs(cell) < rows) return cell;
    throw new Issue({
      code: "bad-argument",
      argument: "lags",
      found: describeCell(cell),
      allowed: { kind: "whole", from: 1 - rows, to: rows - 1 },
    });
  });
}
