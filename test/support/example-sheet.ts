import { coldStoreWeeks, FIRST_WEEK, SERIES } from "../../src/embedded/demo/cold-store";
import type { FormulaSheet } from "./formula";

const weeks = coldStoreWeeks();
const horizon = Array.from({ length: 12 }, (_, t) => t);

/** Blocks by their upper left corner, as help and documents place them. */
const BLOCKS: Readonly<Record<string, (number | string | null)[][]>> = {
  A4: [["week"], ...weeks.map((_, week) => [FIRST_WEEK + 7 * week])],
  B4: [[...SERIES], ...weeks],
  // growth rates that continue the data
  P5: horizon.map((t) => [0.01, -0.02, 0.005 * t, 0]),
  // a plan for landings in the first rows, and for trips in one
  U5: horizon.map((t) => [t < 4 ? 200 + t : null, null, null, t === 2 ? 70 : null]),
};

const columnNumber = (letters: string): number =>
  [...letters].reduce((sum, letter) => 26 * sum + letter.charCodeAt(0) - 64, 0);

const cellAt = (address: string): { readonly column: number; readonly row: number } => {
  const [, letters, row] = /^([A-Z]+)(\d+)$/.exec(address)!;
  return { column: columnNumber(letters), row: Number(row) };
};

/** The sheet that the examples of help and documents stand on: the demo data, a model block, a plan. */
export const exampleSheet: FormulaSheet = {
  range(address) {
    const [from, to] = address.split(":").map(cellAt);
    const corner = Object.keys(BLOCKS).find(
      (at) => cellAt(at).column === from.column && cellAt(at).row <= from.row,
    );
    if (corner === undefined) throw new Error(`Nothing stands in ${address} of the example sheet.`);
    const above = from.row - cellAt(corner).row;
    return BLOCKS[corner]
      .slice(above, above + to.row - from.row + 1)
      .map((row) => row.slice(0, to.column - from.column + 1));
  },
  spilling(corner) {
    if (corner !== "G2") throw new Error(`Nothing spills from ${corner} of the example sheet.`);
    return '=COMOVE.MODEL(B4:E160,,"cycle=52; waves=1")';
  },
};
