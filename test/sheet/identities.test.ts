import { describe, expect, it } from "vitest";
import { add, multiply, transpose } from "../../src/core/linalg";
import type { Matrix } from "../../src/core/matrix";
import type { Terms } from "../../src/core/var/settings";
import { termRow } from "../../src/core/var/terms";
import { ahead } from "../../src/sheet/calls/ahead";
import { bands } from "../../src/sheet/calls/bands";
import { lagcorr } from "../../src/sheet/calls/lagcorr";
import { lagcov } from "../../src/sheet/calls/lagcov";
import { model } from "../../src/sheet/calls/model";
import { order } from "../../src/sheet/calls/order";
import { roots } from "../../src/sheet/calls/roots";
import { steps } from "../../src/sheet/calls/steps";
import { unstep } from "../../src/sheet/calls/unstep";
import { blockClose, close } from "../support/close";
import { frozen } from "../support/frozen";
import { inventedSeries } from "../support/invented";
import { ask, errorOf, withHeader } from "../support/sheet";

/** What must stay the same, or change in a known way, when the same data are written differently. */

const NAMES = ["price", "orders", "stock"];
const rows = inventedSeries(90, 3);
const positive = rows.map((row) => row.map((v, k) => Math.exp(v / (20 * (k + 1)))));
const table = withHeader(NAMES, rows);

type AnyCall = Parameters<typeof ask>[0];
const numbers = (call: AnyCall, args: Parameters<typeof ask>[1]): Matrix => ask(call, args) as number[][];
/** Without header row and the given number of label columns. */
const body = (call: AnyCall, args: Parameters<typeof ask>[1], labels = 0): Matrix =>
  ask(call, args)
    .slice(1)
    .map((row) => row.slice(labels)) as number[][];

describe("series in other units", () => {
  const [factor, offset] = [[2, 0.01, -5], [7, 0, -3]]; // prettier-ignore
  const moved = rows.map((row) => row.map((v, k) => factor[k] * v + offset[k]));
  const move = (m: Matrix) => m.map((row) => row.map((v, k) => factor[k] * v + offset[k]));

  it("lag correlations change at most their sign, lag covariances by both factors", () => {
    const sign = (i: number, j: number) => Math.sign(factor[i] * factor[j]);
    close(
      numbers(lagcorr, { series: moved, lags: 3 }),
      numbers(lagcorr, { series: rows, lags: 3 }).map((row, i) => row.map((v, j) => v * sign(i % 3, j))),
      { rtol: 1e-9, atol: 1e-13 }, // correlations near zero
    );
    close(
      numbers(lagcov, { series: moved, lags: 3 }),
      numbers(lagcov, { series: rows, lags: 3 }).map((row, i) =>
        row.map((v, j) => v * factor[i % 3] * factor[j]),
      ),
      { rtol: 1e-9, atol: 1e-12 }, // covariances near zero
    );
  });

  it("the order chosen and the ratio tests stay", () => {
    const read = (series: Matrix) => ask(order, { series, maxorder: 5 });
    expect(read(moved).map((row) => row[9])).toEqual(read(rows).map((row) => row[9]));
    close(
      body(order, { series: moved, maxorder: 5 }, 7).slice(1).map((row) => row.slice(0, 2)),
      body(order, { series: rows, maxorder: 5 }, 7).slice(1).map((row) => row.slice(0, 2)),
      { rtol: 1e-7 },
    ); // prettier-ignore
  });

  it.each(["fit=least-squares", "fit=yule-walker", "cycle=4", "terms=trend", "steps=diff"])(
    "forecasts move with the series: %s",
    (options) => {
      close(
        numbers(ahead, { series: moved, horizon: 5, model: 2, options }),
        move(numbers(ahead, { series: rows, horizon: 5, model: 2, options })),
        { rtol: 1e-9 },
      );
    },
  );

  it("bands move along, the limits of a turned series exchanged", () => {
    const before = numbers(bands, { series: rows, horizon: 4, model: 2 });
    const after = numbers(bands, { series: moved, horizon: 4, model: 2 });
    const expected = before.map((row) =>
      [0, 1, 2].flatMap((k) => {
        const three = row.slice(3 * k, 3 * k + 3).map((v) => factor[k] * v + offset[k]);
        return factor[k] < 0 ? three.reverse() : three;
      }),
    );
    close(after, expected, { rtol: 1e-9 });
  });

  it("roots stay, even in units 10¹⁸ apart", () => {
    const far = rows.map((row) => row.map((v, k) => v * [1e-9, 1, 1e9][k]));
    const moduli = (series: Matrix) =>
      body(roots, { model: ask(model, { series, model: 2 }) }).map((row) => row[0]);
    close(moduli(moved), moduli(rows), { rtol: 1e-9 });
    close(moduli(far), moduli(rows), { rtol: 1e-9 });
  });
});

