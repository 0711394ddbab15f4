import { describe, expect, it } from "vitest";
import { sparklinePath } from "../../taskpane/plots/sparkline";

describe("the small picture of a series", () => {
  it("runs from the lower left to the upper right for a rising pair", () => {
    expect(sparklinePath([1, 5])).toBe("M0.0 26.0L200.0 2.0");
  });

  it("breaks at a gap and begins anew behind it", () => {
    const path = sparklinePath([1, 2, NaN, 3, 4]);
    expect(path.match(/M/g)).toHaveLength(2);
    expect(path.match(/L/g)).toHaveLength(2);
  });

  it("runs along the middle for a series that never changes", () => {
    expect(sparklinePath([7, 7, 7])).toBe("M0.0 14.0L100.0 14.0L200.0 14.0");
  });

  it("is empty where there is no number", () => {
    expect(sparklinePath([NaN, NaN])).toBe("");
    expect(sparklinePath([])).toBe("");
  });
});
