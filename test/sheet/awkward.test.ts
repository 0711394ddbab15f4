import { describe, expect, it } from "vitest";
import type { Matrix } from "../../src/core/matrix";
import { ahead } from "../../src/sheet/calls/ahead";
import { bands } from "../../src/sheet/calls/bands";
import { model } from "../../src/sheet/calls/model";
import { roots } from "../../src/sheet/calls/roots";
import { blockClose } from "../support/close";
import { inventedSeries, normals } from "../support/invented";
import { ask, errorOf, withHeader } from "../support/sheet";

/** Small samples and awkward data: every estimator is right on them, or refuses in words. */

const FITS = [
  "fit=least-squares",
  "fit=yule-walker",
  "fit=nuttall-strand",
  "fit=likelihood",
  "fit=shrinkage",
  "longrun=1",
] as const;
/** Estimators whose forecasts follow any linear mixing of the series; a prior on single coefficients does not. */
const MIXING = FITS.filter((fit) => fit !== "fit=shrinkage");

const forecast = (series: Matrix, options: string, order: unknown = 1, horizon = 4): Matrix =>
  ask(ahead, { series, horizon, model: order, options }) as number[][];
/** A forecast in words, or its rows. */
const outcome = (series: Matrix, options: string, order: unknown = 1) =>
  errorOf(ahead, { series, horizon: 4, model: order, options });

/** A refusal a person can act on, never a fault of ours. */
function sound(answer: ReturnType<typeof outcome>): void {
  if (typeof answer === "string") {
    expect(answer).toMatch(/^#(VALUE!|N\/A) .{30,255}$/s);
    expect(answer).not.toContain("fault of Comove");
  } else expect(answer.flat().every((v) => typeof v === "number" && Number.isFinite(v))).toBe(true);
}

describe.each(FITS)("%s", (options) => {
  it("series of 1e8 beside series of 1e-6 are forecast as the same series of like size", () => {
    const rows = inventedSeries(60, 3);
    const factor = [1e8, 1, 1e-6];
    const scaled = rows.map((row) => row.map((v, k) => v * factor[k]));
    blockClose(
      forecast(scaled, options).map((row) => row.map((v, k) => v / factor[k])),
      forecast(rows, options),
      options === "fit=likelihood" ? 1e-6 : 1e-9,
    );
  });

  it("a level of a million under ripples of one changes nothing", () => {
    const rows = inventedSeries(60, 2);
    blockClose(
      forecast(rows.map((row) => row.map((v) => v + 1e6)), options).map((row) => row.map((v) => v - 1e6)),
      forecast(rows, options),
      options === "fit=shrinkage" ? 1e-5 : 1e-6,
    ); // prettier-ignore
  });

  it("as few rows as there can be: p + q + K fit, one fewer is refused with the largest order named", () => {
    // order 2 of two series with a constant: 2 + 5 + 2
    const rows = inventedSeries(9, 2);
    sound(outcome(rows, options, 2));
    if (options !== "fit=likelihood") expect(Array.isArray(outcome(rows, options, 2))).toBe(true);
    expect(outcome(rows.slice(1), options, 2)).toMatch(
      /^#N\/A 2 lags of 2 series need at least 9 rows; this range has 8\./,
    );
  });

  it("one series alone", () => {
    const rows = inventedSeries(40, 1);
    expect(Array.isArray(outcome(rows, options, 2))).toBe(true);
    expect(Array.isArray(errorOf(bands, { series: rows, horizon: 3, model: 1, options }))).toBe(true);
  });

  it("twelve series", () => {
    const rows = inventedSeries(90, 12);
    const path = forecast(rows, options);
    expect(path[0]).toHaveLength(12);
    expect(path.flat().every(Number.isFinite)).toBe(true);
  });

  it("a root a hair from one, and walks: finite forecasts near the last values", () => {
    const draw = normals(5);
    let [a, b] = [0, 0];
    const walks = Array.from({ length: 80 }, () => [(a += draw()), (b = 0.999 * b + draw() + 0.1 * a)]);
    const answer = outcome(walks, options);
    sound(answer);
    if (typeof answer === "string") return;
    (answer as number[][])[0].forEach((v, k) => expect(Math.abs(v - walks[79][k])).toBeLessThan(12));
  });

  it("counts: whole numbers with many ties and zeros, as they are and under a square root", () => {
    const draw = normals(9);
    const counts = Array.from({ length: 60 }, () =>
      [draw(), draw()].map((v) => Math.max(0, Math.round(1 + v))),
    );
    sound(outcome(counts, options));
    const rooted = outcome(counts, `${options}; steps=sqrt`);
    sound(rooted);
    if (typeof rooted !== "string") expect(rooted.flat().every((v) => (v as number) >= 0)).toBe(true);
  });

  it("series that nearly repeat each other are forecast, the difference too", () => {
    const rows = inventedSeries(80, 2);
    const near = rows.map(([a, b]) => [a, a + 1e-5 * b]);
    const answer = outcome(near, options);
    sound(answer);
    if (typeof answer === "string" || options === "fit=shrinkage") return;
    const path = answer as number[][];
    const direct = forecast(rows, options);
    blockClose(path.map(([p, q]) => [p, (q - p) / 1e-5]), direct, options === "fit=likelihood" ? 1e-3 : 1e-4); // prettier-ignore
  });

  it("an outlier a thousand times the rest is passed through", () => {
    const rows = inventedSeries(60, 2).map((row, t) => (t === 30 ? [row[0] * 1000, row[1]] : row));
    sound(outcome(rows, options));
  });

  it("the block of such data is read back and gives the same forecast", () => {
    const rows = withHeader(["tiny", "huge"], inventedSeries(40, 2).map(([a, b]) => [a * 1e-7, b * 1e9])); // prettier-ignore
    const block = ask(model, { series: rows, model: 1, options });
    expect(ask(ahead, { series: rows, horizon: 3, model: block })).toEqual(
      ask(ahead, { series: rows, horizon: 3, model: 1, options }),
    );
    expect(Array.isArray(ask(roots, { model: block }))).toBe(true);
  });
});

describe.each(MIXING)("%s follows any mixing of the series", (options) => {
  it("sum and difference are forecast as sum and difference of the forecasts", () => {
    const rows = inventedSeries(70, 2);
    const mixed = rows.map(([a, b]) => [a + b, a - 2 * b]);
    const path = forecast(rows, options, 2);
    blockClose(
      forecast(mixed, options, 2),
      path.map(([a, b]) => [a + b, a - 2 * b]),
      options === "fit=likelihood" ? 1e-6 : 1e-9,
    );
  });
});
