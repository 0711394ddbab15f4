import { describe, expect, it } from "vitest";
import { atDecimals, columnDecimals } from "../../src/embedded/column-decimals";

describe("the decimals of a column", () => {
  it.each([
    [[1, 0.905631, 0.639604], 5],
    [[138.037, 69.6414], 3],
    [[1, 2, 3], 0],
    [[], 0],
    [[0, 0], 0],
    [[1234567.8, 2.5], 2],
    // the smallest still shows three figures
    [[180.838, 0.0031], 5],
    // but not at any price
    [[180.838, 1e-9], 6],
  ])("of %j are %i", (values, decimals) => {
    expect(columnDecimals(values)).toBe(decimals);
  });

  it("are the same whatever the signs and the order", () => {
    expect(columnDecimals([-0.5, 12.25])).toBe(columnDecimals([12.25, 0.5]));
  });
});

describe("a number at so many decimals", () => {
  it("stands at them, zeros included", () => {
    expect(atDecimals(69.9, 3)).toBe("69.900");
    expect(atDecimals(0, 3)).toBe("0.000");
  });

  it("is never shown as nothing when it is something", () => {
    expect(atDecimals(1.23e-9, 6)).toBe("1.23e-9");
    expect(atDecimals(-4e-8, 3)).toBe("-4.00e-8");
  });
});
