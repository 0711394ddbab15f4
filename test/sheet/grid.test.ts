import { describe, expect, it } from "vitest";
import { Issue, type IssueFacts } from "../../src/core/issue";
import { CellError, describeCell, isBlank, toCell, toCells } from "../../src/sheet/cell";
import { readDrivers, readSeries, surveySeries } from "../../src/sheet/grid";
import { frozen } from "../support/frozen";

/** The facts that a reading is refused with. */
function refusal(read: () => unknown): IssueFacts {
  try {
    read();
  } catch (thrown) {
    if (thrown instanceof Issue) return thrown.facts;
    throw thrown;
  }
  throw new Error("nothing was refused");
}

describe("a raw cell", () => {
  it.each([
    ["null", null, null],
    ["undefined", undefined, null],
    ["an empty text", "", null],
    ["a number", 1.5, 1.5],
    ["zero", 0, 0],
    ["a text", "a", "a"],
    ["a logical value", false, false],
    ["a rich number", { type: "Double", basicValue: 2 }, 2],
    ["a rich text", { type: "String", basicValue: "x" }, "x"],
    ["an entity with its text", { type: "Entity", text: "a place" }, "a place"],
    ["a big integer", 3n, 3],
  ])("%s", (_, raw, cell) => expect(toCell(raw)).toEqual(cell));

  it.each([
    ["not a number", NaN, "#NUM!"],
    ["infinite", -Infinity, "#NUM!"],
    ["the host's error object", Object.assign(new Error(), { code: "#N/A" }), "#N/A"],
    ["a rich error", { type: "Error", basicValue: "#DIV/0!" }, "#DIV/0!"],
    ["a rich error without value", { type: "Error" }, "#VALUE!"],
    ["an object that is none of these", {}, "#VALUE!"],
    ["a function", () => 1, "#VALUE!"],
  ])("%s is an error", (_, raw, code) => expect(toCell(raw)).toEqual(new CellError(code)));

  it("blank or not", () => {
    expect([null, "", "  ", "\t"].map(isBlank)).toEqual([true, true, true, true]);
    expect([0, false, "a", new CellError("#N/A")].map(isBlank)).toEqual([false, false, false, false]);
  });

  it("described for a message", () => {
    expect([null, 1e300, true, "n/a", "x".repeat(50), new CellError("#REF!")].map(describeCell)).toEqual([
      "a blank cell",
      "1e+300",
      "TRUE",
      "text 'n/a'",
      `text '${"x".repeat(29)}…'`,
      "the error #REF!",
    ]);
  });
});

describe("a raw range", () => {
  it("a bare value is one cell, a flat array one column, ragged rows are filled up", () => {
    expect(toCells(3)).toEqual([[3]]);
    expect(toCells([1, 2])).toEqual([[1], [2]]);
    expect(toCells([[1], [2, 3], []])).toEqual([[1, null], [2, 3], [null, null]]); // prettier-ignore
  });
  it.each([
    [null],
    [undefined],
    [[]],
    [[[]]],
    [
      [
        [null, ""],
        [" ", undefined],
      ],
    ],
    [""],
  ])("%j is nothing", (raw) => expect(toCells(raw)).toBeNull());
});

