import { describe, expect, it } from "vitest";
import type { Matrix } from "../../src/core/matrix";
import { estimates } from "../../src/sheet/calls/estimates";
import { granger } from "../../src/sheet/calls/granger";
import { impliedcov } from "../../src/sheet/calls/impliedcov";
import { leadlag } from "../../src/sheet/calls/leadlag";
import { model } from "../../src/sheet/calls/model";
import { fitted, residuals } from "../../src/sheet/calls/one-step";
import { partiallag } from "../../src/sheet/calls/partiallag";
import { residtest } from "../../src/sheet/calls/residtest";
import { response } from "../../src/sheet/calls/response";
import { shockpast } from "../../src/sheet/calls/shockpast";
import { shockshare } from "../../src/sheet/calls/shockshare";
import { simulate } from "../../src/sheet/calls/simulate";
import { whatif } from "../../src/sheet/calls/whatif";
import { blockClose, close } from "../support/close";
import { inventedSeries } from "../support/invented";
import { ask, withHeader } from "../support/sheet";

/** The same data in other units, and with the series in another order: what must move along, and what must not notice. */

const NAMES = ["fish", "ice", "trips"];
const rows = inventedSeries(80, 3);
const series = withHeader(NAMES, rows);
const FACTOR = [1e6, -0.02, 5];
const OFFSET = [-3e6, 10, 0.5];
const SIGN = FACTOR.map(Math.sign);
const inUnits = (m: Matrix): number[][] => m.map((row) => row.map((v, k) => FACTOR[k] * v + OFFSET[k]));
const scaledOnly = (m: Matrix): number[][] => m.map((row) => row.map((v, k) => FACTOR[k] * v));
const moved = withHeader(NAMES, inUnits(rows));
const ORDER = [2, 0, 1];
const inOrder = <T>(row: readonly T[]): T[] => ORDER.map((k) => row[k]);
const turned = withHeader(inOrder(NAMES), rows.map(inOrder));

/** Every estimator with the tolerance to which its numbers are settled. */
const FITS = [
  ["fit=least-squares", 1e-8],
  ["fit=yule-walker", 1e-8],
  ["fit=nuttall-strand", 1e-8],
  ["fit=likelihood", 1e-5],
  ["fit=likelihood; ma=1", 1e-4],
  ["fit=shrinkage", 1e-8],
  ["longrun=1", 1e-8],
  ["terms=trend; cycle=4", 1e-8],
] as const;
const orderOf = (options: string): number => (options.includes("ma=") ? 1 : 2);

type AnyCall = Parameters<typeof ask>[0];
type Args = Parameters<typeof ask>[1];
/** Numbers under the heading and right of the labels; blanks as none. */
const body = (call: AnyCall, args: Args, labels = 0): number[][] =>
  ask(call, args)
    .slice(1)
    .map((row) => row.slice(labels).map((v) => (v === "" ? NaN : Number(v))));
const finite = (m: Matrix): Matrix => m.filter((row) => row.every((v) => !Number.isNaN(v)));
const blockOf = (range: unknown[][], options = "", order = 2) =>
  ask(model, { series: range, model: order, options });

