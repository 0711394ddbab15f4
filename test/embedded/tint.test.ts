import { describe, expect, it } from "vitest";
import { tint } from "../../src/embedded/tint";

const lightness = (rgb: string): number =>
  rgb
    .match(/\d+/g)!
    .map(Number)
    .reduce((a, b) => a + b);

describe("the tint of a correlation", () => {
  it("is none within the bound, on either side of zero", () => {
    for (const within of [0, 0.19, -0.19]) expect(tint(within, 0.19)).toBeNull();
  });

  it("is none where there is no number", () => {
    expect(tint(NaN, 0.2)).toBeNull();
    expect(tint(0.9, NaN)).toBeNull();
  });

  it("deepens with the size and tells the signs apart", () => {
    const [weak, strong] = [tint(0.3, 0.2)!, tint(0.9, 0.2)!];
    expect(lightness(strong)).toBeLessThan(lightness(weak));
    expect(tint(-0.9, 0.2)).not.toBe(strong);
  });

  it("never gets too dark for dark text", () => {
    for (const full of [tint(1, 0.01)!, tint(-1, 0.01)!]) expect(lightness(full)).toBeGreaterThan(3 * 140);
  });
});
