import { describe, expect, it, vi } from "vitest";
import { ContentCache } from "../../src/engine/cache";
import { Engine } from "../../src/engine/engine";
import { Issue } from "../../src/core/issue";
import { inventedSeries } from "../support/invented";
import { plainShape, sampleOf } from "../support/requests";

describe("the cache", () => {
  it("computes the same content once", () => {
    const cache = new ContentCache();
    const compute = vi.fn(() => [1, 2, 3]);
    expect(cache.get("a", compute)).toBe(cache.get("a", compute));
    expect(compute).toHaveBeenCalledTimes(1);
    cache.get("b", compute);
    expect(compute).toHaveBeenCalledTimes(2);
  });

  it("stays within its limit, the longest unused going first", () => {
    const cache = new ContentCache(40);
    const compute = vi.fn(() => "12345678"); // 1 + 10 characters each
    for (const key of ["a", "b", "c"]) cache.get(key, compute);
    cache.get("a", compute);
    cache.get("d", compute);
    expect(cache.size).toBeLessThanOrEqual(40);
    compute.mockClear();
    for (const key of ["a", "c", "d"]) cache.get(key, compute);
    expect(compute).not.toHaveBeenCalled();
    cache.get("b", compute);
    expect(compute).toHaveBeenCalledTimes(1);
  });

  it("stays within its limit over many calls", () => {
    const cache = new ContentCache(10_000);
    for (let i = 0; i < 2000; i++) {
      cache.get(`key ${i}`, () => "x".repeat(i % 500));
      expect(cache.size).toBeLessThanOrEqual(10_000);
    }
    expect(cache.size).toBeGreaterThan(5_000);
  });

  it("does not keep what is larger than all of it", () => {
    const cache = new ContentCache(10);
    const compute = vi.fn(() => "x".repeat(100));
    cache.get("a", compute);
    cache.get("a", compute);
    expect(compute).toHaveBeenCalledTimes(2);
    expect(cache.size).toBe(0);
  });

  it("does not keep an error", () => {
    const cache = new ContentCache();
    let calls = 0;
    const compute = () => {
      if (++calls === 1) throw new Error("first");
      return calls;
    };
    expect(() => cache.get("a", compute)).toThrow("first");
    expect(cache.get("a", compute)).toBe(2);
    expect(cache.get("a", compute)).toBe(2);
  });
});

describe("the engine", () => {
  const sample = sampleOf(inventedSeries(60, 2));
  const plan = { kind: "auto", shape: plainShape(2), criterion: "aicc", maxOrder: null } as const;

  it("fits once for a forecast and its bands", () => {
    const cache = new ContentCache();
    const engine = new Engine(cache);
    const get = vi.spyOn(cache, "get");
    const own = engine.fit({ sample, plan });
    const request = { sample, plan, horizon: 3, point: "median" } as const;
    engine.run("ahead", request);
    engine.run("bands", { ...request, coverage: 0.9, joint: false, bands: "fitted", draws: 1000, seed: 1 });
    const fits = get.mock.calls.filter(([content]) => content.startsWith("fit "));
    expect(fits.length).toBe(3);
    expect(new Set(fits.map(([content]) => content)).size).toBe(1);
    // the very record, not one computed anew
    expect(engine.fit({ sample, plan })).toBe(own);
  });

  it("equal content is the same request, however it was built", () => {
    const engine = new Engine();
    const lags = { series: inventedSeries(60, 2), lags: [1], divisor: "n" } as const;
    const first = engine.run("lagCovariance", lags);
    expect(engine.run("lagCovariance", structuredClone(lags))).toBe(first);
    expect(engine.run("lagCovariance", { ...lags, lags: [2] })).not.toEqual(first);
    expect(engine.run("lagCorrelation", lags)).not.toEqual(first);
  });

  it("a gap is not a zero", () => {
    const engine = new Engine();
    const plan_ = [[{ kind: "diff", span: 1 } as const]];
    const gap = engine.run("steps", { series: [[1], [NaN], [3]], plan: plan_ });
    expect(engine.run("steps", { series: [[1], [0], [3]], plan: plan_ })).not.toEqual(gap);
  });

  it("a refusal is not kept but thrown again", () => {
    const engine = new Engine();
    const request = { series: [[1], [2]], lags: [5], divisor: "n" } as const;
    for (let i = 0; i < 2; i++) expect(() => engine.run("lagCovariance", request)).toThrow(Issue);
  });
});
