import { describe, expect, it } from "vitest";
import { Issue, type IssueFacts } from "../../src/core/issue";
import { OPTIONS, parseNumber, type OptionKey } from "../../src/sheet/option-specs";
import { readOptions } from "../../src/sheet/options";
import { readHorizon, readLags, readWhole } from "../../src/sheet/scalars";
import { formatSteps, parseSteps, spreadSteps } from "../../src/sheet/steps-text";

const every = Object.keys(OPTIONS) as OptionKey[];
const read = (raw: unknown, keys = every) => readOptions(raw, "CALL", keys);
function refusal(call: () => unknown): IssueFacts {
  try {
    call();
  } catch (thrown) {
    if (thrown instanceof Issue) return thrown.facts;
    throw thrown;
  }
  throw new Error("nothing was refused");
}

describe("options", () => {
  it("none given, none read", () => {
    for (const raw of [null, undefined, "", "  ", ";;", [[null, null]], []]) expect(read(raw)).toEqual({});
  });

  it.each<[string, OptionKey, unknown]>([
    ["terms=Trend", "terms", "trend"],
    ["cycle= 12", "cycle", 12],
    ["cycle=none", "cycle", null],
    ["cycle=12.0", "cycle", 12],
    ["coverage=0,9", "coverage", 0.9],
    ["coverage=.5", "coverage", 0.5],
    ["coverage=9e-1", "coverage", 0.9],
    ["uselags=12 1, 2", "uselags", [1, 2, 12]],
    ["uselags=all", "uselags", null],
    ["steps=LOG , diff 12", "steps", [[{ kind: "log" }, { kind: "diff", span: 12 }]]],
    ["labels=YES", "labels", "yes"],
    ["divisor=N-K", "divisor", "n-k"],
    ["maxorder=0", "maxorder", 0],
  ])("%s", (text, key, value) => expect(read(text)).toEqual({ [key]: value }));

  it("a two-column range may hold numbers and logical values", () => {
    expect(read([["Cycle", 12], ["joint", true], ["labels", false], ["coverage", 0.9]])).toEqual({
      cycle: 12, joint: "yes", labels: "no", coverage: 0.9,
    });
  }); // prettier-ignore

  it.each<[string, unknown, Partial<IssueFacts>]>([
    ["an unknown key", "speed=3", { code: "unknown-option", key: "speed" }],
    ["a key of every object", "constructor=3", { code: "unknown-option", key: "constructor" }],
    ["a key given twice", "cycle=4; CYCLE=5", { code: "option-twice", key: "cycle" }],
    ["a key without value", "cycle=", { code: "option-without-value", text: "text 'cycle='" }],
    ["a text that is no pair", "trend", { code: "option-without-value", text: "text 'trend'" }],
    ["a number", 3, { code: "option-without-value", text: "3" }],
    ["three columns", [["terms", "trend", 1]], { code: "bad-range-options", columns: 3 }],
    ["a range row without key", [[null, 4]], { code: "option-without-value", text: "a blank cell" }],
    ["a value out of range", "coverage=1", { code: "bad-option", key: "coverage", found: "text '1'" }],
    ["a half season", "cycle=2.5", { code: "bad-option", key: "cycle" }],
    ["a lag twice", "uselags=1 1", { code: "bad-option", key: "uselags" }],
    ["lag 0", "uselags=0 1", { code: "bad-option", key: "uselags" }],
    ["a number beyond range", "coverage=1e999", { code: "bad-option", key: "coverage" }],
    ["an error as value", [["terms", { type: "Error", basicValue: "#N/A" }]], { code: "bad-option", found: "the error #N/A" }],
  ])("refuses %s", (_, raw, facts) => expect(refusal(() => read(raw))).toMatchObject(facts)); // prettier-ignore

  it("a key of another call is refused, and this call's keys are named", () => {
    expect(refusal(() => read("coverage=0.9", ["terms", "labels"]))).toEqual({
      code: "option-not-here",
      key: "coverage",
      call: "CALL",
      allowed: ["terms", "labels"],
    });
  });

  it("every option says what it allows, and refuses nonsense", () => {
    for (const key of every) {
      expect(OPTIONS[key].allowed.kind).toMatch(/^(one-of|whole|number|number-from|list)$/);
      for (const text of ["nonsense", "-7", "1e999", "=", "{}"])
        expect(OPTIONS[key].parse(text)).toBeUndefined();
    }
  });

  it("a word listed as allowed is allowed", () => {
    for (const key of every) {
      const { allowed } = OPTIONS[key];
      if (allowed.kind === "one-of") for (const v of allowed.values) expect(OPTIONS[key].parse(v)).toBe(v);
    }
  });
});

