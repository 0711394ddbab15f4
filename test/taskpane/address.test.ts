import { describe, expect, it } from "vitest";
import { columnLetters, formatAddress, isOnSheet, overlap, parseAddress } from "../../taskpane/address";

describe("addresses", () => {
  it.each([
    ["B4", { sheet: null, row: 3, column: 1, rows: 1, columns: 1 }],
    ["$B$4:E160", { sheet: null, row: 3, column: 1, rows: 157, columns: 4 }],
    ["Data!E160:B4", { sheet: "Data", row: 3, column: 1, rows: 157, columns: 4 }],
    ["'Cold ''n'' dry'!AA1", { sheet: "Cold 'n' dry", row: 0, column: 26, rows: 1, columns: 1 }],
  ])("%s is read", (address, region) => {
    expect(parseAddress(address)).toEqual(region);
  });

  it("whole columns are read as all rows, and written back as columns", () => {
    expect(parseAddress("Data!B:E")).toEqual({
      sheet: "Data",
      row: 0,
      column: 1,
      rows: 1_048_576,
      columns: 4,
    });
    for (const address of ["Data!B:E", "C:C"]) expect(formatAddress(parseAddress(address)!)).toBe(address);
  });

  it.each(["Q1", "R1C1", "rc", "2026", "Cold store", "C"])(
    "a sheet named %s is quoted, as a formula would misread it",
    (sheet) => {
      const region = { sheet, row: 3, column: 1, rows: 1, columns: 1 };
      expect(formatAddress(region)).toBe(`'${sheet}'!B4`);
      expect(parseAddress(`'${sheet}'!B4`)).toEqual(region);
    },
  );

  it("regions overlap when they share a cell of the same sheet", () => {
    const at = (address: string) => parseAddress(address)!;
    expect(overlap(at("Data!B4:E9"), at("Data!E9:F12"))).toBe(true);
    expect(overlap(at("Data!B4:E9"), at("Data!F4:F9"))).toBe(false);
    expect(overlap(at("Data!B4:E9"), at("Plan!B4:E9"))).toBe(false);
    expect(overlap(at("Data!B:E"), at("Data!E700"))).toBe(true);
    // capitals make no other sheet
    expect(overlap(at("Data!B:E"), at("data!E700"))).toBe(true);
    expect(overlap(at("B4:E9"), at("Data!B4"))).toBe(false);
  });

  it.each(["", "B", "4", "B0", "B4:C5:D6", "Data!", "ABCD1", "Data!A1,Data!C3", "'a b'!A1,'a b'!C3"])(
    "%s is no address of cells",
    (address) => {
      expect(parseAddress(address)).toBeNull();
    },
  );

  it.each([
    ["XFD1048576", true],
    ["XFC1:XFE9", false],
    ["A1048570:A1048577", false],
  ])("%s ends within a sheet: %s", (address, within) => {
    expect(isOnSheet(parseAddress(address)!)).toBe(within);
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