describe("series in another order", () => {
  const swap = [2, 0, 1];
  const permuted = rows.map((row) => swap.map((k) => row[k]));

  it("lag matrices, forecasts and bands are permuted", () => {
    const gamma = numbers(lagcov, { series: rows, lags: [[2, -1]] });
    close(
      numbers(lagcov, { series: permuted, lags: [[2, -1]] }),
      [0, 3].flatMap((from) => swap.map((i) => swap.map((j) => gamma[from + i][j]))),
    );
    const options = "cycle=4";
    const path = numbers(ahead, { series: rows, horizon: 4, model: 2, options });
    close(
      numbers(ahead, { series: permuted, horizon: 4, model: 2, options }),
      path.map((row) => swap.map((k) => row[k])),
    );
    const limits = numbers(bands, { series: rows, horizon: 4, model: 2, options });
    close(
      numbers(bands, { series: permuted, horizon: 4, model: 2, options }),
      limits.map((row) => swap.flatMap((k) => row.slice(3 * k, 3 * k + 3))),
    );
  });

  it("criteria do not notice", () => {
    const read = (series: Matrix) => body(order, { series, maxorder: 4 }).map((row) => row.slice(0, 7));
    close(read(permuted), read(rows), { rtol: 1e-9 });
  });
});

describe("the same range written differently", () => {
  const plain = numbers(ahead, { series: rows, horizon: 3, model: 2 });
  const asText = (cells: unknown) => ask(ahead, { series: cells, horizon: 3, model: 2 });

  it("header in, header out; labels override", () => {
    expect(asText(table)).toEqual([NAMES, ...plain]);
    expect(asText(rows)).toEqual(plain);
    const call = (series: unknown, options: string) => ask(ahead, { series, horizon: 3, model: 2, options });
    expect(call(table, "labels=no")).toEqual(plain);
    expect(call(rows, "labels=yes")).toEqual([["y1", "y2", "y3"], ...plain]);
    expect(call(table, "labels=auto")).toEqual([NAMES, ...plain]);
  });

  const blank = [null, "", undefined];
  it.each([
    ["blank rows above the header", [blank, blank, ...table]],
    ["blank rows under the header", [NAMES, blank, blank, ...rows]],
    ["blank rows below", [...table, blank, blank]],
    ["a whole column", [...table, ...Array.from({ length: 5000 }, () => blank)]],
    ["blanks of spaces", [["  ", " ", ""], ...table, [" ", "", null]]],
    ["blanks round the names", [NAMES.map((name) => `  ${name} `), ...rows]],
  ])("%s change nothing", (_, cells) => {
    expect(asText(cells)).toEqual([NAMES, ...plain]);
  });

  it("an argument may come as a bare value, in a cell, or as a rich value", () => {
    const call = (horizon: unknown, order_: unknown) => ask(ahead, { series: rows, horizon, model: order_ });
    for (const three of [3, [[3]], [[{ type: "Double", basicValue: 3, numberFormat: "0" }]]])
      for (const two of [2, [[2]], { type: "Double", basicValue: 2 }])
        expect(call(three, two)).toEqual(plain);
  });

  it("row-by-row results keep their rows", () => {
    const out = ask(steps, { series: [blank, NAMES, blank, ...rows.slice(0, 5), blank], steps: "diff" });
    expect(out.length).toBe(1 + 5);
    expect(out[0]).toEqual(NAMES);
    expect(out[1]).toEqual(["", "", ""]);
  });

  it("the output of STEPS may be passed on", () => {
    const changes = ask(steps, { series: table, steps: "diff" });
    const own = numbers(lagcorr, { series: changes, lags: 2, options: "labels=no" });
    const byHand = rows.slice(1).map((row, t) => row.map((v, k) => v - rows[t][k]));
    close(own, numbers(lagcorr, { series: byHand, lags: 2 }));
  });

  it("a row is counted in the range as passed", () => {
    const damaged = [blank, NAMES, blank, ...rows.slice(0, 20)].map((row) => [...row] as unknown[]);
    damaged[13][0] = "n/a";
    expect(errorOf(lagcov, { series: damaged, lags: 1 })).toBe(
      "#VALUE! Series price, row 14: text 'n/a' is not a number. Correct the cell.",
    );
  });
});

