import { describe, expect, it } from "vitest";
import { readSelection } from "../../taskpane/reading";
import {
  forecastFormula,
  forecastRegion,
  initialState,
  isClean,
  placeOf,
  type PaneState,
} from "../../taskpane/state";
import { frozen } from "../support/frozen";

const clean = frozen([
  ["landings", "ice"],
  [1, 4],
  [2, 3],
  [5, 9],
]);

describe("the pane's reading of a block", () => {
  it("tells series, rows and that nothing is wrong", () => {
    expect(readSelection(clean)).toEqual({
      names: ["landings", "ice"],
      hasHeader: true,
      rows: 3,
      gaps: 0,
      problems: [],
    });
  });

  it("goes on after the first problem, and counts gaps", () => {
    const reading = readSelection([
      ["landings", "ice"],
      [1, null],
      ["n/a", 3],
      [true, 4],
      [2, { type: "Error", basicValue: "#N/A" }],
    ]);
    expect(reading.gaps).toBe(1);
    expect(reading.problems).toEqual([
      "Series ice, row 2 is blank. Fill it or shorten the range.",
      "Series landings, row 3: text 'n/a' is not a number. Correct the cell.",
      "Series landings, row 4: TRUE is not a number. Correct the cell.",
      "Series ice, row 5: the error #N/A is not a number. Correct the cell.",
    ]);
  });

  it("says in words that a blank selection holds nothing", () => {
    const reading = readSelection([[null, null]]);
    expect(reading.rows).toBe(0);
    expect(reading.problems).toHaveLength(1);
  });
});

it("a single cell is no block, whatever it holds", () => {
  for (const cell of [5, "word", null, { type: "Error", basicValue: "#VALUE!" }]) {
    expect(readSelection([[cell]])).toMatchObject({ rows: 0, problems: [] });
  }
});

describe("where the forecast goes", () => {
  const state: PaneState = { ...initialState, address: "Data!B4:C7", reading: readSelection(clean) };

  it("is proposed beside the block with one column between", () => {
    expect(placeOf(state)).toBe("Data!E4");
    expect(isClean(state)).toBe(true);
  });

  it("takes a row more than the horizon when names go along", () => {
    expect(forecastRegion(state)).toEqual({ sheet: "Data", row: 3, column: 4, rows: 13, columns: 2 });
  });

  it("needs no sheet's name in the formula on the same sheet, and has it on another", () => {
    expect(forecastFormula(state)).toBe("=COMOVE.AHEAD(B4:C7,12)");
    expect(forecastFormula({ ...state, place: "G9" })).toBe("=COMOVE.AHEAD(B4:C7,12)");
    expect(forecastFormula({ ...state, place: "Plan!A1" })).toBe("=COMOVE.AHEAD(Data!B4:C7,12)");
  });

  it("is no region when what was typed is no cell", () => {
    expect(forecastRegion({ ...state, place: "somewhere" })).toBeNull();
  });
});
