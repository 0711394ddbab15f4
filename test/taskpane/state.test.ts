import { describe, expect, it } from "vitest";
import { readSelection } from "../../taskpane/reading";
import {
  faultyWish,
  forecastFormula,
  forecastRegion,
  initialState,
  isClean,
  meaningOf,
  placeOf,
  type PaneState,
  type Wishes,
} from "../../taskpane/state";

const cells = [
  ["landings", "ice"],
  [1, 4],
  [2, 3],
  [5, 9],
];
const block = { address: "Data!B4:C7", reading: readSelection(cells, "Data!B4:C7"), free: null };
const state: PaneState = { ...initialState, block };
const wishing = (wishes: Partial<Wishes>): Wishes => ({ ...initialState.wishes, ...wishes });

describe("what a selection means", () => {
  it("several cells are a block", () => {
    expect(meaningOf("Data!B4:C7", initialState)).toBe("block");
    expect(meaningOf("Data!B:C", initialState)).toBe("block");
  });

  it("a single cell is nothing as long as no block is held", () => {
    expect(meaningOf("Data!G4", initialState)).toBe("nothing");
  });

  it("a single cell outside the block held is a place; inside it, or on another sheet, it is nothing", () => {
    expect(meaningOf("Data!G4", state)).toBe("place");
    expect(meaningOf("Data!B5", state)).toBe("nothing");
    expect(meaningOf("Plan!G4", state)).toBe("nothing");
  });

  it("the place already chosen is no news", () => {
    expect(meaningOf("Data!G9", { ...state, place: "Data!G9" })).toBe("nothing");
  });

  it("what is no address is nothing", () => {
    expect(meaningOf("Data!A1,Data!C3", state)).toBe("nothing");
  });
});

describe("where the forecast goes", () => {
  it("is proposed beside the block with one column between, or where it was found free", () => {
    expect(placeOf(state)).toBe("Data!E4");
    expect(placeOf({ ...state, block: { ...block, free: "Data!M4" } })).toBe("Data!M4");
    expect(placeOf({ ...state, place: "Plan!A1" })).toBe("Plan!A1");
  });

  it("takes a row more than the horizon when names go along", () => {
    expect(forecastRegion(state)).toEqual({ sheet: "Data", row: 3, column: 4, rows: 13, columns: 2 });
    const bare = { ...block, reading: readSelection(cells.slice(1), "Data!B5:C7") };
    expect(forecastRegion({ ...state, block: bare })).toMatchObject({ rows: 12, columns: 2 });
  });

  it("is no region when what was typed is no single cell", () => {
    expect(forecastRegion({ ...state, place: "somewhere" })).toBeNull();
    expect(forecastRegion({ ...state, place: "G4:H5" })).toBeNull();
  });
});

describe("the formula", () => {
  it("needs no sheet's name on the same sheet, and has it on another", () => {
    expect(forecastFormula(state)).toBe("=COMOVE.AHEAD(B4:C7,12)");
    expect(forecastFormula({ ...state, place: "G9" })).toBe("=COMOVE.AHEAD(B4:C7,12)");
    expect(forecastFormula({ ...state, place: "Plan!A1" })).toBe("=COMOVE.AHEAD(Data!B4:C7,12)");
  });

  it("carries the season, with its waves when they are given", () => {
    const season = { ...state, wishes: wishing({ cycle: 12 }) };
    expect(forecastFormula(season)).toBe('=COMOVE.AHEAD(B4:C7,12,,"cycle=12")');
    const waves = { ...state, wishes: wishing({ cycle: 52, waves: 2 }) };
    expect(forecastFormula(waves)).toBe('=COMOVE.AHEAD(B4:C7,12,,"cycle=52; waves=2")');
  });

  it("keeps whole columns as they were selected", () => {
    const columns = { ...state, block: { ...block, address: "Data!B:C" } };
    expect(forecastFormula(columns)).toBe("=COMOVE.AHEAD(B:C,12)");
  });
});

describe("wishes", () => {
  it.each<[Partial<Wishes>, keyof Wishes | null]>([
    [{}, null],
    [{ horizon: 0 }, "horizon"],
    [{ horizon: 2.5 }, "horizon"],
    [{ horizon: NaN }, "horizon"],
    [{ horizon: 10_001 }, "horizon"],
    [{ cycle: 1 }, "cycle"],
    [{ cycle: NaN }, "cycle"],
    [{ cycle: 12, waves: 6 }, null],
    [{ cycle: 12, waves: 7 }, "waves"],
    // without a season its waves do not matter
    [{ waves: 7 }, null],
  ])("%j: at fault is %s", (wishes, faulty) => {
    expect(faultyWish(wishing(wishes))).toBe(faulty);
  });
});

it("only a block with series and nothing to mend is clean", () => {
  expect(isClean(block)).toBe(true);
  expect(isClean({ reading: readSelection([["a"], ["x"]], "A1:A2") })).toBe(false);
  expect(isClean({ reading: readSelection([[null]], "A1") })).toBe(false);
});
