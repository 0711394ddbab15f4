import { describe, expect, it } from "vitest";
import { paneWords as words } from "../../src/texts/en";
import type { Contents, SheetHost } from "../../taskpane/host/sheet-host";
import { readSelection } from "../../taskpane/reading";
import { initialState, type PaneState } from "../../taskpane/state";
import { writeForecast } from "../../taskpane/write-forecast";
import { frozen } from "../support/frozen";

const cells = frozen([
  ["landings", "ice"],
  [1, 4],
  [2, 3],
  [5, 9],
]);

const BLANK: Contents = { filled: 0, first: null };

/** A host that holds one block, and keeps what is asked of it. */
function hostWith({ block = cells as unknown[][], contents = BLANK, undoesAtOnce = true } = {}) {
  const asked: string[] = [];
  const written: [string, string][] = [];
  let steps = 0;
  const host: Partial<SheetHost> = {
    undoesAtOnce,
    readBlock: () => Promise.resolve(block),
    contents: (address) => {
      asked.push(address);
      return Promise.resolve(contents);
    },
    writeFormulas: (address, [[formula]]) => {
      written.push([address, formula]);
      return Promise.resolve();
    },
    oneUndoStep: (work) => {
      steps++;
      return work();
    },
  };
  return { host: host as SheetHost, asked, written, steps: () => steps };
}

const stateAt = (place: string | null, address = "Data!B4:C7"): PaneState =>
  frozen({
    ...initialState,
    block: { address, reading: readSelection(cells, address), free: null },
    place,
  });

describe("writing the forecast", () => {
  it("looks at every cell it will fill, then writes one formula in one undo step, and says where", async () => {
    const { host, asked, written, steps } = hostWith();
    const changes = await writeForecast(host, stateAt(null));
    expect(asked).toEqual(["Data!E4:F16"]);
    expect(written).toEqual([["Data!E4", "=COMOVE.AHEAD(B4:C7,12)"]]);
    expect(steps()).toBe(1);
    expect(changes).toEqual({
      place: "Data!E4",
      notice: { kind: "done", text: words.written("E4", 13, 2) },
    });
  });

  it("says so where undo goes step by step", async () => {
    const { notice } = await writeForecast(hostWith({ undoesAtOnce: false }).host, stateAt(null));
    expect(notice!.text).toContain(words.undoSteps);
  });

  it("names the data's sheet when it writes on another", async () => {
    const { host, written } = hostWith();
    await writeForecast(host, stateAt("'Next year'!A1"));
    expect(written).toEqual([["'Next year'!A1", "=COMOVE.AHEAD(Data!B4:C7,12)"]]);
  });

  it.each([
    ["no cell", "somewhere", words.badPlace("somewhere")],
    ["the data", "C6", words.inTheWay],
    ["the data, their sheet typed without capitals", "data!C6", words.inTheWay],
    ["beyond the last column", "XFD4", words.overTheEdge],
    ["beyond the last row", "E1048570", words.overTheEdge],
  ])("refuses a place that is %s, and touches nothing", async (_, place, text) => {
    const { host, asked, written } = hostWith();
    expect(await writeForecast(host, stateAt(place))).toEqual({ notice: { kind: "refused", text } });
    expect([...asked, ...written]).toEqual([]);
  });

  it("refuses a blank cell of whole columns that it reads: the formula would read itself", async () => {
    const { host, written } = hostWith();
    const { notice } = await writeForecast(host, stateAt("data!B500", "Data!B:C"));
    expect(notice).toEqual({ kind: "refused", text: words.inTheWay });
    expect(written).toEqual([]);
  });

  it("refuses where something lies in the way, and names the first cell", async () => {
    const { host, written } = hostWith({ contents: { filled: 3, first: "F9" } });
    const { notice } = await writeForecast(host, stateAt(null));
    expect(notice).toEqual({ kind: "refused", text: words.occupied(3, "F9") });
    expect(written).toEqual([]);
  });

  it("reads the data again, and refuses when they need mending by now", async () => {
    const { host, written } = hostWith({ block: [...cells.slice(0, 3), [5, "n/a"]] });
    const { block, notice } = await writeForecast(host, stateAt(null));
    expect(notice).toEqual({ kind: "refused", text: words.changed });
    expect(block!.reading.problems).toHaveLength(1);
    expect(written).toEqual([]);
  });

  it("refuses wishes that are no forecast, before it asks anything of the sheet", async () => {
    const { host, asked } = hostWith();
    const state = { ...stateAt(null), wishes: { ...initialState.wishes, horizon: 0 } };
    expect((await writeForecast(host, state)).notice).toEqual({
      kind: "refused",
      text: words.faulty.horizon,
    });
    expect(asked).toEqual([]);
  });
});
