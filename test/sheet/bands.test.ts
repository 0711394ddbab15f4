import { describe, expect, it } from "vitest";
import { normalQuantile } from "../../src/core/distributions";
import { add, multiply, transpose } from "../../src/core/linalg";
import type { Matrix } from "../../src/core/matrix";
import { designOf } from "../../src/core/var/design";
import { leastSquares } from "../../src/core/var/least-squares";
import { stepSample } from "../../src/core/var/stepped";
import { ahead } from "../../src/sheet/calls/ahead";
import { bands } from "../../src/sheet/calls/bands";
import { model } from "../../src/sheet/calls/model";
import { steps as stepsCall } from "../../src/sheet/calls/steps";
import { unstep } from "../../src/sheet/calls/unstep";
import { toCells } from "../../src/sheet/cell";
import { readModelBlock } from "../../src/sheet/model-block";
import { close } from "../support/close";
import { inventedSeries, normals } from "../support/invented";
import { ask, errorOf } from "../support/sheet";

const rows = inventedSeries(80, 2);
const positive = rows.map((row) => row.map((v, k) => 5 + Math.exp(v / (12 * (k + 1)))));
const reach95 = normalQuantile(0.975);

type Args = Parameters<typeof ask>[1];
const read = (args: Args): Matrix => ask(bands, args) as number[][];
const low = (table: Matrix) => table.map((row) => row.filter((_, j) => j % 3 === 0));
const point = (table: Matrix) => table.map((row) => row.filter((_, j) => j % 3 === 1));
const high = (table: Matrix) => table.map((row) => row.filter((_, j) => j % 3 === 2));
const half = (table: Matrix) => {
  const [top, bottom] = [high(table), low(table)];
  return top.map((row, j) => row.map((v, k) => (v - bottom[j][k]) / 2));
};
const blockOf = (cells: ReturnType<typeof ask>) => readModelBlock(toCells(cells)!).model;

describe("the middle", () => {
  it.each(["", "steps=diff", "steps=log", "steps=sqrt, diff", "point=mean; steps=log", "fit=yule-walker"])(
    "is the forecast of AHEAD: %s",
    (options) => {
      const args = { series: positive, horizon: 5, model: 2, options };
      expect(point(read(args))).toEqual(ask(ahead, args));
    },
  );

  it("lies between its limits, which grow apart with the horizon", () => {
    const table = read({ series: rows, horizon: 12, model: 2 });
    table.forEach((row) => [0, 3].forEach((j) => expect(row[j] < row[j + 1] && row[j + 1] < row[j + 2]).toBe(true)));
    const known = half(read({ series: rows, horizon: 12, model: 2, options: "bands=known" }));
    known.slice(1).forEach((row, j) => row.forEach((v, k) => expect(v).toBeGreaterThanOrEqual(known[j][k])));
  }); // prettier-ignore
});

describe("coverage", () => {
  const width = (options: string) => half(read({ series: rows, horizon: 3, model: 1, options }));

  it("widths are normal quantiles apart", () => {
    const base = width("coverage=0.95");
    for (const coverage of [0.5, 0.8, 0.99, 0.999999])
      close(
        width(`coverage=${coverage}`),
        base.map((row) => row.map((v) => (v * normalQuantile((1 + coverage) / 2)) / reach95)),
        { rtol: 1e-11 },
      );
  });

  it("joint bands are those of 1 − (1 − coverage)/(h·K), hence wider", () => {
    const joint = width("joint=yes");
    close(joint, width(`coverage=${1 - 0.05 / 6}`), { rtol: 1e-11 });
    joint.forEach((row, j) => row.forEach((v, k) => expect(v).toBeGreaterThan(width("")[j][k])));
  });

  it("ten thousand rows jointly, at a coverage close to 1, reach as far as the tail says", () => {
    const args = { series: rows, horizon: 10_000, model: 1 };
    const joint = half(read({ ...args, options: "joint=yes; coverage=0.999999999; bands=known" }));
    const single = half(read({ ...args, options: "bands=known" }));
    // 1 − coverage keeps seven digits here
    const reach = -normalQuantile(1e-9 / 20_000 / 2);
    close(reach, 7.531918930561415, { rtol: 1e-12 }); // R: -qnorm(2.5e-14)
    close(joint[9_999][0] / single[9_999][0], reach / reach95, { rtol: 1e-8 });
  });
});

