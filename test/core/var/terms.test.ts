import { describe, expect, it } from "vitest";
import type { Matrix } from "../../../src/core/matrix";
import type { Calendar, Terms } from "../../../src/core/var/settings";
import { termNames, termRow, termShift, termValue } from "../../../src/core/var/terms";
import { close } from "../../support/close";

const calendars: Calendar[] = (["none", "constant", "trend", "quadratic"] as Terms[]).flatMap((terms) => [
  { terms, cycle: null, waves: null },
  ...[2, 3, 4, 7, 12].flatMap((cycle) => [
    { terms, cycle, waves: null },
    ...Array.from({ length: Math.floor(cycle / 2) }, (_, i) => ({ terms, cycle, waves: i + 1 })),
  ]),
]);
const told = ({ terms, cycle, waves }: Calendar) => `${terms}, cycle ${cycle}, waves ${waves}`;
const apply = (s: Matrix, d: readonly number[]) =>
  s.map((row) => row.reduce((sum, v, i) => sum + v * d[i], 0));

describe("terms of a season of four, by hand", () => {
  it("season j is ¾ in its own rows and −¼ in the others", () => {
    const calendar: Calendar = { terms: "none", cycle: 4, waves: null };
    expect([1, 2, 3, 4, 5].map((t) => termRow(calendar, t))).toEqual([
      [0.75, -0.25, -0.25],
      [-0.25, 0.75, -0.25],
      [-0.25, -0.25, 0.75],
      [-0.25, -0.25, -0.25],
      [0.75, -0.25, -0.25],
    ]);
  });

  it("waves are sine and cosine pairs, the last sine dropped at half the season", () => {
    const calendar: Calendar = { terms: "trend", cycle: 4, waves: 2 };
    expect(termNames(calendar)).toEqual([
      { kind: "constant" },
      { kind: "trend", power: 1 },
      { kind: "wave", wave: 1, part: "sin" },
      { kind: "wave", wave: 1, part: "cos" },
      { kind: "wave", wave: 2, part: "cos" },
    ]);
    // a cosine of a right angle is zero only to rounding
    close(termRow(calendar, 1), [1, 1, 1, 0, -1], { atol: 1e-15 });
    close(termRow(calendar, 2), [1, 2, 0, -1, 1], { atol: 1e-15 });
  });
});

describe("every calendar", () => {
  it.each(calendars.map((calendar) => [told(calendar), calendar] as const))(
    "%s: terms read j rows back are S(j) times the terms now",
    (_, calendar) => {
      for (const j of [0, 1, 2, 5, 13]) {
        const shift = termShift(calendar, j);
        // values that are zero on paper come from differences of ones
        for (const t of [1, 4, 9, 25])
          close(apply(shift, termRow(calendar, t)), termRow(calendar, t - j), { rtol: 1e-12, atol: 1e-11 });
      }
    },
  );

  it.each(calendars.filter(({ cycle }) => cycle !== null).map((c) => [told(c), c] as const))(
    "%s: seasonal terms add up to zero over a season and repeat",
    (_, calendar) => {
      const cycle = calendar.cycle!;
      const seasonal = termNames(calendar).filter(({ kind }) => kind === "season" || kind === "wave");
      for (const name of seasonal) {
        const values = Array.from({ length: cycle }, (__, i) => termValue(name, i + 1, cycle));
        expect(Math.abs(values.reduce((a, b) => a + b, 0))).toBeLessThan(1e-12);
        // the angle is reduced before the sine, so that far rows are as exact as near ones
        expect(termValue(name, 1 + 1_000_000 * cycle, cycle)).toBe(values[0]);
      }
    },
  );

  it("all waves of a season carry as much as its indicators", () => {
    for (const cycle of [2, 3, 4, 7, 12]) {
      const waves = termNames({ terms: "none", cycle, waves: Math.floor(cycle / 2) });
      expect(waves.length).toBe(cycle - 1);
    }
  });
});
