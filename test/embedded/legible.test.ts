import { describe, expect, it } from "vitest";
import { legible } from "../../src/embedded/legible";

describe("a number at a legible length", () => {
  it.each([
    [0.1234567891, 0.123457],
    [-18.0123456789, -18.0123],
    [0.000000123456789, 1.23457e-7],
    [123456.789, 123457],
    [9876543.21, 9876543],
    [44928, 44928],
    [123456789, 123456789],
    [0, 0],
  ])("%d is shown as %d", (value, shown) => {
    expect(legible(value)).toBe(shown);
  });
});
