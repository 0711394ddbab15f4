import { MODEL } from "../../src/functions/fit";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { uniformInt } from "pure-rand/distribution/uniformInt";
import { inventedSeries } from "./invented";
import { withHeader } from "./sheet";

/** Arguments that no careful user would write and that reach functions all the same. */

export type Args = readonly unknown[];
export interface Hostile {
  readonly what: string;
  readonly value: unknown;
}

const hostile = (what: string, value: unknown): Hostile => ({ what, value });

export const NAMES = ["price", "orders", "stock"] as const;
const rows = inventedSeries(60, 3);
export const goodSeries = withHeader(NAMES, rows);
const bare = rows.map((row) => [...row]);
const order2 = await MODEL(goodSeries, [[2]]);

/** Replaces one cell of a range. */
const put = (range: readonly (readonly unknown[])[], row: number, column: number, value: unknown) =>
  range.map((line, i) => line.map((cell, j) => (i === row && j === column ? value : cell)));

const hostError = Object.assign(new Error("in a cell"), { code: "#DIV/0!" });
const circular: Record<string, unknown> = {};
circular["self"] = circular;
const circularRich: Record<string, unknown> = { type: "LinkedEntity" };
circularRich["basicValue"] = circularRich;

/** Raw values for any argument at all. */
const anything: readonly Hostile[] = [
  hostile("omitted", null),
  hostile("undefined", undefined),
  hostile("empty text", ""),
  hostile("blank text", "   "),
  hostile("one blank cell", [[null]]),
  hostile("a rectangle of blanks", [[null, ""], [undefined, " "]]),
  hostile("an empty array", []),
  hostile("empty rows", [[], []]),
  hostile("text", "abc"),
  hostile("text that looks like a number", "12"),
  hostile("very long text", "long ".repeat(2000)),
  hostile("text of marks", "=1+1;|,\n\t;;=="),
  hostile("true", true),
  hostile("false in a cell", [[false]]),
  hostile("zero", 0),
  hostile("minus zero", -0),
  hostile("minus one", -1),
  hostile("one and a half", [[1.5]]),
  hostile("a billion", [[1e9]]),
  hostile("beyond whole numbers", 1e17),
  hostile("1e300", [[1e300]]),
  hostile("not a number", NaN),
  hostile("infinite", [[Infinity]]),
  hostile("a big integer", 12n),
  hostile("a bigger integer", [[10n ** 400n]]),
  hostile("an error as the host's object", [[hostError]]),
  hostile("an error as a rich value", [[{ type: "Error", basicValue: "#N/A" }]]),
  hostile("an error without a value", { type: "Error" }),
  hostile("an error as text", "#REF!"),
  hostile("a plain object", {}),
  hostile("an object without prototype", Object.create(null)),
  hostile("an object that refers to itself", circular),
  hostile("a rich value that refers to itself", [[circularRich]]),
  hostile("a rich value", [[{ type: "Double", basicValue: 3, numberFormat: "0.00" }]]),
  hostile("an entity", [[{ type: "Entity", text: "a place", properties: {} }]]),
  hostile("a date object", new Date(0)),
  hostile("a function", () => 1),
  hostile("a symbol", [[Symbol("s")]]),
  hostile("a map", new Map([[1, 2]])),
  hostile("three levels of arrays", [[[1, 2], [3, 4]]]),
  hostile("ragged rows", [[1, 2, 3], [4], [], [5, 6]]),
  hostile("a flat row", [1, 2, 3, 4]),
  hostile("typed rows", [new Float64Array([1, 2]), new Float64Array([3, 4])]),
  hostile("one row", [[1, 2, 3]]),
  hostile("one column", [[1], [2], [3], [4]]),
]; // prettier-ignore

const times = <T>(count: number, make: (i: number) => T): T[] =>
  Array.from({ length: count }, (_, i) => make(i));

