import { describe, expect, it } from "vitest";
import { requireRows } from "../../../src/core/var/rows-needed";
import { plainShape } from "../../support/requests";
import { allLags } from "../../../src/core/var/settings";

const calendar = (order: number, cycle: number | null = null) => ({
  ...plainShape(4),
  cycle,
  lags: allLags(order),
});

describe("fits that would hold up the page", () => {
  it("20,000 rows with a season of 500 indicators are refused before anything is laid out", () => {
    expect(() => requireRows(calendar(1, 500), { rows: 20_000, series: 4, drivers: 0 })).toThrow("too-heavy");
  });

  it("twelve series, eight lags and a thousand rows pass, and so do three years of weeks with a season of weeks", () => {
    expect(() => requireRows(calendar(8), { rows: 1000, series: 12, drivers: 0 })).not.toThrow();
    expect(() => requireRows(calendar(2, 52), { rows: 156, series: 4, drivers: 0 })).not.toThrow();
  });

  it("many orders count together", () => {
    const extent = { rows: 20_000, series: 4, drivers: 0 };
    expect(() => requireRows(calendar(12), extent)).not.toThrow();
    expect(() => requireRows(calendar(12), extent, 13 / 3)).toThrow("too-heavy");
  });
});