describe("readSeries", () => {
  it("takes a first row of text as names, trimmed", () => {
    const block = readSeries([[" a ", "b"], [1, 2], [3, 4]]); // prettier-ignore
    expect(block).toEqual({ names: ["a", "b"], hasHeader: true, rows: [[1, 2], [3, 4]], firstRow: 2, skipped: 0 }); // prettier-ignore
  });

  it("names columns y1 … without a header", () => {
    expect(readSeries([[1, 2]]).names).toEqual(["y1", "y2"]);
  });

  it("drops blank rows at both ends and tells where the first row stood", () => {
    const blank = [null, ""];
    const block = readSeries([blank, ["a", "b"], blank, blank, [1, 2], [3, 4], blank]);
    expect([block.firstRow, block.skipped, block.rows.length]).toEqual([5, 2, 2]);
    expect(readSeries([blank, [1, 2]])).toMatchObject({ firstRow: 2, skipped: 1, hasHeader: false });
  });

  it("keeps gaps where they are allowed", () => {
    expect(readSeries([[1], [null], [3]], "series", "allow").rows).toEqual([[1], [NaN], [3]]);
  });

  it("a text beside a number in the first row is a text cell, not a header", () => {
    expect(refusal(() => readSeries([["a", 2], [1, 2]]))).toEqual({ code: "not-a-number-cell", range: "series", name: "y1", row: 1, found: "text 'a'" }); // prettier-ignore
  });

  it.each<[string, unknown, IssueFacts]>([
    ["nothing", null, { code: "missing-argument", argument: "series" }],
    ["a header alone", [["a", "b"]], { code: "no-numbers", range: "series" }],
    ["a name twice", [["a", "a"], [1, 2]], { code: "header-twice", range: "series", name: "a" }],
    ["a name left out", [["a", null], [1, 2]], { code: "header-blank", range: "series", column: 2 }],
    ["a blank series", [["a", "b"], [1, null], [2, null]], { code: "blank-series", name: "b" }],
    ["a gap", [["a", "b"], [1, 2], [3, null], [5, 6]], { code: "gap", range: "series", name: "b", row: 3, allowable: false }],
    ["an error", [[1], [{ type: "Error", basicValue: "#N/A" }]], { code: "not-a-number-cell", range: "series", name: "y1", row: 2, found: "the error #N/A" }],
    ["a text number", [["a"], ["12"], [3]], { code: "not-a-number-cell", range: "series", name: "a", row: 2, found: "text '12'" }],
  ])("refuses %s", (_, raw, facts) => expect(refusal(() => readSeries(raw))).toEqual(facts)); // prettier-ignore

  it.each(["2024", "-1", "1,5", "1.234,56", "1 234", "5%", "1e5", " 7 "])("a header %j looks like a number", (text) => {
    expect(refusal(() => readSeries([["a", text], [1, 2]])).code).toBe("header-number");
  }); // prettier-ignore

  it.each(["y1", "Q1 2024", "2024-01", "north 5", "%", "e5", "1st"])("a header %j is a name", (text) => {
    expect(readSeries([["a", text], [1, 2]]).names).toEqual(["a", text]);
  }); // prettier-ignore

  it("a survey goes on after the first problem", () => {
    const { problems } = surveySeries([["a", "a"], [1, null], ["x", 2]]); // prettier-ignore
    expect(problems.map(({ code }) => code)).toEqual(["header-twice", "gap", "not-a-number-cell"]);
  });
});

describe("readDrivers", () => {
  const series = readSeries([["a"], [null], [1], [2], [3]]);

  it("stand beside the first body row of the series as passed", () => {
    expect(readDrivers([["x"], [9], [10], [20], [30], [40], [50]], series, 1).rows).toEqual([[10], [20], [30], [40]]); // prettier-ignore
    expect(readDrivers([[9], [10], [20], [30]], series, 0)).toEqual({ names: ["x1"], rows: [[10], [20], [30]] }); // prettier-ignore
  });

  it("none given", () => expect(readDrivers(null, series, 5)).toEqual({ names: [], rows: [] }));

  it.each<[string, unknown, IssueFacts]>([
    ["too few rows ahead", [["x"], [9], [10], [20], [30]], { code: "drivers-short", have: 3, need: 5, future: 2 }],
    ["a gap", [["x"], [9], [10], [null], [30], [40], [50]], { code: "gap", range: "drivers", name: "x", row: 4, allowable: false }],
    ["a text", [["x"], [9], [10], [20], ["?"], [40], [50]], { code: "not-a-number-cell", range: "drivers", name: "x", row: 5, found: "text '?'" }],
    ["a name that is a number", [["7"], [9], [10], [20]], { code: "header-number", range: "drivers", column: 1, text: "7" }],
  ])("refuses %s", (_, raw, facts) => expect(refusal(() => readDrivers(raw, series, 2))).toEqual(facts)); // prettier-ignore
});

it("ranges are left as they were", () => {
  const raw = frozen([["a", "b"], [1, 2], [3, 4]]); // prettier-ignore
  readDrivers(raw, readSeries(raw), 0);
});