/** Ranges of series. */
const seriesRanges: readonly Hostile[] = [
  hostile("a text cell", put(goodSeries, 14, 0, "n/a")),
  hostile("a number as text", put(goodSeries, 14, 1, "12.5")),
  hostile("a logical value", put(goodSeries, 5, 2, true)),
  hostile("a blank cell", put(goodSeries, 7, 1, null)),
  hostile("an error object in the body", put(goodSeries, 9, 0, hostError)),
  hostile("a rich error in the body", put(goodSeries, 9, 0, { type: "Error", basicValue: "#DIV/0!" })),
  hostile("a number that is none in the body", put(bare, 9, 0, NaN)),
  hostile("an infinite number in the body", put(bare, 9, 0, -Infinity)),
  hostile("an entity in the body", put(bare, 9, 0, { type: "Entity", properties: {} })),
  hostile("a long text in the body", put(bare, 9, 0, "x".repeat(3000))),
  hostile("a header alone", [[...NAMES]]),
  hostile("a header over blanks", [[...NAMES], [null, null, null], ["", "", ""]]),
  hostile("two equal names", withHeader(["a", "b", "a"], rows)),
  hostile("a name that is a number", withHeader(["a", "2024", "b"], rows)),
  hostile("a name that is missing", withHeader(["a", "", "b"], rows)),
  hostile("a logical value as name", [["a", true, "b"], ...bare]),
  hostile("an error as name", [["a", hostError, "b"], ...bare]),
  hostile("very long names", withHeader(["a", "b", "c"].map((c) => c.repeat(400)), rows)),
  hostile("names with marks", withHeader(["=1+1", "a;b=c|d", "comove model"], rows)),
  hostile("one row of numbers", [[1, 2, 3]]),
  hostile("two rows of numbers", [[1, 2, 3], [2, 3, 5]]),
  hostile("five rows of numbers", bare.slice(0, 5)),
  hostile("one column", bare.map(([v]) => [v])),
  hostile("one cell", [[5]]),
  hostile("a constant series", bare.map(([a, b]) => [a, b, 4])),
  hostile("all constant", bare.map(() => [1, 1, 1])),
  hostile("all zero", bare.map(() => [0, 0, 0])),
  hostile("a copy", bare.map(([a, b]) => [a, b, a])),
  hostile("a scaled copy", bare.map(([a, b]) => [a, b, 1 - 2 * a])),
  hostile("a sum", bare.map(([a, b]) => [a, b, a + b])),
  hostile("a copy one row late", bare.map(([a, b], t) => [a, b, bare[Math.max(0, t - 1)][0]])),
  hostile("a near copy", bare.map(([a, b], t) => [a, b, a + 1e-9 * Math.sin(t)])),
  hostile("a straight line", bare.map(([a, b], t) => [a, b, t])),
  hostile("an exact exponential", bare.map(([a, b], t) => [a, b, 2 ** t])),
  hostile("an exact wave", bare.map((_, t) => [Math.sin(t), Math.cos(t)])),
  hostile("numbers near 1e300", bare.map((row) => row.map((v) => v * 1e299))),
  hostile("numbers at the edge of range", bare.map((_, t) => [1.7e308 * (-1) ** t, 1.7e308, t])),
  hostile("numbers near 1e-300", bare.map((row) => row.map((v) => v * 1e-301))),
  hostile("smallest numbers", bare.map((_, t) => [5e-324 * (t % 3), 5e-324 * (t % 2)])),
  hostile("very different units", bare.map(([a, b, c]) => [a * 1e150, b * 1e-150, c])),
  hostile("a large offset", bare.map((row) => row.map((v) => v + 1e14))),
  hostile("negative numbers", bare.map((row) => row.map((v) => -Math.abs(v) - 1))),
  hostile("a step", bare.map(([a, b], t) => [a, b, t < 30 ? 0 : 1])),
  hostile("one outlier", put(bare, 30, 1, 1e12)),
  hostile("a single change", bare.map(([a, b], t) => [a, b, t === 59 ? 1 : 0])),
  hostile("a blank column", bare.map(([a, b]) => [a, null, b])),
  hostile("a blank last column", goodSeries.map((row) => [...row, null])),
  hostile("ragged rows", [...bare.slice(0, 20), [1], [], [2, 3, 4, 5]]),
  hostile("whole columns", [...goodSeries, ...times(3000, () => [null, null, null])]),
  hostile("more series than rows", times(8, (t) => times(20, (k) => Math.sin(t * t + k)))),
  hostile("twelve series", inventedSeries(70, 12).map((row) => row.map((v) => v))),
  hostile("thousands of rows", times(3000, (t) => [Math.sin(t * t), Math.cos(3 * t * t)])),
  hostile("big integers", bare.map(([a]) => [BigInt(Math.round(a * 100)), a])),
]; // prettier-ignore

