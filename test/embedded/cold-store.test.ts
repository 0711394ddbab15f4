import { describe, expect, it } from "vitest";
import { blemishedWeeks, coldStoreWeeks, SERIES, WEEKS } from "../../src/embedded/demo/cold-store";

const column = (rows: readonly (readonly number[])[], k: number): number[] => rows.map((row) => row[k]);

/** Correlation of a series now with another some rows earlier, both less their value a year before. */
function correlation(now: number[], earlier: number[], lag: number): number {
  const yearly = (x: number[]) => x.slice(52).map((value, t) => value - x[t]);
  const a = yearly(now).slice(lag);
  const b = yearly(earlier).slice(0, a.length);
  const centred = (x: number[]) => {
    const mean = x.reduce((sum, v) => sum + v, 0) / x.length;
    return x.map((v) => v - mean);
  };
  const dot = (x: number[], y: number[]) => x.reduce((sum, v, t) => sum + v * y[t], 0);
  const [x, y] = [centred(a), centred(b)];
  return dot(x, y) / Math.sqrt(dot(x, x) * dot(y, y));
}

describe("the invented cold store", () => {
  it("is the same on every machine", () => {
    const weeks = coldStoreWeeks();
    expect(weeks).toHaveLength(WEEKS);
    expect(weeks[0]).toEqual([155.8, 69.9, 109.6, 52]);
    expect(coldStoreWeeks()).toEqual(weeks);
  });

  it.each([
    ["ice", [0, 1]],
    ["electricity", [1]],
    ["trips", [2]],
  ])("lets landings lead %s by %j weeks, more than by any other lag up to 4", (name, leads) => {
    const weeks = coldStoreWeeks();
    const follower = column(weeks, SERIES.indexOf(name as "ice"));
    const byLag = [0, 1, 2, 3, 4].map((lag) => correlation(follower, column(weeks, 0), lag));
    const strongest = byLag.indexOf(Math.max(...byLag));
    expect(leads).toContain(strongest);
  });

  it("differs from its blemished copy in four cells and one date", () => {
    const { dates, cells } = blemishedWeeks();
    const clean = coldStoreWeeks();
    const changed = cells.flatMap((row, t) =>
      row.flatMap((cell, k) => (cell === clean[t][k] ? [] : [[t, k]])),
    );
    expect(changed).toEqual([
      [22, 1],
      [47, 2],
      [80, 0],
      [101, 3],
    ]);
    expect(new Set(dates).size).toBe(WEEKS - 1);
    expect(Number(cells[80][0])).toBe(clean[80][0]);
  });
});