describe("coefficients' sampling error", () => {
  it("one row ahead the variance is Σ(1 + zᵀ(ZᵀZ)⁻¹z)", () => {
    const z = rows.slice(2).map((_, t) => [1, ...rows[t + 1], ...rows[t]]);
    const last = [1, ...rows.at(-1)!, ...rows.at(-2)!];
    const { inverseRoot } = leastSquares({ regressors: last.map((_, driver) => ({ kind: "driver", driver })), z, y: rows.slice(2) }); // prettier-ignore
    const leverage = multiply([last], inverseRoot)[0].reduce((sum, v) => sum + v * v, 0);
    const sigma = blockOf(ask(model, { series: rows, model: 2 })).noiseCovariance;
    close(
      half(read({ series: rows, horizon: 1, model: 2 })),
      [sigma.map((row, k) => reach95 * Math.sqrt(row[k] * (1 + leverage)))],
      { rtol: 1e-11 },
    );
  });

  it("makes bands wider, and less so with more rows", () => {
    const share = (n: number) => {
      const series = inventedSeries(400, 2).slice(0, n);
      const fitted = half(read({ series, horizon: 4, model: 2 }));
      const known = half(read({ series, horizon: 4, model: 2, options: "bands=known" }));
      return fitted.map((row, j) => row[0] / known[j][0]);
    };
    share(400).forEach((v, j) => expect(v > 1 && v < share(40)[j]).toBe(true));
  });

  it.each([
    ["", null],
    ["terms=trend; cycle=4", null],
    ["uselags=1 3", null],
    ["steps=diff", null],
    ["steps=diff 4, diff", null],
    ["", rows.concat(rows).map((_, t) => [Math.sin(t * t)])],
    ["fit=yule-walker", null],
  ])("is D·Cov·Dᵀ with D from small edits of the block: %s", (options, drivers) => {
    const args = { series: rows, horizon: 4, drivers };
    const order = options.startsWith("uselags") ? null : 2;
    const block = ask(model, { series: rows, model: order, options, drivers });
    const own = blockOf(block);
    const q = own.coefficients.length;
    const path = (cells: unknown) => ask(ahead, { ...args, model: cells }) as number[][];
    // D[h, series] by coefficient (r, equation), central differences
    const derivative = Array.from({ length: q }, (_, r) =>
      [0, 1].map((equation) => {
        const value = own.coefficients[r][equation];
        const width = 1e-5 * Math.max(1e-2, Math.abs(value));
        const moved = (by: number) =>
          path(block.map((row, i) => row.map((v, j) => (i === r + 1 && j === equation + 1 ? value + by : v))));
        const [up, down] = [moved(width), moved(-width)];
        return up.map((row, j) => row.map((v, k) => (v - down[j][k]) / (2 * width)));
      }),
    );
    const sample = { series: rows, drivers: drivers ?? [], start: 1 };
    const { settings, noiseCovariance: sigma } = own;
    const { inverseRoot } = leastSquares(designOf(stepSample(sample, settings.steps), settings, settings.lags.at(-1)!));
    const cov = multiply(inverseRoot, transpose(inverseRoot));
    const expected = path(block).map((row, j) =>
      row.map((_, k) => {
        let sum = 0;
        for (let r = 0; r < q; r++)
          for (let s = 0; s < q; s++)
            for (const a of [0, 1])
              for (const b of [0, 1])
                sum += derivative[r][a][j][k] * cov[r][s] * sigma[a][b] * derivative[s][b][j][k];
        return sum;
      }),
    );
    const fitted = half(read({ ...args, model: block }));
    const known = half(read({ ...args, model: block, options: "bands=known" }));
    const extra = fitted.map((row, j) => row.map((v, k) => (v ** 2 - known[j][k] ** 2) / reach95 ** 2));
    // central differences lose about half of the digits
    close(extra, expected, { rtol: 1e-5 });
  }); // prettier-ignore

  it("is that of a block's own Σ with the regressors of the range", () => {
    const block = ask(model, { series: rows, model: 1 });
    const doubled = block.map((row, i) => (i > 3 ? [row[0], ...row.slice(1).map((v) => 4 * (v as number))] : row));
    close(
      half(read({ series: rows, horizon: 3, model: doubled })),
      half(read({ series: rows, horizon: 3, model: block })).map((row) => row.map((v) => 2 * v)),
      { rtol: 1e-11 },
    );
  }); // prettier-ignore

  it("needs the rows of a fit; known coefficients do not", () => {
    const block = ask(model, { series: rows, model: 2 });
    const few = { series: rows.slice(-4), horizon: 2, model: block };
    expect(errorOf(bands, few)).toMatch(
      /^#N\/A 2 lags of 2 series need at least 9 rows; this range has 4\. /,
    );
    expect(errorOf(bands, { ...few, options: "bands=known" })).toBeInstanceOf(Array);
  });
});

