import { describe, expect, it } from "vitest";
import { Issue, type BlockFault, type IssueCode, type IssueFacts } from "../../src/core/issue";
import { messageFor, wordIssue } from "../../src/sheet/messages";
import { issueWords } from "../../src/texts/en";

/** One example of every problem: what a person reads is checked for style, not for its letters. */
const faults: readonly BlockFault[] = [
  { kind: "one-cell" },
  { kind: "no-tag" },
  { kind: "tag-elsewhere", row: 2, column: 3 },
  { kind: "bad-tag", part: "terms" },
  { kind: "rows", have: 8, need: 9 },
  { kind: "rows", have: 10, need: 9 },
  { kind: "columns", have: 2, need: 3 },
  { kind: "columns", have: 4, need: 3 },
  { kind: "blank-column", column: 3 },
  { kind: "blank-row", row: 4 },
  { kind: "blank-cell", row: 3, column: 2 },
  { kind: "not-a-number", row: 3, column: 2, text: "0,5" },
  { kind: "rows-moved", row: 3, label: "orders, lag 1", expected: "price, lag 1" },
  { kind: "columns-moved", column: 2, name: "orders", expected: "price" },
];

const oneOf = { kind: "one-of", values: ["constant", "none", "trend"] } as const;

const examples: readonly IssueFacts[] = [
  { code: "no-numbers", range: "series" },
  { code: "missing-argument", argument: "lags" },
  { code: "not-a-number-cell", range: "series", name: "price", row: 14, found: "text 'n/a'" },
  { code: "not-a-number-cell", range: "drivers", name: "rain", row: 14, found: "the error #N/A" },
  { code: "gap", range: "series", name: "price", row: 14, allowable: false },
  { code: "gap", range: "series", name: "price", row: 14, allowable: true },
  { code: "longrun-needs-lag" },
  { code: "longrun-errors", call: "BANDS" },
  { code: "longrun-errors", call: "ESTIMATES" },
  { code: "ma-not-here", call: "GRANGER" },
  { code: "gaps-not-here", call: "bands=fitted" },
  { code: "likelihood-stuck", reason: "ma-root" },
  { code: "likelihood-stuck", reason: "ar-root" },
  { code: "likelihood-stuck", reason: "flat" },
  { code: "gaps-too-many" },
  { code: "filter-heavy", rows: 10_156, states: 56 },
  { code: "blank-series", name: "price" },
  { code: "header-number", range: "series", column: 2, text: "2024" },
  { code: "header-twice", range: "series", name: "price" },
  { code: "header-blank", range: "drivers", column: 2 },
  { code: "drivers-short", have: 60, need: 64, future: 4 },
  { code: "drivers-short", have: 50, need: 60, future: 0 },
  { code: "columns-differ", range: "values", have: 2, need: 3 },
  {
    code: "bad-argument",
    argument: "horizon",
    found: "1.5",
    allowed: { kind: "whole", from: 1, to: 10_000 },
  },
  { code: "bad-argument", argument: "steps", found: "text 'x'", allowed: { kind: "list", of: "steps" } },
  { code: "unknown-option", key: "speed", allowed: Object.keys({ terms: 1, cycle: 1, labels: 1 }) },
  { code: "option-not-here", key: "coverage", call: "AHEAD", allowed: ["terms", "labels"] },
  { code: "option-twice", key: "terms" },
  { code: "option-without-value", text: "text 'terms'" },
  { code: "bad-option", key: "terms", found: "text 'line'", allowed: oneOf },
  { code: "bad-option", key: "coverage", found: "text '2'", allowed: { kind: "number", above: 0, below: 1 } },
  { code: "bad-option", key: "pull", found: "text '0'", allowed: { kind: "number", above: 0, below: null } },
  { code: "bad-option", key: "uselags", found: "text '0'", allowed: { kind: "list", of: "lags" } },
  { code: "bad-option", key: "start", found: "text '0'", allowed: { kind: "whole", from: 1, to: null } },
  { code: "option-needs", key: "waves", needs: "cycle" },
  { code: "fit-without-drivers", fit: "yule-walker" },
  { code: "options-clash", key: "criterion", other: "order" },
  { code: "options-clash", key: "criterion", other: "uselags" },
  { code: "options-clash", key: "criterion", other: "block" },
  { code: "options-clash", key: "uselags", other: "order" },
  { code: "option-against-block", key: "terms", found: "trend", block: "p=2; terms=constant" },
  { code: "steps-count", have: 2, series: 3 },
  { code: "labels-needed" },
  { code: "bad-range-options", columns: 3 },
  ...faults.map((fault) => ({ code: "model-block", fault }) as const),
  { code: "block-needed", found: "2" },
  { code: "block-names", block: ["price", "orders"], series: ["orders", "price"] },
  { code: "block-drivers", block: [], drivers: ["rain", "wind"] },
  { code: "block-drivers", block: ["rain"], drivers: [] },
  { code: "block-drivers", block: ["rain"], drivers: ["wind"] },
  { code: "block-needs-rows", order: 4, rows: 3 },
  { code: "covariance-asymmetric", row: 1, column: 0 },
  { code: "covariance-not-positive" },
  { code: "too-few-rows", order: 4, series: 3, rows: 12, need: 20, largest: 2 },
  { code: "too-few-rows", order: 0, series: 9, rows: 3, need: 20, largest: null },
  { code: "lags-beyond-rows", lag: 80, rows: 60 },
  { code: "step-domain", step: "log", series: 1, row: 7, value: -2 },
  { code: "step-domain", step: "sqrt", series: 0, row: 7, value: -2 },
  { code: "steps-leave-nothing", lost: 13, rows: 12 },
  { code: "constant-series", series: 1 },
  {
    code: "exact-combination",
    columns: [
      { column: { kind: "series", series: 0 }, weight: 1 },
      { column: { kind: "series", series: 1 }, weight: 1 },
      { column: { kind: "series", series: 2 }, weight: -1 },
    ],
  },
  {
    code: "exact-combination",
    columns: [
      { column: { kind: "constant" }, weight: 3 },
      { column: { kind: "trend", power: 1 }, weight: 2 },
      { column: { kind: "lag", series: 0, lag: 2 }, weight: -1 },
    ],
  },
  {
    code: "exact-combination",
    columns: [
      { column: { kind: "season", season: 2 }, weight: 1 },
      { column: { kind: "wave", wave: 1, part: "cos" }, weight: 1 },
    ],
  },
  { code: "exact-combination", columns: [{ column: { kind: "driver", driver: 0 }, weight: 1 }] },
  { code: "predicted-exactly", order: 1 },
  { code: "fit-all-lags", fit: "nuttall-strand" },
  { code: "bad-option", key: "fade", found: "text '-1'", allowed: { kind: "number-from", from: 0 } },
  { code: "too-heavy", rows: 20_000, coefficients: 506 },
  { code: "too-many-states", states: 400, limit: 241 },
  { code: "nothing-left-over", series: 1 },
  { code: "singular-system" },
  { code: "unstable", modulus: 1.0213 },
  { code: "no-lags" },
  { code: "needs-two-series" },
  { code: "too-many-looks", looks: 300_000, limit: 50_000 },
  { code: "start-needed", modulus: 1.0213 },
  { code: "drivers-not-here", call: "SIMULATE" },
  { code: "plan-rows", have: 12_000, limit: 10_000 },
  { code: "plan-rows", have: 0, limit: 10_000 },
  { code: "plan-names", plan: ["price", "stock", "orders"], series: ["price", "orders", "stock"] },
  { code: "plan-domain", step: "log", series: 1, ahead: 3, value: -2 },
  { code: "plan-domain", step: "sqrt", series: 0, ahead: 1, value: -2 },
  { code: "plan-too-large", imposed: 3000 },
  { code: "plan-singular" },
  { code: "redraws-fail", failed: 101, drawn: 320 },
  { code: "redraw-fit", fit: "likelihood" },
  { code: "redraw-heavy", draws: 100_000 },
  { code: "cancelled" },
  { code: "not-in-preview" },
  { code: "too-large" },
  { code: "too-many-cells", cells: 300_030, limit: 250_000 },
];