describe("numbers in text", () => {
  it.each([["1", 1], ["-1.5", -1.5], ["+2,5", 2.5], [".5", 0.5], [",5", 0.5], ["5.", 5], ["1e3", 1000]] as const)("%s", (text, value) =>
    expect(parseNumber(text)).toBe(value)); // prettier-ignore
  it.each(["", "1.2.3", "1,2,3", "0x10", "1e", "--1", "1 2", "NaN", "Infinity", "1e999", "5%"])("%j is none", (text) =>
    expect(parseNumber(text)).toBeUndefined()); // prettier-ignore
});

describe("scalars", () => {
  it("a horizon is a whole number from 1 to 10,000", () => {
    expect([1, [[10_000]], { type: "Double", basicValue: 7 }].map(readHorizon)).toEqual([1, 10_000, 7]);
    for (const bad of [0, -1, 1.5, 10_001, "3", true, [[1, 2]], 1e300])
      expect(refusal(() => readHorizon(bad))).toMatchObject({ code: "bad-argument", argument: "horizon" });
    expect(refusal(() => readHorizon(null))).toEqual({ code: "missing-argument", argument: "horizon" });
  });

  it("a whole number beyond exact ones is refused", () => {
    expect(refusal(() => readWhole(1e16, "maxorder", 0, null)).code).toBe("bad-argument");
  });

  it("one number of lags means 0 to it, several mean themselves", () => {
    expect(readLags(2, 10)).toEqual([0, 1, 2]);
    expect(readLags([[0]], 10)).toEqual([0]);
    expect(readLags([[3, -3], [null, 3]], 10)).toEqual([3, -3, 3]); // prettier-ignore
    for (const bad of [10, -1, [[1, 10]], [[1, -10]], [[1, 0.5]], [[1, "2"]]])
      expect(refusal(() => readLags(bad, 10))).toMatchObject({ code: "bad-argument", argument: "lags" });
  });
});

describe("steps in text", () => {
  it.each(["none", "log", "sqrt", "diff", "diff 12", "log, diff, diff 12", "log | none | diff 4, diff"])("%s is written as it is read", (text) =>
    expect(formatSteps(parseSteps(text)!)).toBe(text)); // prettier-ignore

  it("lists that are all alike are written once", () => {
    expect(formatSteps(spreadSteps(parseSteps("diff")!, 3)!)).toBe("diff");
    expect(formatSteps(parseSteps(" DIFF  1|diff ")!)).toBe("diff");
  });

  it.each(["", "|", "log|", "diff, log", "log, log", "sqrt, log", "none, diff", "diff, none", "diff 0", "diff -1", "diff 1.5", "diff 12 4", "diff12", "square", "log diff", ","])(
    "%j is refused", (text) => expect(parseSteps(text)).toBeNull()); // prettier-ignore

  it("one list serves all series, otherwise one for each", () => {
    expect(spreadSteps(parseSteps("log")!, 3)!.length).toBe(3);
    expect(spreadSteps(parseSteps("log|diff")!, 2)).toEqual(parseSteps("log|diff"));
    expect(spreadSteps(parseSteps("log|diff")!, 3)).toBeNull();
  });
});
