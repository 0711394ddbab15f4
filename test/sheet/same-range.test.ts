import { describe, expect, it } from "vitest";
import type { Matrix } from "../../src/core/matrix";
import { ahead } from "../../src/sheet/calls/ahead";
import { bands } from "../../src/sheet/calls/bands";
import { estimates } from "../../src/sheet/calls/estimates";
import { granger } from "../../src/sheet/calls/granger";
import { impliedcov } from "../../src/sheet/calls/impliedcov";
import { lagcorr } from "../../src/sheet/calls/lagcorr";
import { lagcov } from "../../src/sheet/calls/lagcov";
import { leadlag } from "../../src/sheet/calls/leadlag";
import { model } from "../../src/sheet/calls/model";
import { fitted, residuals } from "../../src/sheet/calls/one-step";
import { order } from "../../src/sheet/calls/order";
import { partiallag } from "../../src/sheet/calls/partiallag";
import { residtest } from "../../src/sheet/calls/residtest";
import { response } from "../../src/sheet/calls/response";
import { roots } from "../../src/sheet/calls/roots";
import { shockpast } from "../../src/sheet/calls/shockpast";
import { shockshare } from "../../src/sheet/calls/shockshare";
import { simulate } from "../../src/sheet/calls/simulate";
import { unstep } from "../../src/sheet/calls/unstep";
import { whatif } from "../../src/sheet/calls/whatif";
import { blockClose, close } from "../support/close";
import { inventedSeries } from "../support/invented";
import { ask, errorOf, withHeader } from "../support/sheet";

/** The same range written differently, differences taken inside or by hand, and models without lags. */

const NAMES = ["fish", "ice", "trips"];
const rows = inventedSeries(70, 3);
const series = withHeader(NAMES, rows);
const BLANK = [null, "", undefined];

type AnyCall = Parameters<typeof ask>[0];
type Args = Parameters<typeof ask>[1];
const numbersIn = (table: readonly (readonly unknown[])[]): number[] =>
  table.flat().filter((v): v is number => typeof v === "number");
const body = (call: AnyCall, args: Args, labels = 0): number[][] =>
  ask(call, args)
    .slice(1)
    .map((row) => row.slice(labels).map((v) => (v === "" ? NaN : Number(v))));

/** Every function of a range of series, with what else it needs. */
const CALLS: readonly (readonly [string, AnyCall, Args])[] = [
  ["LAGCOV", lagcov, { lags: 2 }],
  ["LAGCORR", lagcorr, { lags: 2 }],
  ["PARTIALLAG", partiallag, { lags: 2 }],
  ["LEADLAG", leadlag, { lags: 2 }],
  ["ORDER", order, { maxorder: 2 }],
  ["MODEL", model, { model: 2 }],
  ["ESTIMATES", estimates, { model: 2 }],
  ["FITTED", fitted, { model: 2 }],
  ["RESIDUALS", residuals, { model: 2 }],
  ["RESIDTEST", residtest, { model: 2 }],
  ["GRANGER", granger, { model: 2 }],
  ["AHEAD", ahead, { horizon: 3, model: 2 }],
  ["BANDS", bands, { horizon: 3, model: 2 }],
  ["BANDS redrawn", bands, { horizon: 3, model: 2, options: "bands=redrawn; draws=30" }],
  ["WHATIF", whatif, { plan: [[null, 21, null], [10, null, null]], model: 2 }],
  ["SHOCKPAST", shockpast, { target: 2, model: 2 }],
  ["MODEL likelihood", model, { model: 1, options: "fit=likelihood; ma=1" }],
  ["MODEL longrun", model, { model: 2, options: "longrun=1" }],
]; // prettier-ignore

describe.each(CALLS)("%s of the same range", (name, call, args) => {
  const expected = ask(call, { ...args, series });

  it("with blank rows above, under the header and below is the same", () => {
    const padded = [BLANK, BLANK, series[0], BLANK, ...series.slice(1), BLANK, BLANK];
    expect(ask(call, { ...args, series: padded })).toEqual(expected);
  });

  it("without its header has the same numbers", () => {
    const bare = errorOf(call, { ...args, series: rows });
    expect(Array.isArray(bare)).toBe(true);
    const numbers = numbersIn(bare as unknown[][]);
    const labelled = numbersIn(expected);
    // a table carries its numbers with or without names; a matrix has lag, bound or test columns beside them only with names
    for (const v of numbers) expect(labelled).toContain(v);
    if (!["LAGCOV", "LAGCORR", "PARTIALLAG"].includes(name)) expect(numbers).toHaveLength(labelled.length);
  });

  it("as rows frozen in place is left alone", () => {
    const copy = JSON.stringify(series);
    ask(call, { ...args, series });
    expect(JSON.stringify(series)).toBe(copy);
  });
});