const optionTexts: readonly Hostile[] = [
  "nonsense",
  "nonsense=1",
  "=",
  "=1",
  "terms",
  "terms=",
  "terms=;terms=trend",
  "terms=trend; terms=trend",
  "TERMS = Trend ; Cycle = 4",
  "terms=cubic",
  "terms=trend; cycle=1",
  "cycle=0",
  "cycle=-4",
  "cycle=2,5",
  "cycle=1e9",
  "cycle=99999",
  "cycle=4; waves=3",
  "waves=2",
  "cycle=4; waves=2",
  "start=0",
  "start=1e7",
  "start=9999999; terms=quadratic",
  "uselags=0",
  "uselags=1 1",
  "uselags=1 x",
  "uselags=999999",
  "uselags=1 12",
  "uselags=2,1",
  "steps=log",
  "steps=sqrt",
  "steps=diff",
  "steps=diff 0",
  "steps=diff 59",
  "steps=diff 60",
  "steps=diff 999999",
  "steps=diff, log",
  "steps=log | diff",
  "steps=log, diff | none | diff, diff 12",
  "steps=diff, diff, diff, diff, diff, diff, diff",
  "criterion=best",
  "criterion=bic; maxorder=0",
  "maxorder=10000",
  "maxorder=-1",
  "coverage=0",
  "coverage=1",
  "coverage=95%",
  "coverage=0,9",
  "coverage=0.9999999999999999",
  "coverage=1e-300",
  "coverage=nan",
  "coverage=1e999",
  "bands=known; joint=yes",
  "bands=fitted; point=mean; steps=log",
  "bands=redrawn; draws=20; seed=3",
  "draws=0",
  "draws=1e9",
  "seed=-1",
  "point=mode",
  "joint=perhaps",
  "labels=maybe",
  "labels=no",
  "labels=yes",
  "divisor=0",
  "divisor=n-k",
  "fit=magic",
  "fit=yule-walker",
  "fit=yule-walker; terms=none",
  "fit=yule-walker; uselags=1 3",
  "fit=nuttall-strand",
  "fit=likelihood",
  "fit=likelihood; ma=1",
  "fit=shrinkage; pull=0",
  "fit=shrinkage; pull=1e-300",
  "fit=shrinkage; pull=1e999",
  "ma=99",
  "longrun=1",
  "longrun=99",
  "gaps=allow",
  "gaps=perhaps",
  "testlags=1 2 3",
  "testlags=0",
  "testlags=1e6",
  "adjust=yes",
  "spare=1",
  "spare=1e6",
  "shock=hammer",
  "shock=unit",
  "shock=generalised",
  "origins=1",
  "origins=1e6",
  "constructor=1",
  "__proto__=1",
  "toString=1",
  ";;;;",
  `${"x".repeat(2000)}=${"y".repeat(2000)}`,
  `terms=${"y".repeat(2000)}`,
].map((text) => hostile(text.length > 60 ? `${text.slice(0, 20)}…` : text, text));

const optionRanges: readonly Hostile[] = [
  hostile("two columns", [["terms", "trend"], ["labels", "yes"]]),
  hostile("two columns, numbers", [["cycle", 4], ["start", 3]]),
  hostile("two columns, logical", [["joint", true]]),
  hostile("two columns, a value missing", [["terms", null]]),
  hostile("two columns, a key missing", [[null, "trend"]]),
  hostile("two columns, an error", [["terms", hostError]]),
  hostile("two columns, a number as key", [[3, 4]]),
  hostile("two columns, blank rows", [[null, null], ["terms", "none"], ["", ""]]),
  hostile("three columns", [["terms", "trend", 1]]),
  hostile("a column of texts", [["terms=trend"], [null], ["cycle=4"]]),
]; // prettier-ignore