describe("options written differently", () => {
  const read = (options: unknown) => ask(bands, { series: positive, horizon: 3, model: [[2]], options });
  const expected = read("terms=trend; steps=log, diff; coverage=0.9; bands=known; joint=yes");

  it.each([
    ["capitals and blanks", "  TERMS = Trend ;Steps= LOG ,diff;; coverage = .90; Bands=KNOWN; joint=Yes ;"],
    ["a decimal comma", "terms=trend; steps=log, diff; coverage=0,9; bands=known; joint=yes"],
    ["lines", "terms=trend\nsteps=log, diff\ncoverage=0.9\nbands=known\njoint=yes"],
    ["one list per series", "terms=trend; steps=log, diff|log, diff| log,diff 1; coverage=0.9; bands=known; joint=yes"],
    ["texts in a column", [["terms=trend; steps=log, diff"], [null], ["coverage=0.9; bands=known; joint=yes"]]],
    ["two columns", [["terms", "trend"], ["steps", "log, diff"], ["coverage", 0.9], ["bands", "known"], ["joint", true]]],
    ["two columns with blank rows", [["", ""], ["terms", "trend"], ["steps", "log, diff"], [null, null], ["coverage", "0,9"], ["bands", "known"], ["JOINT", "yes"]]],
  ])("%s", (_, options) => expect(read(options)).toEqual(expected)); // prettier-ignore
});