describe("differences inside the model, or taken by hand", () => {
  const changes = withHeader(NAMES, rows.slice(1).map((row, t) => row.map((v, k) => v - rows[t][k]))); // prettier-ignore
  const inside = (options: string) => ({ series, model: 2, options: `${options}; steps=diff` });
  const byHand = (options: string) => ({ series: changes, model: 2, options });

  it.each([
    "fit=least-squares",
    "fit=yule-walker",
    "fit=nuttall-strand",
    "terms=trend; cycle=4",
    "fit=likelihood",
  ])("%s: the same coefficients, residuals, tests, shocks and forecasts", (options) => {
    const [a, b] = [inside(options), byHand(options)];
    const rtol = options.includes("likelihood") ? 1e-6 : 1e-9;
    blockClose(body(model, a, 1), body(model, b, 1), rtol);
    blockClose(body(residuals, a).slice(3), body(residuals, b).slice(2), rtol * 10);
    blockClose(body(shockpast, { ...a, target: 1 }), body(shockpast, { ...b, target: 1 }), rtol * 10);
    const p = (args: Args) => ask(residtest, args).slice(1, -3).map((row) => Number(row[4])); // prettier-ignore
    close(p(a), p(b), { rtol: rtol * 1e3 });
    blockClose(
      body(ahead, { ...a, horizon: 5 }),
      body(unstep, { series, steps: "diff", values: body(ahead, { ...b, horizon: 5 }) }),
      rtol,
    );
  });

  it("shrinkage is told of the difference: own lags are centred at none, where levels by hand keep one", () => {
    const [a, b] = [inside("fit=shrinkage"), byHand("fit=shrinkage")];
    const own = (args: Args) => Number(ask(model, args)[2][1]);
    expect(Math.abs(own(a) - own(b))).toBeGreaterThan(0.01);
  });

  it("GRANGER and ESTIMATES say the same", () => {
    blockClose(
      body(granger, inside(""), 1).map((row) => row.map((v) => v || 0)),
      body(granger, byHand(""), 1).map((row) => row.map((v) => v || 0)),
      1e-9,
    );
    blockClose(body(estimates, inside(""), 2), body(estimates, byHand(""), 2), 1e-9);
  });

  it("FITTED undoes the difference from the row before", () => {
    const levels = body(fitted, inside(""));
    body(fitted, byHand("")).forEach((row, t) => {
      if (t < 2) return;
      close(levels[t + 1], row.map((v, k) => v + rows[t][k]), { rtol: 1e-10 }); // prettier-ignore
    });
  });

  it("WHATIF with a level imposed is WHATIF of the changes with their sum imposed, where that is one cell", () => {
    const level = [[22, null, null], [null, null, null]]; // prettier-ignore
    const change = [[22 - rows[69][0], null, null], [null, null, null]]; // prettier-ignore
    blockClose(
      body(whatif, { ...inside(""), plan: level }),
      body(unstep, { series, steps: "diff", values: body(whatif, { ...byHand(""), plan: change }) }),
      1e-9,
    );
  });
});

describe("models of order 0", () => {
  const args = { series, model: 0 };
  const n = rows.length;
  const mean = NAMES.map((_, k) => rows.reduce((sum, row) => sum + row[k], 0) / n);
  const rest: Matrix = rows.map((row) => row.map((v, k) => v - mean[k]));
  const covariance = mean.map((_, i) =>
    mean.map((__, j) => rest.reduce((sum, row) => sum + row[i] * row[j], 0) / (n - 1)),
  );
  const block = ask(model, args);

  it.each(["fit=least-squares", "fit=yule-walker", "fit=nuttall-strand", "fit=shrinkage", "fit=likelihood"])(
    "%s is the means",
    (options) => close(body(model, { ...args, options }, 1)[0], mean, { rtol: 1e-9 }),
  );

  it("FITTED are the means, RESIDUALS what is left, from the first row on", () => {
    blockClose(body(fitted, args), rows.map(() => mean), 1e-12); // prettier-ignore
    blockClose(body(residuals, args), rest, 1e-12);
  });

  it("ESTIMATES are means with s/√n", () =>
    ask(estimates, args).slice(1).forEach((row, k) => {
      close(Number(row[2]), mean[k], { rtol: 1e-12 });
      close(Number(row[5]), Math.sqrt(covariance[k][k] / n), { rtol: 1e-10 });
    })); // prettier-ignore

  it("WHATIF is the regression of each series on those imposed in the same row", () => {
    const [path] = body(whatif, { ...args, plan: [[mean[0] + 1, null, null]] });
    close(path, mean.map((m, k) => m + covariance[k][0] / covariance[0][0]), { rtol: 1e-10 }); // prettier-ignore
  });

  it("responses end with the row of the shock, shares and implied covariances are those of one row", () => {
    const found = body(response, { model: block, horizon: 2 }, 2);
    [0, 1, 2].forEach((j) => [1, 2].forEach((h) => expect(found[3 * j + h]).toEqual([0, 0, 0])));
    const shares = body(shockshare, { model: block, horizon: 2 }, 2);
    expect(shares[0]).toEqual([1, 0, 0]);
    close(shares[2], shares[3], { rtol: 1e-12 });
    blockClose(body(impliedcov, { model: block, lags: 1 }, 2).slice(0, 3), covariance, 1e-10);
    expect(body(impliedcov, { model: block, lags: 1 }, 2).slice(3)).toEqual([[0, 0, 0], [0, 0, 0], [0, 0, 0]]); // prettier-ignore
  });

  it("SHOCKPAST is the mean and one shock a row; SIMULATE needs no rows to begin from", () => {
    for (const row of body(shockpast, { ...args, target: 3 })) close(row[1], mean[2], { rtol: 1e-10 });
    expect(body(simulate, { model: block, rows: 4 })).toHaveLength(4);
  });

  it("RESIDTEST looks for lags that are missing; GRANGER, ROOTS and LEADLAG's kin say what they need", () => {
    const tests = ask(residtest, args);
    expect(Number(tests.find((row) => row[2] === "portmanteau")![5])).toBe(9 * 10);
    expect(tests.find((row) => row[2] === "portmanteau")![8]).toMatch(/something is left/);
    expect(errorOf(granger, args)).toMatch(/^#N\/A This model has order 0/);
    expect(errorOf(roots, { model: block })).toMatch(/^#N\/A This model has order 0/);
  });
});