describe.each(FITS)("%s, in other units", (options, rtol) => {
  const args = { options, model: orderOf(options) };

  it("FITTED moves along, RESIDUALS only by the factors", () => {
    blockClose(finite(body(fitted, { ...args, series: moved })), inUnits(finite(body(fitted, { ...args, series }))), rtol); // prettier-ignore
    NAMES.forEach((_, k) =>
      blockClose(
        finite(body(residuals, { ...args, series: moved })).map((row) => [row[k]]),
        scaledOnly(finite(body(residuals, { ...args, series }))).map((row) => [row[k]]),
        rtol * 100,
      ),
    );
  });

  it("WHATIF with its plan moves along", () => {
    const plan = [[null, 21, null], [11, null, null], [null, null, 30]]; // prettier-ignore
    const movedPlan = plan.map((row) => row.map((v, k) => (v === null ? null : FACTOR[k] * v + OFFSET[k])));
    const path = body(whatif, { ...args, series, plan });
    body(whatif, { ...args, series: moved, plan: movedPlan }).forEach((row, j) =>
      close(row, inUnits(path)[j], { rtol: rtol * 10 }),
    );
  });

  it("SHOCKPAST: contributions take the target's factor, whatever the others'", () => {
    const before = body(shockpast, { ...args, series, target: "trips" });
    const after = body(shockpast, { ...args, series: moved, target: "trips" });
    blockClose(
      after.map((row) => row.slice(2)),
      before.map((row) => row.slice(2).map((v) => v * FACTOR[2])),
      rtol * 10,
    );
  });

  it("responses take both factors, shares do not notice, implied covariances take both", () => {
    const [before, after] = [series, moved].map((range) => blockOf(range, options, orderOf(options)));
    const of = (m: unknown[][], shock: string) =>
      body(response, { model: m, horizon: 4, options: `shock=${shock}` }, 2);
    const rule = {
      unit: (i: number, j: number) => FACTOR[i] / FACTOR[j],
      orthogonal: (i: number, j: number) => FACTOR[i] * SIGN[j],
      generalised: (i: number, j: number) => FACTOR[i] * SIGN[j],
    };
    for (const shock of ["unit", "orthogonal", "generalised"] as const) {
      const expected = of(before, shock).map((row, r) =>
        row.map((v, i) => v * rule[shock](i, Math.floor(r / 5))),
      );
      NAMES.forEach((_, i) =>
        NAMES.forEach((__, j) => {
          const part = (m: Matrix) => m.slice(5 * j, 5 * j + 5).map((row) => [row[i]]);
          blockClose(part(of(after, shock)), part(expected), rtol * 100);
        }),
      );
    }
    const shares = (m: unknown[][]) => body(shockshare, { model: m, horizon: 4 }, 2);
    blockClose(shares(after), shares(before), rtol * 10);
    if (options.startsWith("longrun")) return;
    const implied = (m: unknown[][]) => body(impliedcov, { model: m, lags: 2 }, 2);
    implied(after).forEach(
      (row, r) =>
      close(row, implied(before)[r].map((v, j) => v * FACTOR[r % 3] * FACTOR[j]), { rtol: rtol * 100 }), // prettier-ignore
    );
  });
});

describe("tests in other units", () => {
  it("ESTIMATES: lag coefficients take the ratio of the factors, t at most another sign, p none", () => {
    const [before, after] = [series, moved].map((range) =>
      ask(estimates, { series: range, model: 2 }).slice(1),
    );
    before.forEach((row, r) => {
      const [, name] = /^(\w+), lag/.exec(String(row[1])) ?? [];
      if (name === undefined) return;
      const [i, k] = [NAMES.indexOf(String(row[0])), NAMES.indexOf(name)];
      close(Number(after[r][2]), (Number(row[2]) * FACTOR[i]) / FACTOR[k], { rtol: 1e-6 });
      close(Number(after[r][6]), Number(row[6]) * SIGN[i] * SIGN[k], { rtol: 1e-6 });
      close(Number(after[r][7]), Number(row[7]), { rtol: 1e-6 });
    });
  });

  it("GRANGER and every test of RESIDTEST but the conditioning stay", () => {
    const p = (range: unknown[][]) => body(granger, { series: range, model: 2, options: "adjust=yes" }, 1);
    p(moved).forEach((row, i) => row.forEach((v, j) => i !== j && close(v, p(series)[i][j], { rtol: 1e-6 })));
    const tests = (range: unknown[][]) =>
      ask(residtest, { series: range, model: 2 }).filter((row) => row[2] !== "conditioning");
    const [before, after] = [tests(series), tests(moved)];
    expect(after.map((row) => [...row.slice(0, 4), row[8]])).toEqual(
      before.map((row) => [...row.slice(0, 4), row[8]]),
    );
    before.slice(1).forEach((row, r) => close(Number(after[r + 1][4]), Number(row[4]), { rtol: 1e-5 }));
  });

  it("PARTIALLAG takes the ratio of the factors, its test stays", () => {
    const [before, after] = [series, moved].map((range) => body(partiallag, { series: range, lags: 3 }, 2));
    before.forEach(
      (row, r) =>
      close(after[r].slice(0, 3), row.slice(0, 3).map((v, j) => (v * FACTOR[r % 3]) / FACTOR[j]), { rtol: 1e-6 }), // prettier-ignore
    );
    close(after[0].slice(3), before[0].slice(3), { rtol: 1e-6 });
  });

  it("LEADLAG finds the same leads; a series turned over follows with opposite sign", () => {
    const [before, after] = [series, moved].map((range) => ask(leadlag, { series: range, lags: 4 }));
    expect(after.map((row) => row.slice(0, 3))).toEqual(before.map((row) => row.slice(0, 3)));
    before.slice(1).forEach((row, r) => {
      const sign = SIGN[NAMES.indexOf(String(row[0]))] * SIGN[NAMES.indexOf(String(row[1]))];
      close(Number(after[r + 1][3]), sign * Number(row[3]), { rtol: 1e-6 });
      const says = (table: readonly unknown[]) => /opposite|against/.test(String(table[6]));
      if (Number(row[5]) < 0.05) expect(says(after[r + 1])).toBe(says(row) !== sign < 0);
    });
  });

  it("SIMULATE from moved rows draws moved rows", () => {
    // a draw knows no sign: factors above zero
    const up = (m: Matrix) => m.map((row) => row.map((v, k) => Math.abs(FACTOR[k]) * v + OFFSET[k]));
    const draw = (range: unknown[][], start: Matrix) =>
      body(simulate, { model: blockOf(range), rows: 6, start: withHeader(NAMES, start), options: "seed=4" });
    const expected = up(draw(series, rows.slice(-2)));
    draw(withHeader(NAMES, up(rows)), up(rows.slice(-2))).forEach((row, t) =>
      close(row, expected[t], { rtol: 1e-7 }),
    );
  });
});