describe("the mean after a logarithm or a square root", () => {
  const both = (options: string) => {
    const args = { series: positive, horizon: 4, model: 2 };
    const known = read({ ...args, options: `${options}; bands=known` });
    const mean = ask(ahead, { ...args, options: `${options}; point=mean` }) as number[][];
    return { known, mean };
  };

  it.each(["steps=log", "steps=log, diff"])("exp(μ + σ²/2): %s", (options) => {
    const { known, mean } = both(options);
    const expected = point(known).map((row, j) =>
      row.map((v, k) => {
        const deviation = Math.log(high(known)[j][k] / low(known)[j][k]) / (2 * reach95);
        return v * Math.exp(deviation ** 2 / 2);
      }),
    );
    close(mean, expected, { rtol: 1e-11 });
  });

  it.each(["steps=sqrt", "steps=sqrt, diff"])("μ² + σ²: %s", (options) => {
    const { known, mean } = both(options);
    const root = (m: Matrix) => m.map((row) => row.map(Math.sqrt));
    const [top, bottom] = [root(high(known)), root(low(known))];
    const expected = point(known).map((row, j) =>
      row.map((v, k) => v + ((top[j][k] - bottom[j][k]) / (2 * reach95)) ** 2),
    );
    close(mean, expected, { rtol: 1e-10 });
  });

  it("without such a step, mean and median are one", () => {
    const args = { series: positive, horizon: 4, model: 2 };
    for (const steps of ["none", "diff", "diff 4"])
      expect(ask(ahead, { ...args, options: `steps=${steps}; point=mean` })).toEqual(
        ask(ahead, { ...args, options: `steps=${steps}` }),
      );
  });

  it("only the series with the step moves", () => {
    const args = { series: positive, horizon: 3, model: 1 };
    const mean = ask(ahead, { ...args, options: "steps=log | none; point=mean" }) as number[][];
    const median = ask(ahead, { ...args, options: "steps=log | none" }) as number[][];
    mean.forEach((row, j) => {
      expect(row[0]).toBeGreaterThan(median[j][0]);
      expect(row[1]).toBe(median[j][1]);
    });
  });

  it("a lower limit below zero on the root scale counts as zero", () => {
    const near = rows.map((row) => row.map((v, k) => (v / (30 * (k + 1))) ** 4));
    const table = read({ series: near, horizon: 3, model: 1, options: "steps=sqrt; coverage=0.999999" });
    expect(Math.min(...low(table).flat())).toBe(0);
  });
});

