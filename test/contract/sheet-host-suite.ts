import { beforeAll, describe, expect, it } from "vitest";
import type { SheetHost } from "../../taskpane/host/sheet-host";

/** A host under test, and the one thing only a user does. */
export interface HostUnderTest {
  readonly host: SheetHost;
  select(address: string): Promise<void>;
}

/**
 * What the pane relies on, whatever spreadsheet is behind it. The workbook has blank sheets "Work" and "Cold store".
 */
export function sheetHostContract(name: string, open: () => Promise<HostUnderTest>): void {
  describe(`the pane's host in ${name}`, () => {
    let host: SheetHost;
    let select: HostUnderTest["select"];
    beforeAll(async () => {
      ({ host, select } = await open());
    });

    it("tells the selected address with the sheet's name, quoted where it must be", async () => {
      await select("Work!B4:E6");
      expect(await host.selectedAddress()).toBe("Work!B4:E6");
      await select("'Cold store'!C3");
      expect(await host.selectedAddress()).toBe("'Cold store'!C3");
    });

    it("selects a region and brings its sheet in front", async () => {
      await host.select("'Cold store'!B2:C9");
      await settled(async () => expect(await host.selectedAddress()).toBe("'Cold store'!B2:C9"));
      await host.select("Work!A1");
      await settled(async () => expect(await host.selectedAddress()).toBe("Work!A1"));
    });

    it("writes a formula that computes", async () => {
      await host.writeFormulas("Work!A1:B1", [["=1+2", "=20+22"]]);
      await settled(async () => expect(await host.readBlock("Work!A1:B1")).toEqual([[3, 42]]));
    });

    it.each(["=1+1", "+1", "-1", "@now", "'quoted'", "plain words"])(
      "writes the label %s as text, never as a formula",
      async (label) => {
        await host.writeLabels("Work!A3", [[label]]);
        await settled(async () => expect(await host.readBlock("Work!A3")).toEqual([[label]]));
      },
    );

    it("tells numbers, texts, blanks and errors apart, each in its place", async () => {
      await host.writeFormulas("Work!D10", [["=5+6"]]);
      await host.writeLabels("Work!F11", [["n/a"]]);
      await host.writeFormulas("Work!D12", [["=NA()"]]);
      await settled(async () =>
        expect(await host.readBlock("Work!D9:F12")).toEqual([
          [null, null, null],
          [11, null, null],
          [null, null, "n/a"],
          [{ type: "Error", basicValue: "#N/A" }, null, null],
        ]),
      );
    });

    it("reads a whole column from its first row on", async () => {
      await host.writeLabels("Work!M2", [["high"]]);
      await host.writeLabels("Work!N5", [["deep"]]);
      await settled(async () => {
        const column = await host.readBlock("Work!M:N");
        expect(column.slice(0, 5)).toEqual([
          [null, null],
          ["high", null],
          [null, null],
          [null, null],
          [null, "deep"],
        ]);
        expect(
          column
            .slice(5)
            .flat()
            .every((cell) => cell === null),
        ).toBe(true);
      });
    });

    it("reads a blank region as rows of blanks of its width", async () => {
      const block = await host.readBlock("Work!H30:J35");
      expect(block.length).toBeGreaterThan(0);
      for (const row of block) expect(row).toEqual([null, null, null]);
    });

    it("counts what lies in a region and names the first cell", async () => {
      await host.writeLabels("'Cold store'!C5:D5", [["a", "b"]]);
      await settled(async () =>
        expect(await host.contents("'Cold store'!B4:E8")).toEqual({ filled: 2, first: "C5" }),
      );
      expect(await host.contents("'Cold store'!F4:G8")).toEqual({ filled: 0, first: null });
    });

    it("counts a formula that shows nothing: it is in the way all the same", async () => {
      await host.writeFormulas("'Cold store'!G20", [['=""']]);
      await settled(async () =>
        expect(await host.contents("'Cold store'!F19:H21")).toEqual({ filled: 1, first: "G20" }),
      );
    });

    it("adds a sheet, under another name when the one asked for is taken", async () => {
      expect(await host.addSheet("Workings")).toBe("Workings");
      expect(await host.addSheet("workings")).toBe("workings 2");
      expect(await host.selectedAddress()).toMatch(/^Work!/);
      await host.writeLabels("'workings 2'!A1", [["here"]]);
      await settled(async () => expect(await host.readBlock("'workings 2'!A1")).toEqual([["here"]]));
    });

    it("names a range that formulas can use", async () => {
      await host.writeFormulas("Work!A20", [["=30+12"]]);
      await settled(async () => expect(await host.readBlock("Work!A20")).toEqual([[42]]));
      await host.nameRange("catch_total", "Work!A20");
      await host.writeFormulas("Work!B20", [["=catch_total"]]);
      await settled(async () => expect(await host.readBlock("Work!B20")).toEqual([[42]]));
    });

    it("moves a name that is already there", async () => {
      await host.writeFormulas("Work!A21", [["=40+17"]]);
      await settled(async () => expect(await host.readBlock("Work!A21")).toEqual([[57]]));
      await host.nameRange("catch_total", "Work!A21");
      await host.writeFormulas("Work!B21", [["=catch_total"]]);
      await settled(async () => expect(await host.readBlock("Work!B21")).toEqual([[57]]));
    });

    it("hears of a new selection until it stops listening", async () => {
      await select("Work!A1");
      let heard = 0;
      const stop = host.onSelectionChanged(() => void heard++);
      // listening may begin a moment after it was asked for
      await settled(async () => {
        await select("Work!B2:C3");
        await select("Work!A1");
        expect(heard).toBeGreaterThan(0);
      });
      await stop();
      await select("Work!A1");
      const after = heard;
      await select("Work!D4");
      await new Promise((wait) => setTimeout(wait, 200));
      expect(heard).toBe(after);
    });

    it("gives back what the work inside one undo step gives", async () => {
      expect(await host.oneUndoStep(() => Promise.resolve(7))).toBe(7);
    });

    it("draws a chart, or says beforehand that it cannot", async () => {
      const drawing = host.addChart({ address: "Work!A1:B1", title: "Landings", at: "Work!D1" });
      if (host.canChart) await expect(drawing).resolves.toBeUndefined();
      else await expect(drawing).rejects.toThrow("draws no charts");
    });
  });
}

/** A spreadsheet computes in its own time: asks again until the fact holds, and shows the last failure otherwise. */
const settled = (fact: () => Promise<void> | void): Promise<void> =>
  expect
    .poll(
      async () => {
        await fact();
        return true;
      },
      { timeout: 10_000 },
    )
    .toBe(true) as unknown as Promise<void>;
