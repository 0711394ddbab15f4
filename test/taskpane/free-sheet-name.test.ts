import { expect, it } from "vitest";
import { freeSheetName } from "../../taskpane/host/free-sheet-name";

it("a name that is free is taken as it is", () => {
  expect(freeSheetName("Workings", ["Data"])).toBe("Workings");
});

it("a taken name gets the first free number, whatever its case", () => {
  expect(freeSheetName("Data", ["data", "DATA 2"])).toBe("Data 3");
});

it("a long name is cut so that its number still fits", () => {
  const long = "Landings, ice, electricity and trips of the harbour";
  const first = freeSheetName(long, []);
  const second = freeSheetName(long, [first]);
  expect(first).toBe("Landings, ice, electricity and");
  expect(second).toBe("Landings, ice, electricity an 2");
});

it("signs that sheet names must not hold become blanks", () => {
  expect(freeSheetName("'Ice/2026 [t]'", [])).toBe("Ice 2026  t");
  expect(freeSheetName("???", [])).toBe("Sheet");
});
