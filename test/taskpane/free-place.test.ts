import { describe, expect, it } from "vitest";
import { freePlace } from "../../taskpane/free-place";
import type { SheetHost } from "../../taskpane/host/sheet-host";

/** A host with a block in B4:C9 and whatever else is put into the columns right of it. */
function hostWith(used: Record<number, unknown>): { host: SheetHost; asked: string[] } {
  const asked: string[] = [];
  const readBlock = (address: string) => {
    asked.push(address);
    const row = Array.from({ length: 60 }, (_, j) => used[j] ?? null);
    return Promise.resolve([row, new Array<unknown>(60).fill(null)]);
  };
  return { host: { readBlock } as unknown as SheetHost, asked };
}

describe("a free place beside a block", () => {
  it("leaves one blank column between where nothing is in the way", async () => {
    const { host, asked } = hostWith({});
    expect(await freePlace(host, "Data!B4:C9", { rows: 13, columns: 2 })).toBe("Data!E4");
    expect(asked).toEqual(["Data!D4:BK16"]);
  });

  it("goes past what is there, with a blank column on either side", async () => {
    // columns E and H are used: F:G is wide enough only without the blank columns
    const { host } = hostWith({ 1: "week", 4: 7 });
    expect(await freePlace(host, "Data!B4:C9", { rows: 3, columns: 2 })).toBe("Data!J4");
  });

  it("is not found where everything is full", async () => {
    const full = Object.fromEntries(Array.from({ length: 60 }, (_, j) => [j, 1]));
    expect(await freePlace(hostWith(full).host, "Data!B4:C9", { rows: 3, columns: 2 })).toBeNull();
  });

  it("does not look beyond the last column of a sheet", async () => {
    const { host, asked } = hostWith({});
    expect(await freePlace(host, "Data!XFA4:XFB9", { rows: 3, columns: 2 })).toBeNull();
    expect(asked).toEqual([]);
  });

  it("does not look below the last row of a sheet", async () => {
    const { host, asked } = hostWith({});
    expect(await freePlace(host, "Data!B1048570:C1048576", { rows: 13, columns: 2 })).toBeNull();
    expect(asked).toEqual([]);
  });
});
