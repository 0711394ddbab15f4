import { describe, expect, it } from "vitest";
import { forecastAhead } from "../../../src/core/forecast/ahead";
import { forecastBands, type Bands } from "../../../src/core/forecast/bands";
import { whatIf } from "../../../src/core/forecast/what-if";
import { add, multiply, solveSquare, transpose } from "../../../src/core/linalg";
import { identity, zeros, type Matrix, type MutableMatrix } from "../../../src/core/matrix";
import type { Step } from "../../../src/core/prepare/steps";
import { fitModel } from "../../../src/core/var/fit";
import { lagMatrices } from "../../../src/core/var/lag-matrices";
import type { VarModel } from "../../../src/core/var/model";
import type { ModelPlan } from "../../../src/core/var/sample";
import { settingsOfOrder, sampleOf } from "../../support/requests";
import { close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { modelWith } from "../../support/models";

const rows = frozen(inventedSeries(80, 3));
const sample = sampleOf(rows);
const _ = NaN;
const log: Step = { kind: "log" };
const diff = (span = 1): Step => ({ kind: "diff", span });
const plan = (steps: Step[][] = [[], [], []], order = 2): ModelPlan => ({
  kind: "fit",
  settings: settingsOfOrder(3, order, { steps }),
});
const STEPS: readonly (readonly [string, Step[][]])[] = [
  ["levels", [[], [], []]],
  ["differences", [[diff()], [diff()], [diff()]]],
  ["logs", [[log], [log], [log]]],
  ["a list for each", [[log, diff()], [], [{ kind: "sqrt" }, diff(4)]]],
  ["seasonal and plain differences of logs", [0, 1, 2].map(() => [log, diff(4), diff()])],
];

describe("by hand: one series, y = ½ of the row before + shock of variance 1", () => {
  const given = { kind: "given", model: modelWith([[[0.5]]], [[1]]) } as const;
  // from 8 the forecast is 4, 2, 1; rows 1 and 2 ahead have variances 1, 1.25 and covariance 0.5
  it("imposing 7 in the second row moves the first by 0.5/1.25 of the difference, the third by a half", () =>
    close(
      whatIf({ sample: sampleOf([[8]]), plan: given, imposed: [[_], [7], [_]], point: "median" }),
      [[4 + (0.5 / 1.25) * 5], [7], [3.5]],
    )); // prettier-ignore
});

/** Powers of the companion form, sums taken for differences: the covariance of the whole path, written out. */
function stackedCovariance(model: VarModel, steps: Step[][], h: number): Matrix {
  const k = model.series;
  const phi = lagMatrices(model);
  const psi: MutableMatrix[] = [];
  for (let j = 0; j < h; j++) {
    let next: MutableMatrix = j === 0 ? identity(k) : zeros(k, k);
    phi.forEach((matrix, l) => {
      if (l < j) next = add(next, multiply(matrix, psi[j - l - 1]));
    });
    psi.push(next);
  }
  // x[j] = change[j] + x[j − span] undoes a difference; done for each in turn
  const effects = psi.map((matrix) => matrix.map((row) => [...row]));
  steps.forEach((list, i) => {
    for (const step of list.filter(({ kind }) => kind === "diff").reverse()) {
      const span = (step as { span: number }).span;
      for (let j = span; j < h; j++) for (let c = 0; c < k; c++) effects[j][i][c] += effects[j - span][i][c];
    }
  });
  const whole = zeros(h * k, h * k);
  for (let a = 0; a < h; a++)
    for (let b = 0; b < h; b++)
      for (let i = 0; i <= Math.min(a, b); i++) {
        const part = multiply(multiply(effects[a - i], model.noiseCovariance), transpose(effects[b - i]));
        part.forEach((row, r) => row.forEach((v, c) => (whole[a * k + r][b * k + c] += v)));
      }
  return whole;
}

const forward = (v: number, list: Step[]): number =>
  list[0]?.kind === "log" ? Math.log(v) : list[0]?.kind === "sqrt" ? Math.sqrt(v) : v;
const back = (v: number, list: Step[]): number =>
  list[0]?.kind === "log" ? Math.exp(v) : list[0]?.kind === "sqrt" ? v ** 2 : v;

describe.each(STEPS)("%s", (_name, steps) => {
  const request = { sample, plan: plan(steps), point: "median" } as const;
  const horizon = 6;
  const free = Array.from({ length: horizon }, () => [_, _, _]);
  const plain = forecastAhead({ ...request, horizon });

  it("all blank, it is the forecast of AHEAD", () =>
    expect(whatIf({ ...request, imposed: free })).toEqual(plain));

  it("a plan that is the forecast gives the forecast", () =>
    expect(whatIf({ ...request, imposed: plain })).toEqual(plain));

  it("imposing some cells of the forecast changes nothing", () => {
    const imposed = plain.map((row, j) => row.map((v, k) => ((j + k) % 3 === 0 ? v : _)));
    close(whatIf({ ...request, imposed }), plain, { rtol: 1e-10 });
  });

  it("agrees with conditioning the stacked path by brute force, and holds what is imposed", () => {
    const imposed = frozen([[_, 21, _], [_, _, _], [9, _, 33], [_, _, _], [_, 18, _], [_, _, _]]); // prettier-ignore
    const model = fitModel(request);
    const covariance = stackedCovariance(model, steps, horizon);
    const mean = plain.flatMap((row) => row.map((v, k) => forward(v, steps[k])));
    const held = imposed.flat().flatMap((v, at) => (Number.isNaN(v) ? [] : [at]));
    const gaps = held.map((at) => [forward(imposed.flat()[at], steps[at % 3]) - mean[at]]);
    const weights = solveSquare(
      held.map((a) => held.map((b) => covariance[a][b])),
      gaps,
    );
    const expected = mean.map((v, at) =>
      back(
        held.reduce((sum, a, i) => sum + covariance[at][a] * weights[i][0], v),
        steps[at % 3],
      ),
    );
    const result = whatIf({ ...request, imposed });
    close(result.flat(), expected, { rtol: 1e-9 });
    held.forEach((at) => expect(result.flat()[at]).toBe(imposed.flat()[at]));
  });

  it("what it gives may be imposed again and gives itself", () => {
    const first = whatIf({ ...request, imposed: [[_, 21, _], [_, _, _], [9, _, 33]] }); // prettier-ignore
    expect(whatIf({ ...request, imposed: first })).toEqual(first);
    const part = first.map((row, j) => row.map((v, k) => (j !== 1 && k === 0 ? _ : v)));
    part[0][1] = 21;
    part[2][0] = 9;
    close(whatIf({ ...request, imposed: part }), first, { rtol: 1e-9 });
  });
});

describe("the mean in place of the median", () => {
  const steps = [[log, diff()], [], [{ kind: "sqrt" } as const]];
  const request = { sample, plan: plan(steps), point: "mean" } as const;

  it("all blank, it is the forecast of AHEAD", () =>
    close(
      whatIf({ ...request, imposed: [[_, _, _], [_, _, _]] }),
      forecastAhead({ ...request, horizon: 2 }),
      { rtol: 1e-14 },
    )); // prettier-ignore

  it("takes exp(μ + σ²/2) with the spread that the conditions leave", () => {
    const imposed = [[_, 21, _], [_, _, 30], [9, _, _], [_, _, _]]; // prettier-ignore
    const model = fitModel(request);
    const covariance = stackedCovariance(model, steps, 4);
    const held = [1, 5, 6];
    const inner = held.map((a) => held.map((b) => covariance[a][b]));
    const variance = covariance.map((row, at) => {
      const cross = held.map((a) => [row[a]]);
      const explained = multiply(transpose(cross), solveSquare(inner, cross))[0][0];
      return held.includes(at) ? 0 : row[at] - explained;
    });
    const median = whatIf({ ...request, point: "median", imposed }).flat();
    const expected = median.map((v, at) =>
      at % 3 === 0 ? v * Math.exp(variance[at] / 2) : at % 3 === 2 ? v + variance[at] : v,
    );
    close(whatIf({ ...request, imposed }).flat(), expected, { rtol: 1e-9 });
  });
});

describe("identities", () => {
  const imposed = [[_, 21, _], [_, _, _], [9, _, 33], [_, _, _]]; // prettier-ignore
  const result = whatIf({ sample, plan: plan(), imposed, point: "median" });
  const numbers = (x: Matrix, f: (row: readonly number[]) => number[]) => x.map(f);

  it("follows the series when these change places", () => {
    const turn = ([a, b, c]: readonly number[]) => [c, a, b];
    close(
      whatIf({ sample: sampleOf(numbers(rows, turn)), plan: plan(), imposed: numbers(imposed, turn), point: "median" }),
      numbers(result, turn),
      { rtol: 1e-10 },
    ); // prettier-ignore
  });

  it("follows the units of each series", () => {
    const units = ([a, b, c]: readonly number[]) => [a * 1e-6, b * 3, c * 1e8];
    close(
      whatIf({ sample: sampleOf(numbers(rows, units)), plan: plan(), imposed: numbers(imposed, units), point: "median" }),
      numbers(result, units),
      { rtol: 1e-9 },
    ); // prettier-ignore
  });

  it("one cell imposed at the edge of its band moves the others no further than their own bands", () => {
    const request = { sample, plan: plan(), horizon: 4, point: "median", coverage: 0.95, joint: false, draws: 0, seed: 0 } as const;
    const { low, high } = forecastBands({ ...request, bands: "known" }) as Bands;
    const moved = whatIf({ ...request, imposed: [[_, _, _], [_, high[1][1], _], [_, _, _], [_, _, _]] });
    moved.forEach((row, j) => row.forEach((v, k) => expect(v >= low[j][k] && v <= high[j][k]).toBe(true)));
  }); // prettier-ignore

  it("future drivers take part", () => {
    const drivers = Array.from({ length: 84 }, (__, t) => [Math.sin(t * t)]);
    const request = { sample: sampleOf(rows, drivers), plan: plan(), point: "median" } as const;
    const free = imposed.map(() => [_, _, _]);
    expect(whatIf({ ...request, imposed: free })).toEqual(forecastAhead({ ...request, horizon: 4 }));
  });
});

describe("plans that cannot be", () => {
  const codeOf = (imposed: Matrix, steps: Step[][], order = 1) => {
    try {
      whatIf({ sample, plan: plan(steps, order), imposed, point: "median" });
      return "none";
    } catch (thrown) {
      return (thrown as { facts: { code: string } }).facts.code;
    }
  };
  const sqrt: Step = { kind: "sqrt" };
  const logs = [[log], [log], [log]];

  it("a level that has no logarithm or root", () => {
    expect(codeOf([[_, 0, _]], logs)).toBe("plan-domain");
    expect(codeOf([[_, _, -3]], logs)).toBe("plan-domain");
    expect(codeOf([[_, _, -3]], [[], [], [sqrt]])).toBe("plan-domain");
    expect(codeOf([[-5, 0, 0]], [[], [sqrt], [sqrt]])).toBe("none");
  });

  it("thousands of cells at once", () =>
    expect(codeOf(Array.from({ length: 3000 }, () => [1, 2, 3]), [[], [], []])).toBe("plan-too-large")); // prettier-ignore

  it("cells that an exploding model cannot tell apart", () => {
    const model = modelWith([[[3, 0], [2, 3]]], [[1, 0.5], [0.5, 1]]); // prettier-ignore
    const imposed = Array.from({ length: 60 }, (__, j) => (j >= 58 ? [1, 1] : [_, _]));
    const attempt = () =>
      whatIf({ sample: sampleOf([[1, 1]]), plan: { kind: "given", model }, imposed, point: "median" });
    expect(attempt).toThrow("plan-singular");
  });

  it("one far imposed cell among ten thousand rows is weighed quickly", () => {
    const imposed = Array.from({ length: 10_000 }, (__, j) => (j === 9000 ? [_, 20, _] : [_, _, _]));
    const result = whatIf({ sample, plan: plan([[], [], []], 1), imposed, point: "median" });
    expect(result[9000][1]).toBe(20);
    expect(result.length).toBe(10_000);
  });
});