describe("known coefficients against simulation", () => {
  const paths = 20_000;
  const horizon = 4;

  it.each(["none", "log", "sqrt", "diff", "diff 4", "log, diff", "log, diff 4, diff", "sqrt, diff | log"])(
    "steps=%s",
    { timeout: 60_000 },
    (text) => {
      const options = `steps=${text}`;
      const block = ask(model, { series: positive, model: 1, options });
      const { coefficients, noiseCovariance: sigma } = blockOf(block);
      const stepped = ask(stepsCall, { series: positive, steps: text });
      const last = stepped.at(-1) as number[];
      const root = [
        [Math.sqrt(sigma[0][0]), 0],
        [sigma[1][0] / Math.sqrt(sigma[0][0]), Math.sqrt(sigma[1][1] - sigma[1][0] ** 2 / sigma[0][0])],
      ];
      const draw = normals(99);
      const ends: number[][] = [[], []];
      // many paths of the stepped series at once, each taken back to original units by UNSTEP
      for (let i = 0; i < paths; i++) {
        let before: readonly number[] = last;
        const path = Array.from({ length: horizon }, () => {
          const e = [draw(), draw()];
          const [noise] = multiply([e], transpose(root));
          [before] = add(multiply([[1, ...before]], coefficients), [noise]);
          return before;
        });
        const level = inOriginalUnits(positive, text, path);
        level.forEach((v, k) => ends[k].push(v));
      }
      const table = read({ series: positive, horizon, model: block, options: "bands=known; coverage=0.8" });
      ends.forEach((values, k) => {
        values.sort((a, b) => a - b);
        const spread = values[Math.round(0.9 * paths)] - values[Math.round(0.1 * paths)];
        // a quantile of 20,000 draws errs by about 1 % of the spread
        const off = [0.1, 0.5, 0.9].map((p, i) => Math.abs(values[Math.round(p * paths)] - table[horizon - 1][3 * k + i]));
        expect(Math.max(...off) / spread).toBeLessThan(0.025);
      });
      if (/log|sqrt/.test(text)) {
        const mean = (ask(ahead, { series: positive, horizon, model: block, options: "point=mean" }) as number[][]).at(-1)!;
        ends.forEach((values, k) => {
          const average = values.reduce((a, b) => a + b, 0) / paths;
          const deviation = Math.sqrt(values.reduce((a, v) => a + (v - average) ** 2, 0) / paths);
          // five standard errors of an average of 20,000
          expect(Math.abs(average - mean[k])).toBeLessThan((5 * deviation) / Math.sqrt(paths));
        });
      }
    },
  ); // prettier-ignore

  it("paths are taken back as UNSTEP does", () => {
    const path = [[0.1, 0.2], [0.05, -0.1], [0, 0.1]]; // prettier-ignore
    for (const text of ["none", "diff 4", "log, diff 4, diff", "sqrt, diff | log"])
      close(
        [inOriginalUnits(positive, text, path)],
        (ask(unstep, { series: positive, steps: text, values: path }) as number[][]).slice(-1),
        { rtol: 1e-12 },
      );
  });
});

/** The last row of a path in original units, by the definition of each step. */
function inOriginalUnits(past: Matrix, text: string, path: Matrix): number[] {
  const lists = text.split("|").map((list) => list.split(",").map((word) => word.trim()));
  return past[0].map((_, k) => {
    const list = (lists[k] ?? lists[0]).filter((word) => word !== "none");
    const power = list[0] === "log" || list[0] === "sqrt" ? list[0] : null;
    const spans = list.filter((word) => word.startsWith("diff")).map((word) => Number(word.slice(4) || 1));
    let values = past.slice(-20).map((row) => (power === "log" ? Math.log(row[k]) : power ? Math.sqrt(row[k]) : row[k]));
    const stages = spans.map((span) => {
      const stage = values;
      values = values.slice(span).map((v, t) => v - stage[t]);
      return { stage: [...stage], span };
    });
    let future = path.map((row) => row[k]);
    for (const { stage, span } of stages.reverse()) {
      future.forEach((change) => stage.push(stage[stage.length - span] + change));
      future = stage.slice(-path.length);
    }
    const end = future.at(-1)!;
    return power === "log" ? Math.exp(end) : power ? Math.max(0, end) ** 2 : end;
  });
} // prettier-ignore