describe("steps", () => {
  const path = (series: Matrix, options: string, horizon = 4) =>
    numbers(ahead, { series, horizon, model: 2, options });

  it.each(["", "; terms=trend; cycle=4", "; fit=yule-walker"])(
    "differences inside equal differences by hand%s",
    (more) => {
      const changes = rows.slice(1).map((row, t) => row.map((v, k) => v - rows[t][k]));
      let level: readonly number[] = rows.at(-1)!;
      const expected = path(changes, more).map((row) => (level = row.map((v, k) => level[k] + v)));
      close(path(rows, `steps=diff${more}`), expected, { rtol: 1e-10 });
    },
  );

  it("a logarithm inside equals a logarithm by hand", () => {
    const logs = positive.map((row) => row.map(Math.log));
    close(path(positive, "steps=log"), path(logs, "").map((row) => row.map(Math.exp)), { rtol: 1e-10 }); // prettier-ignore
  });

  it("none leaves a series as it is", () => {
    expect(path(positive, "steps=none")).toEqual(path(positive, ""));
    expect(path(positive, "steps=none | log | diff")).not.toEqual(path(positive, ""));
  });

  it.each(["none", "log", "sqrt", "diff", "diff 4", "log, diff, diff 12", "log | diff | sqrt, diff 2"])(
    "UNSTEP undoes STEPS: %s",
    (text) => {
      const stepped = ask(steps, { series: withHeader(NAMES, positive), steps: text });
      const undone = ask(unstep, {
        series: withHeader(NAMES, positive.slice(0, 70)),
        steps: text,
        values: [stepped[0], ...stepped.slice(71)],
      });
      expect(undone[0]).toEqual(NAMES);
      close(undone.slice(1) as number[][], positive.slice(70), { rtol: 1e-11 });
    },
  );

  it("UNSTEP takes the forecast of the stepped series to that of AHEAD", () => {
    const text = "log, diff 4";
    const stepped = ask(steps, { series: positive, steps: text });
    const values = ask(ahead, { series: stepped, horizon: 6, model: 1 });
    close(
      numbers(unstep, { series: positive, steps: text, values }),
      numbers(ahead, { series: positive, horizon: 6, model: 1, options: `steps=${text}` }),
      { rtol: 1e-10 },
    );
  });

  it("steps that leave no row are refused", () => {
    const few = { series: positive.slice(0, 4), steps: "diff 4" };
    const message = "#N/A The steps use up 4 rows, and the range has 4. Use shorter differences or more rows.";
    expect(errorOf(steps, few)).toBe(message);
    expect(errorOf(ahead, { series: few.series, horizon: 1, model: 0, options: "steps=diff 4" })).toBe(message);
    // what continues four rows needs no more than four
    expect(ask(unstep, { ...few, values: [[0, 0, 0]] })).toEqual([positive[0]]);
    expect(errorOf(unstep, { ...few, steps: "diff 5", values: [[0, 0, 0]] })).toMatch(/^#N\/A The steps use up 5 rows/);
  }); // prettier-ignore

  it("the steps may stand in cells, one per series", () => {
    expect(ask(steps, { series: positive, steps: [["log", null, "diff"]] })).toEqual(
      ask(steps, { series: positive, steps: "log | none | diff" }),
    );
  });
});

describe("order 0", () => {
  it("with a constant forecasts the means", () => {
    const means = rows[0].map((_, k) => rows.reduce((sum, row) => sum + row[k], 0) / rows.length);
    close(numbers(ahead, { series: rows, horizon: 2, model: 0 }), [means, means]);
  });

  it("with a season forecasts the means of the seasons", () => {
    const path = numbers(ahead, { series: rows.slice(0, 88), horizon: 4, model: 0, options: "cycle=4" });
    path.forEach((row, j) => {
      const own = rows.slice(0, 88).filter((_, t) => t % 4 === j);
      close(row, rows[0].map((_, k) => own.reduce((sum, r) => sum + r[k], 0) / own.length)); // prettier-ignore
    });
  });

  it("with a trend forecasts a straight line", () => {
    const [a, b, c] = numbers(ahead, { series: rows, horizon: 3, model: 0, options: "terms=trend" });
    close(c.map((v, k) => v - b[k]), b.map((v, k) => v - a[k]), { rtol: 1e-9 }); // prettier-ignore
  });

  it("bands of fitted coefficients are those of a mean: s²(1 + 1/n)", () => {
    const one = rows.map(([v]) => [v]);
    const mean = one.reduce((sum, [v]) => sum + v, 0) / one.length;
    const variance = one.reduce((sum, [v]) => sum + (v - mean) ** 2, 0) / (one.length - 1);
    const [[low, point, high]] = numbers(bands, { series: one, horizon: 1, model: 0 });
    close(point, mean);
    close(
      (high - low) / 2,
      1.959963984540054 * Math.sqrt(variance * (1 + 1 / one.length)),
      { rtol: 1e-12 },
    ); // prettier-ignore
  });
});

describe("windows that move", () => {
  const options = "terms=trend; cycle=4";

  it("a fit does not depend on where the trend and the season start to count", () => {
    const late = numbers(ahead, {
      series: rows.slice(9),
      horizon: 5,
      model: 2,
      options: `${options}; start=10`,
    });
    const early = numbers(ahead, { series: rows.slice(9), horizon: 5, model: 2, options });
    close(late, early, { rtol: 1e-9 });
  });

  it.each(["", "; steps=diff", "; steps=diff 4, diff"])(
    "a block used on the last rows alone with their start forecasts the same%s",
    (more) => {
      const block = ask(model, { series: rows, model: 2, options: options + more });
      const whole = numbers(ahead, { series: rows, horizon: 5, model: block });
      // the steps use up as many rows at the top of the window as at the top of the range, so the shift is 70
      const window = numbers(ahead, {
        series: rows.slice(70),
        horizon: 5,
        model: block,
        options: "start=71",
      });
      close(window, whole, { rtol: 1e-10 });
    },
  );

  it("a block keeps the start it was fitted with", () => {
    const block = ask(model, { series: rows.slice(9), model: 2, options: `${options}; start=10` });
    expect(block[0][0]).toContain("start=10");
    close(
      numbers(ahead, { series: rows.slice(9), horizon: 3, model: block }),
      numbers(ahead, { series: rows.slice(9), horizon: 3, model: 2, options: `${options}; start=10` }),
    );
  });
});

describe("drivers", () => {
  const driver = Array.from({ length: 100 }, (_, t) => [Math.sin(t * t)]);
  const path = (series: unknown, drivers: unknown) => ask(ahead, { series, horizon: 4, model: 1, drivers });
  const expected = path(rows, driver);

  it("with and without header, and more rows than needed", () => {
    expect(path(rows, [["rain"], ...driver])).toEqual(expected);
    expect(path(rows, driver.slice(0, 94))).toEqual(expected);
    expect(path(table, driver)).toEqual([NAMES, ...expected]);
  });

  it("are aligned with the first body row as passed, blank rows or not", () => {
    const blank = [null, null, null];
    expect(path([NAMES, blank, blank, ...rows], [["rain"], [5], [6], ...driver])).toEqual([
      NAMES,
      ...expected,
    ]);
    expect(path([blank, blank, ...rows], [[null], [5], ...driver])).toEqual(expected);
  });

  it("matter", () => {
    expect(path(rows, null)).not.toEqual(expected);
    const late = driver.map(([v], t) => [t >= 90 ? v + 1 : v]);
    expect(path(rows, late)).not.toEqual(expected);
  });

  it("have no place in a fit from the moments of the series", () => {
    for (const order_ of [1, null])
      expect(errorOf(ahead, { series: table, horizon: 4, model: order_, options: "fit=yule-walker", drivers: driver })).toBe(
        "#VALUE! The fit yule-walker takes no drivers. Leave the drivers out, or use fit=least-squares.",
      );
  }); // prettier-ignore

  it("a driver that is a scaled copy of the trend is named", () => {
    const line = Array.from({ length: 94 }, (_, t) => [2 * t]);
    expect(errorOf(ahead, { series: table, horizon: 4, model: 1, options: "terms=trend", drivers: [["rain"], ...line] })).toMatch(
      /^#N\/A .*rain.* exactly\. /,
    ); // prettier-ignore
  });
});

describe("Yule–Walker with terms", () => {
  it.each<[Terms, number | null, number | null]>([
    ["none", null, null],
    ["constant", null, null],
    ["trend", null, null],
    ["quadratic", null, null],
    ["constant", 4, null],
    ["trend", 7, 2],
    ["trend", 4, 2],
    ["none", 3, null],
  ])("terms=%s, cycle %s, waves %s: the forecast is the terms' own plus that of what they leave", (terms, cycle, waves) => {
    const options = [`terms=${terms}`, cycle && `cycle=${cycle}`, waves && `waves=${waves}`].filter(Boolean).join("; ");
    const fitted = numbers(ahead, { series: rows, horizon: 6, model: 2, options: `fit=yule-walker; ${options}` });
    // order 0 on the same terms: their coefficients, what they leave of each row, and what lies ahead of them
    const coefficients = body(model, { series: rows, model: 0, options }, 1).slice(0, -3);
    const own = (t: number) =>
      rows[0].map((_, k) => termRow({ terms, cycle, waves }, t).reduce((sum, d, r) => sum + d * coefficients[r][k], 0));
    const rest = rows.map((row, t) => row.map((v, k) => v - own(t + 1)[k]));
    const restAhead = numbers(ahead, { series: rest, horizon: 6, model: 2, options: "fit=yule-walker; terms=none" });
    blockClose(fitted, restAhead.map((row, j) => row.map((v, k) => v + own(rows.length + j + 1)[k])), 1e-9);
  }); // prettier-ignore

  it("one series: the scalar recursion gives the same coefficients", () => {
    const x = rows.map(([v]) => v);
    const n = x.length;
    const mean = x.reduce((a, b) => a + b, 0) / n;
    const gamma = [0, 1, 2, 3].map((k) => x.slice(k).reduce((sum, v, t) => sum + (v - mean) * (x[t] - mean), 0) / n);
    let phi: number[] = [];
    let variance = gamma[0];
    for (let k = 1; k <= 3; k++) {
      const last = (gamma[k] - phi.reduce((sum, f, j) => sum + f * gamma[k - 1 - j], 0)) / variance;
      phi = [...phi.map((f, j) => f - last * phi[k - 2 - j]), last];
      variance *= 1 - last * last;
    }
    const block = body(model, { series: x.map((v) => [v]), model: 3, options: "fit=yule-walker" }, 1);
    close(block.map(([v]) => v), [
      mean * (1 - phi.reduce((a, b) => a + b, 0)),
      ...phi,
      (variance * n) / (n - 4),
    ]);
  }); // prettier-ignore

  it("lags left out solve the moment equations of the lags used", () => {
    const options = "fit=yule-walker; uselags=1 4; terms=none";
    const block = body(model, { series: rows, options }, 1);
    const gamma = (k: number): Matrix => {
      const at = Math.abs(k);
      const [g] = [rows.slice(at).reduce<number[][]>(
        (sum, row, t) => sum.map((line, i) => line.map((v, j) => v + row[i] * rows[t][j] / rows.length)),
        [[0, 0, 0], [0, 0, 0], [0, 0, 0]],
      )];
      return k >= 0 ? g : transpose(g);
    };
    const phi = [block.slice(0, 3), block.slice(3, 6)].map((m) => transpose(m));
    for (const k of [1, 4])
      blockClose(add(multiply(phi[0], gamma(k - 1)), multiply(phi[1], gamma(k - 4))), gamma(k), 1e-11);
  }); // prettier-ignore
});

describe("one series", () => {
  it("is the scalar regression", () => {
    const x = rows.map(([v]) => v);
    const block = body(model, { series: x.map((v) => [v]), model: 1 }, 1);
    const [y, z] = [x.slice(1), x.slice(0, -1)];
    const middle = (v: number[]) => v.reduce((a, b) => a + b, 0) / v.length;
    const slope =
      y.reduce((sum, v, t) => sum + (v - middle(y)) * (z[t] - middle(z)), 0) /
      z.reduce((sum, v) => sum + (v - middle(z)) ** 2, 0);
    const height = middle(y) - slope * middle(z);
    const left = y.reduce((sum, v, t) => sum + (v - height - slope * z[t]) ** 2, 0);
    close(block.flat(), [height, slope, left / (y.length - 2)], { rtol: 1e-10 });
  });
});

describe("residuals", () => {
  it("of least squares are orthogonal to every regressor", () => {
    const block = body(model, { series: rows, model: 2, options: "terms=trend" }, 1).slice(0, -3);
    const z = rows.slice(2).map((_, t) => [1, t + 3, ...rows[t + 1], ...rows[t]]);
    const left = rows.slice(2).map((row, t) =>
      row.map((v, k) => v - z[t].reduce((sum, d, r) => sum + d * block[r][k], 0)),
    );
    const products = multiply(transpose(z), left);
    const sizes = transpose(z).map((column) => Math.hypot(...column));
    products.forEach((row, r) => row.forEach((v) => expect(Math.abs(v) / sizes[r]).toBeLessThan(1e-9)));
  }); // prettier-ignore
});

it("ranges are left as they were", () => {
  const args = frozen({ series: table, horizon: 3, model: 2, options: [["terms", "trend"]], drivers: null });
  ask(ahead, args);
  ask(bands, args);
  ask(model, args);
  ask(roots, { model: frozen(ask(model, args)) });
  ask(lagcorr, frozen({ series: table, lags: [[1, -1]] }));
  ask(steps, frozen({ series: table, steps: "diff" }));
});
