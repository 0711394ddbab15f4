import { describe, expect, it } from "vitest";
import type { BandsRequest } from "../../src/core/forecast/bands";
import { ContentCache } from "../../src/engine/cache";
import { isHeavy } from "../../src/engine/cost";
import { Engine } from "../../src/engine/engine";
import { inSlices } from "../../src/engine/slices";
import { fakeWorkers } from "../support/fake-worker";
import { frozen } from "../support/frozen";
import { inventedSeries } from "../support/invented";
import { sampleOf, settingsOfOrder } from "../support/requests";

const bands = (changes: Partial<BandsRequest> = {}): BandsRequest =>
  frozen({
    sample: sampleOf(inventedSeries(156, 4)),
    plan: { kind: "fit", settings: settingsOfOrder(4, 2) },
    horizon: 12,
    point: "median",
    coverage: 0.95,
    joint: false,
    bands: "redrawn",
    draws: 1000,
    seed: 1,
    ...changes,
  });
const small = bands({ draws: 20 });
const heavy = bands();

describe("what is heavy", () => {
  it("a thousand redrawn samples are, twenty are not, other bands never", () => {
    expect(isHeavy("bands", heavy)).toBe(true);
    expect(isHeavy("bands", small)).toBe(false);
    expect(isHeavy("bands", bands({ bands: "fitted" }))).toBe(false);
  });

  it("a fit by likelihood is, a block fitted so is not", () => {
    const settings = settingsOfOrder(4, 2, { fit: "likelihood" });
    const { sample } = heavy;
    expect(isHeavy("fit", { sample, plan: { kind: "fit", settings } })).toBe(true);
    const model = new Engine().fit({ sample, plan: { kind: "fit", settings: settingsOfOrder(4, 2) } });
    expect(isHeavy("ahead", { sample, plan: { kind: "given", model: { ...model, settings } } })).toBe(false);
  });

  it("a plan with hundreds of imposed cells is, one with a few is not, however long", () => {
    const { sample, plan } = heavy;
    const held = (rows: number, cells: number) =>
      Array.from({ length: rows }, (_, j) => [j < cells ? 20 : NaN, NaN, NaN, NaN]);
    const asked = (imposed: number[][]) => ({ sample, plan, imposed, point: "median" });
    expect(isHeavy("whatIf", asked(held(300, 300)))).toBe(true);
    expect(isHeavy("whatIf", asked(held(12, 12)))).toBe(false);
    expect(isHeavy("whatIf", asked(held(10_000, 3)))).toBe(false);
  });

  it("requests without a model are not", () =>
    expect(isHeavy("lagCovariance", { series: [[1], [2]], lags: [1], divisor: "n" })).toBe(false));
});

describe("callers that can wait", () => {
  it("get what is cheap without any worker", async () => {
    const { open, opened } = fakeWorkers();
    const engine = new Engine(new ContentCache(), open);
    expect(await engine.start("bands", small)).toEqual(engine.run("bands", small));
    expect(opened).toEqual([]);
  });

  it("get heavy work from the worker, the same numbers as here, and once", async () => {
    const { open, opened } = fakeWorkers();
    const engine = new Engine(new ContentCache(), open);
    const asked = [engine.start("bands", heavy), engine.start("bands", structuredClone(heavy))];
    const [{ errands }] = opened;
    expect(errands.length).toBe(1);
    // what the worker does with an errand
    opened[0].answer({ result: new Engine().run(errands[0].task, errands[0].request as BandsRequest) });
    const here = new Engine().run("bands", heavy);
    for (const result of asked) expect(await result).toEqual(here);
    expect(await engine.start("bands", heavy)).toEqual(here);
    expect(errands.length).toBe(1);
  });

  it("that leave stop the work only when they were the last", async () => {
    const { open, opened } = fakeWorkers();
    const engine = new Engine(new ContentCache(), open);
    const [a, b] = [new AbortController(), new AbortController()];
    const first = engine.start("bands", heavy, { left: a.signal });
    const second = engine.start("bands", heavy, { left: b.signal });
    const gone = expect(first).rejects.toMatchObject({ facts: { code: "cancelled" } });
    a.abort();
    await gone;
    expect(opened[0].dismissed).toBe(false);
    const goneToo = expect(second).rejects.toMatchObject({ facts: { code: "cancelled" } });
    b.abort();
    await goneToo;
    expect(opened[0].dismissed).toBe(true);
    // whoever asks after that begins anew
    const third = engine.start("bands", heavy);
    await Promise.resolve();
    expect(opened[1].errands.length).toBe(1);
    opened[1].answer({ result: "anew" });
    expect(await third).toBe("anew");
  });

  it("that left before they asked are told so, and their work is given up", async () => {
    const { open, opened } = fakeWorkers();
    const engine = new Engine(new ContentCache(), open);
    const left = AbortSignal.abort();
    await expect(engine.start("bands", heavy, { left })).rejects.toMatchObject({ facts: { code: "cancelled" } });
    expect(opened.every(({ dismissed }) => dismissed)).toBe(true);
  });

  it("get refusals as they are, and these are not kept", async () => {
    const { open, opened } = fakeWorkers();
    const engine = new Engine(new ContentCache(), open);
    const refused = engine.start("bands", heavy);
    opened[0].answer({ issue: { code: "too-large" } });
    await expect(refused).rejects.toMatchObject({ facts: { code: "too-large" } });
    const again = engine.start("bands", heavy);
    opened[0].answer({ result: "now" });
    expect(await again).toBe("now");
  });

  it("are told in a preview that heavy work is left out, unless it is kept", async () => {
    const engine = new Engine();
    const preview = { preview: true };
    await expect(engine.start("bands", heavy, preview)).rejects.toMatchObject({ facts: { code: "not-in-preview" } });
    const kept = engine.run("bands", heavy);
    expect(await engine.start("bands", heavy, preview)).toBe(kept);
    expect(await engine.start("bands", small, preview)).toEqual(engine.run("bands", small));
  });
}); // prettier-ignore

describe("without a worker", () => {
  const here = new Engine().run("bands", heavy);

  it.each([
    ["where there is none", null],
    ["where it cannot be opened", () => { throw new Error("forbidden"); }],
  ] as const)("heavy work is done bit by bit: %s", async (_, open) => {
    const engine = new Engine(new ContentCache(), open);
    let turns = 0;
    const ticking = setInterval(() => turns++, 0);
    expect(await engine.start("bands", heavy)).toEqual(here);
    clearInterval(ticking);
    // the page had its turn in between
    expect(turns).toBeGreaterThan(0);
  }); // prettier-ignore

  it("work under way is given up at the next pause", async () => {
    const left = new AbortController();
    const engine = new Engine();
    const given = engine.start("bands", bands({ draws: 50_000 }), { left: left.signal });
    setTimeout(() => left.abort(), 30);
    const before = performance.now();
    await expect(given).rejects.toMatchObject({ facts: { code: "cancelled" } });
    expect(performance.now() - before).toBeLessThan(1000);
  });

  it("no slice runs on long after its time", async () => {
    let steps = 0;
    function* work(): Generator<undefined, string> {
      for (const end = performance.now() + 200; performance.now() < end;) {
        steps++;
        yield;
      }
      return "done";
    }
    let longest = 0;
    let last = performance.now();
    const watch = setInterval(() => {
      longest = Math.max(longest, performance.now() - last);
      last = performance.now();
    }, 0);
    expect(await inSlices(work(), new AbortController().signal)).toBe("done");
    clearInterval(watch);
    expect(steps).toBeGreaterThan(100);
    expect(longest).toBeLessThan(120);
  });
});