describe.each(FITS)("%s, in another order", (options, rtol) => {
  const args = { options, model: orderOf(options) };

  it("FITTED, RESIDUALS and WHATIF are permuted", () => {
    for (const call of [fitted, residuals])
      blockClose(finite(body(call, { ...args, series: turned })), finite(body(call, { ...args, series })).map(inOrder), rtol); // prettier-ignore
    const plan = [[null, 21, null], [11, null, 32]]; // prettier-ignore
    blockClose(
      body(whatif, { ...args, series: turned, plan: plan.map(inOrder) }),
      body(whatif, { ...args, series, plan }).map(inOrder),
      rtol,
    );
  });

  it("unit and generalised responses and implied covariances are permuted", () => {
    const [before, after] = [series, turned].map((range) => blockOf(range, options, orderOf(options)));
    for (const shock of ["unit", "generalised"]) {
      const of = (m: unknown[][]) => body(response, { model: m, horizon: 2, options: `shock=${shock}` }, 2);
      const [first, second] = [of(before), of(after)];
      ORDER.forEach((k, j) =>
        blockClose(second.slice(3 * j, 3 * j + 3), first.slice(3 * k, 3 * k + 3).map(inOrder), rtol * 10),
      );
    }
    if (options.startsWith("longrun")) return;
    const implied = (m: unknown[][]) => body(impliedcov, { model: m, lags: 1 }, 2);
    const [first, second] = [implied(before), implied(after)];
    [0, 1].forEach((lag) =>
      blockClose(
        second.slice(3 * lag, 3 * lag + 3),
        inOrder(first.slice(3 * lag, 3 * lag + 3)).map(inOrder),
        rtol * 10,
      ),
    );
  });
});

describe("tests in another order", () => {
  it("GRANGER and PARTIALLAG are permuted both ways", () => {
    const p = (range: unknown[][]) =>
      body(granger, { series: range, model: 2 }, 1).map((row) => row.map((v) => v || 0));
    blockClose(p(turned), inOrder(p(series)).map(inOrder), 1e-8);
    const partial = (range: unknown[][]) =>
      body(partiallag, { series: range, lags: 2 }, 2).map((row) => row.slice(0, 3));
    [0, 1].forEach((lag) =>
      blockClose(
        partial(turned).slice(3 * lag, 3 * lag + 3),
        inOrder(partial(series).slice(3 * lag, 3 * lag + 3)).map(inOrder),
        1e-8,
      ),
    );
  });

  it("LEADLAG says the same of every pair", () => {
    const pairs = (range: unknown[][]) =>
      ask(leadlag, { series: range, lags: 3 }).slice(1).map((row) => JSON.stringify(row.map((v) => (typeof v === "number" ? Number(v.toPrecision(9)) : v)))).sort(); // prettier-ignore
    expect(pairs(turned)).toEqual(pairs(series));
  });

  it("RESIDTEST finds the same about all series and about each; only the shape is judged in their order", () => {
    const found = (range: unknown[][]) =>
      Object.fromEntries(
        ask(residtest, { series: range, model: 2 })
          .slice(1)
          .filter((row) => row[0] !== "is the shape normal?")
          .map((row) => [`${row[1]} ${row[2]}`, Number(row[4])]),
      );
    const [before, after] = [found(series), found(turned)];
    expect(Object.keys(after).sort()).toEqual(Object.keys(before).sort());
    for (const [key, value] of Object.entries(before)) close(after[key], value, { rtol: 1e-7 });
  });

  it("ESTIMATES say the same of every coefficient", () => {
    const found = (range: unknown[][]) =>
      new Map(ask(estimates, { series: range, model: 2 }).slice(1).map((row) => [`${row[0]} ${row[1]}`, row.slice(2).map(Number)])); // prettier-ignore
    const after = found(turned);
    for (const [key, numbers] of found(series)) close(after.get(key)!, numbers, { rtol: 1e-6 });
  });
});
