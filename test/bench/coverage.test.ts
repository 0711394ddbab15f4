import { describe, expect, it } from "vitest";
import recorded from "./coverage.json";

/** The recorded figures of the coverage study; `coverage.ts` computes them, which takes minutes. */
describe("nominal 90 % bands on 2,000 simulated series", () => {
  const promised = recorded.results.filter((result) => result.promised && result.bands !== "known");

  it("cover what is promised: both kinds by least squares, and fitted ones by likelihood with gaps and with a moving average", () =>
    expect(promised.map(({ bands, design }) => [bands, design.includes("likelihood")])).toEqual([
      ["fitted", false],
      ["redrawn", false],
      ["fitted", true],
      ["fitted", true],
    ]));

  it.each(promised)("$bands: $design hold 88 to 92 of 100 at every row ahead", (result) => {
    for (const share of result["inside, rows 1 to 8 ahead"]) {
      expect(share).toBeGreaterThanOrEqual(88);
      expect(share).toBeLessThanOrEqual(92);
    }
  });
});