const column = (j: number) => order2.map((row) => [row[j]]);
const models: readonly Hostile[] = [
  hostile("auto", "auto"),
  hostile("AUTO in a cell", [[" Auto "]]),
  hostile("order 0", 0),
  hostile("order 1", [[1]]),
  hostile("order -1", -1),
  hostile("order 1.5", 1.5),
  hostile("order 18", 18),
  hostile("order 1e9", 1e9),
  hostile("order 1e300", 1e300),
  hostile("a whole block", order2),
  hostile("one cell of a block", [[order2[0][0]]]),
  hostile("the tag as a text", order2[0][0]),
  hostile("a block without its first row", order2.slice(1)),
  hostile("a block without its last row", order2.slice(0, -1)),
  hostile("a block without its first column", order2.map((row) => row.slice(1))),
  hostile("a block without its last column", order2.map((row) => row.slice(0, -1))),
  hostile("only the labels", column(0)),
  hostile("a block one row lower", [[null, null, null, null], ...order2]),
  hostile("a block one column further", order2.map((row) => [null, ...row])),
  hostile("a block with a row put in", [...order2.slice(0, 3), ["", "", "", ""], ...order2.slice(3)]),
  hostile("a block with a column put in", order2.map(([a, ...rest]) => [a, "", ...rest])),
  hostile("a block with rows exchanged", order2.map((row, i) => (i === 2 ? order2[3] : i === 3 ? order2[2] : row))),
  hostile("a block with columns exchanged", order2.map(([a, b, c, d]) => [a, c, b, d])),
  hostile("a block turned on its side", order2[0].map((_, j) => order2.map((row) => row[j]))),
  hostile("a block with notes beside it", order2.map((row, i) => [...row, i === 0 ? "note" : null])),
  hostile("a block with blanks around it", [...order2.map((row) => [...row, null]), times(5, () => "")]),
  hostile("a blank coefficient", put(order2, 2, 1, "")),
  hostile("a text coefficient", put(order2, 2, 1, "0,5")),
  hostile("a long text coefficient", put(order2, 2, 1, "z".repeat(2000))),
  hostile("an error coefficient", put(order2, 2, 1, hostError)),
  hostile("a coefficient of 1e300", put(order2, 2, 1, 1e300)),
  hostile("coefficients of both signs beyond range", order2.map((row, i) => (i > 1 && i < 8 ? [row[0], 1e300, -1e300, 1e300] : row))),
  hostile("an explosive block", order2.map((row, i) => (i === 2 ? [row[0], 9, 0, 0] : row))),
  hostile("zero coefficients", order2.map((row, i) => (i > 0 && i < 8 ? [row[0], 0, 0, 0] : row))),
  hostile("an edited coefficient", put(order2, 2, 1, 0.123)),
  hostile("an asymmetric covariance", put(order2, order2.length - 1, 1, 77)),
  hostile("a zero covariance", order2.map((row, i) => (i >= 8 ? [row[0], 0, 0, 0] : row))),
  hostile("a negative variance", put(order2, order2.length - 1, 3, -1)),
  hostile("a covariance of 1e300", put(order2, order2.length - 1, 3, 1e300)),
  ...[
    "comove model",
    "comove model p=2",
    "comove model p=2; series=3",
    "comove model p=9; fit=least-squares; terms=constant; series=3; n=60; sum=00000000",
    "comove model p=-2; fit=least-squares; terms=constant; series=3; n=60; sum=00000000",
    "comove model p=10000; fit=least-squares; terms=constant; series=3; n=60; sum=00000000",
    "comove model p=2; fit=magic; terms=constant; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=cubic; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; series=0; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; series=99999999; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; series=3; drivers=99999999; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; cycle=0; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; cycle=99999999; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; waves=2; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; cycle=4; waves=9; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; uselags=1; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; uselags=x; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; steps=square; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; steps=log | diff; series=3; n=60; sum=00000000",
    "comove model p=2; fit=likelihood; terms=constant; ma=99999999; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; longrun=9; series=3; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; series=3; start=0; n=60; sum=00000000",
    "comove model p=2; fit=least-squares; terms=constant; series=3; n=99999999; sum=00000000",
    "COMOVE MODEL P=2; FIT=least-squares; TERMS=constant; SERIES=3; N=60; SUM=x",
    `comove model ${"p=2;".repeat(2000)}`,
    `comove model p=2; fit=${"q".repeat(3000)}`,
  ].map((tag) => hostile(`tag ${tag.slice(0, 90)}`, put(order2, 0, 0, tag))),
]; // prettier-ignore