const wording = { series: ["price", "orders", "stock"], drivers: ["rain"], firstRow: 3 };
const told = examples.map((facts) => [facts.code, wordIssue(facts, wording)] as const);

describe("every problem", () => {
  it("has an example here", () => {
    const covered = new Set<IssueCode>(examples.map(({ code }) => code));
    expect((Object.keys(issueWords) as IssueCode[]).filter((code) => !covered.has(code))).toEqual([]);
  });

  it.each(told)("%s: %s", (_, text) => {
    expect(text.length, "some hosts cut near 255 characters").toBeLessThanOrEqual(255);
    expect(text, "begins with a capital or a name, ends with a full stop").toMatch(/^\S.*\.$/);
    expect(text.match(/[.!?](?= [A-Z])/g)?.length ?? 0, "at most three sentences").toBeLessThanOrEqual(2);
    expect(text, "no words of programs or of algebra").not.toMatch(
      /undefined|null|NaN|Infinity|\[object|invalid|illegal|exception|argument error|rank|eigen|matrix|Φ|Σ/i,
    );
    expect(text, "blames nobody").not.toMatch(/\byou\b|\byour (?!data)|wrong|mistake|!/i);
    expect(text, "no empty places").not.toMatch(/''| {2}|\( *\)| ,/);
  });
});

describe("single messages", () => {
  it("the documented wording", () => {
    expect(told.find(([code]) => code === "too-few-rows")![1]).toBe(
      "4 lags of 3 series need at least 20 rows; this range has 12. The largest order it can carry is 2. Use fewer lags or more rows.",
    );
    expect(told.find(([code]) => code === "exact-combination")![1]).toBe(
      "price + orders = stock exactly. Remove one of the three.",
    );
  });

  it("a row is counted in the range as passed", () => {
    const facts = { code: "step-domain", step: "log", series: 1, row: 7, value: -2 } as const;
    expect(wordIssue(facts, wording)).toMatch(/^Series orders, row 10: -2 has no logarithm\. /);
  });

  it("factors of an exact relation are shown, whatever the signs", () => {
    const relation = (...weights: number[]) =>
      wordIssue(
        {
          code: "exact-combination",
          columns: weights.map((weight, series) => ({ column: { kind: "series", series }, weight })),
        },
        wording,
      );
    expect(relation(2, 1)).toBe("2 × price + orders = 0 exactly. Remove one of the two.");
    expect(relation(-0.5, 1)).toBe("0.5 × price = orders exactly. Remove one of the two.");
    expect(relation(1, -1, -1)).toBe("price = orders + stock exactly. Remove one of the three.");
  });

  it("long names are cut, and the remedy stays", () => {
    const long = Array.from({ length: 30 }, (_, k) => `${k} ${"very long name ".repeat(20)}`);
    const text = wordIssue({ code: "block-names", block: long, series: long }, { ...wording, series: long });
    expect(text.length).toBeLessThanOrEqual(255);
    expect(text).toContain("…");
    const cell = wordIssue({ code: "gap", range: "series", name: long[0], row: 14, allowable: true });
    expect(cell).toMatch(/… ?, row 14 is blank\. Fill it, shorten the range, or set gaps=allow with fit=likelihood\.$/);
    const columns = long.map((_, series) => ({ column: { kind: "series", series } as const, weight: series - 3.5 }));
    expect(wordIssue({ code: "exact-combination", columns }, { ...wording, series: long })).toMatch(/^.{40,255}\.$/);
  }); // prettier-ignore

  it("what is no problem of the user is said to be ours", () => {
    expect(messageFor(new TypeError("x is not a function"), "AHEAD")).toEqual({
      kind: "value",
      text: "AHEAD failed on something it should have handled. This is a fault of Comove, not of your data; please report the formula.",
    });
  });
});

describe("the two errors", () => {
  const kindOf = (facts: IssueFacts) => messageFor(new Issue(facts), "AHEAD").kind;
  it("a refused argument is a value error, a result that does not exist is not available", () => {
    const codes = (kind: string) => new Set(examples.filter((f) => kindOf(f) === kind).map(({ code }) => code));
    expect([...codes("not-available")].sort()).toEqual([
      "block-needs-rows", "cancelled", "constant-series", "covariance-not-positive", "exact-combination", "gaps-too-many", "likelihood-stuck", "needs-two-series", "no-lags",
      "not-in-preview", "nothing-left-over", "plan-singular", "predicted-exactly", "redraws-fail", "singular-system", "start-needed", "steps-leave-nothing",
      "too-few-rows", "too-large", "unstable",
    ]);
    for (const code of ["gap", "covariance-asymmetric", "model-block", "bad-option"] as const) expect(codes("value")).toContain(code);
  }); // prettier-ignore
});
