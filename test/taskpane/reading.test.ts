import { describe, expect, it } from "vitest";
import { readSelection } from "../../taskpane/reading";
import { frozen } from "../support/frozen";

const clean = frozen([
  ["landings", "ice"],
  [1, 4],
  [2, 3],
  [5, 9],
]);

describe("the pane's reading of a block", () => {
  it("tells series, rows and that nothing is wrong", () => {
    expect(readSelection(clean, "Data!B4:C7")).toEqual({
      series: [
        { name: "landings", values: [1, 2, 5] },
        { name: "ice", values: [4, 3, 9] },
      ],
      hasHeader: true,
      rows: 3,
      gaps: 0,
      problems: [],
    });
  });

  it("goes on after the first problem, points at the cells, and counts gaps", () => {
    const cells = [
      ["landings", "ice"],
      [1, null],
      ["n/a", 3],
      [true, 4],
      [2, { type: "Error", basicValue: "#N/A" }],
    ];
    const reading = readSelection(cells, "'Cold store'!B4:C8");
    expect(reading.gaps).toBe(1);
    expect(reading.problems).toEqual([
      { cell: "'Cold store'!C5", text: "Series ice, row 2 is blank. Fill it or shorten the range." },
      {
        cell: "'Cold store'!B6",
        text: "Series landings, row 3: text 'n/a' is not a number. Correct the cell.",
      },
      { cell: "'Cold store'!B7", text: "Series landings, row 4: TRUE is not a number. Correct the cell." },
      {
        cell: "'Cold store'!C8",
        text: "Series ice, row 5: the error #N/A is not a number. Correct the cell.",
      },
    ]);
    expect(reading.series[0].values).toEqual([1, NaN, NaN, 2]);
  });

  it("points at cells of a whole column by their row on the sheet", () => {
    const [problem] = readSelection([[null], ["ice"], [3], ["x"], [4]], "Data!C:C").problems;
    expect(problem.cell).toBe("Data!C4");
  });

  it("tells a problem of the header without a cell, as it is one of the block", () => {
    const [problem] = readSelection(
      [
        ["ice", "ice"],
        [1, 2],
      ],
      "Data!B4:C5",
    ).problems;
    expect(problem).toEqual({ cell: null, text: expect.stringContaining("ice") });
  });

  it("says in words that a blank selection holds nothing", () => {
    const reading = readSelection([[null, null]], "Data!B4:C4");
    expect(reading.series).toEqual([]);
    expect(reading.problems).toHaveLength(1);
  });
});