const counts: readonly Hostile[] = [
  0, -1, 1.5, 1, 3, 17, 59, 60, 10_000, 10_001, 1e9, 1e300, -1e300, 5e-324,
].map((value) => hostile(String(value), value));
const lagLists: readonly Hostile[] = [
  hostile("lags both ways", [[-3, 0, 3]]),
  hostile("repeated lags", [[1], [1], [2]]),
  hostile("lags beyond the rows", [[1, 60]]),
  hostile("half lags", [[1, 2.5]]),
  hostile("a text among lags", [[1, "two", 3]]),
  hostile("blanks among lags", [[1, null, 3]]),
  hostile("a thousand lags", [times(1000, (i) => (i % 50) - 25)]),
  hostile("very many lags", times(100_000, () => [1])),
]; // prettier-ignore

const driverRanges: readonly Hostile[] = [
  hostile("one driver", withHeader(["rain"], times(70, (t) => [Math.sin(t * t)]))),
  hostile("a driver without header", times(70, (t) => [Math.sin(t * t)])),
  hostile("too few driver rows", withHeader(["rain"], times(30, (t) => [Math.sin(t * t)]))),
  hostile("a driver with a gap", put(withHeader(["rain"], times(70, (t) => [Math.sin(t * t)])), 20, 0, null)),
  hostile("a driver with text", put(withHeader(["rain"], times(70, (t) => [Math.sin(t * t)])), 20, 0, "wet")),
  hostile("a constant driver", times(70, () => [1])),
  hostile("a driver twice", times(70, (t) => [Math.sin(t * t), Math.sin(t * t)])),
  hostile("a series as driver", [...bare, ...bare].map(([a]) => [a])),
  hostile("a driver called like a term", withHeader(["constant"], times(70, (t) => [Math.sin(t * t)]))),
  hostile("a driver called like a lag", withHeader(["price, lag 1"], times(70, (t) => [Math.sin(t * t)]))),
  hostile("many drivers", times(70, (t) => times(50, (k) => Math.sin(t * t + k * k)))),
  hostile("drivers of 1e300", times(70, (t) => [1e300 * Math.sin(t * t)])),
  hostile("a header alone", [["rain"]]),
]; // prettier-ignore

const stepTexts: readonly Hostile[] = optionTexts
  .filter(({ what }) => what.startsWith("steps="))
  .map(({ what, value }) => hostile(what, (value as string).slice("steps=".length)))
  .concat([
    hostile("one list per cell", [["log", "none", "diff"]]),
    hostile("one list per row", [["log"], ["none"], ["diff"]]),
    hostile("bars only", "||"),
    hostile("too many lists", "log|log|log|log|log"),
    hostile("square", "square"),
  ]);

/** Hostile values by the name of a parameter; what is not listed gets the raw values and the numbers. */
const BY_NAME: Readonly<Record<string, readonly Hostile[]>> = {
  series: seriesRanges,
  actuals: seriesRanges,
  forecast: seriesRanges,
  values: seriesRanges,
  start: [...seriesRanges.slice(0, 20), ...counts],
  plan: seriesRanges,
  dates: seriesRanges,
  options: [...optionTexts, ...optionRanges],
  model: models,
  drivers: driverRanges,
  lags: [...counts, ...lagLists],
  steps: stepTexts,
};

export const hostileValues = (parameter: string): readonly Hostile[] => [
  ...anything,
  ...(BY_NAME[parameter] ?? counts),
];

/** An argument in order, so that the one beside it is the only hostile one. */
export function goodValue(parameter: string, needsBlock: boolean): unknown {
  switch (parameter) {
    case "series":
    case "actuals":
      return goodSeries;
    case "lags":
    case "maxorder":
    case "ahead":
      return 3;
    case "order":
      return 2;
    case "horizon":
      return 4;
    case "rows":
      return 20;
    case "target":
      return needsBlock ? 1 : "orders";
    case "steps":
      return "diff";
    case "values":
      return bare.slice(0, 3);
    case "forecast":
      return withHeader(NAMES, bare.slice(0, 10));
    case "plan":
      return [[null, 20, null], [null, null, null], [9, null, null]]; // prettier-ignore
    case "dates":
      return times(60, (t) => [45_000 + t]);
    case "model":
      return needsBlock ? order2 : 2;
    default:
      return null;
  }
}

/** Seeded picks of hostile values for all parameters at once. */
export function hostileMixes(parameters: readonly string[], count: number, seed: number): Hostile[][] {
  const generator = xoroshiro128plus(seed);
  return times(count, () =>
    parameters.map((parameter) => {
      const values = hostileValues(parameter);
      return values[uniformInt(generator, 0, values.length - 1)];
    }),
  );
}
