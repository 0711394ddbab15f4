import { describe, expect, it } from "vitest";
import { columnLetters, formatAddress, parseAddress } from "../../taskpane/address";

describe("addresses", () => {
  it.each([
    ["B4", { sheet: null, row: 3, column: 1, rows: 1, columns: 1 }],
    ["$B$4:E160", { sheet: null, row: 3, column: 1, rows: 157, columns: 4 }],
    ["Data!E160:B4", { sheet: "Data", row: 3, column: 1, rows: 157, columns: 4 }],
    ["'Cold ''n'' dry'!AA1", { sheet: "Cold 'n' dry", row: 0, column: 26, rows: 1, columns: 1 }],
  ])("%s is read", (address, region) => {
    expect(parseAddress(address)).toEqual(region);
  });

  it.each(["", "B", "4", "B0", "B4:C5:D6", "Data!", "ABCD1"])("%s is no address of cells", (address) => {
    expect(parseAddress(address)).toBeNull();
  });

  it("writing is the inverse of reading", () => {
    for (const address of ["B4", "B4:E160", "Data!A1", "'Cold store'!AZ10:BA11", "'it''s'!XFD1048576"]) {
      expect(formatAddress(parseAddress(address)!)).toBe(address);
    }
  });

  it("letters count on after Z and ZZ", () => {
    expect([0, 25, 26, 701, 702].map(columnLetters)).toEqual(["A", "Z", "AA", "ZZ", "AAA"]);
  });
});
