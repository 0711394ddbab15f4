import { describe, expect, it } from "vitest";
import { type Issue } from "../../../src/core/issue";
import {
  applySteps,
  difference,
  integrate,
  planLoss,
  undoSteps,
  type Step,
} from "../../../src/core/prepare/steps";
import { close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";

const log: Step = { kind: "log" };
const sqrt: Step = { kind: "sqrt" };
const diff = (span = 1): Step => ({ kind: "diff", span });

describe("applySteps", () => {
  it("a difference after a logarithm, by hand", () => {
    const stepped = applySteps([[1], [Math.E], [Math.E ** 3]], [[log, diff()]]);
    expect(stepped[0][0]).toBeNaN();
    close([stepped[1][0], stepped[2][0]], [1, 2]);
  });

  it("differences of differences, by hand", () => {
    expect(difference([1, 4, 9, 16, 25], [1, 1])).toEqual([NaN, NaN, 2, 2, 2]);
    expect(difference([1, 4, 9, 16, 25], [2])).toEqual([NaN, NaN, 8, 12, 16]);
  });

  it("differences of different spans may be taken in either order", () => {
    const x = inventedSeries(30, 1).map(([v]) => v);
    close(difference(x, [1, 4]).slice(5), difference(x, [4, 1]).slice(5), { rtol: 0, atol: 1e-12 }); // sums may be zero
  });

  it("each series has its own steps, and a plan loses what its longest list loses", () => {
    const plan = [[], [diff(3)], [log, diff(), diff(2)]];
    expect(planLoss(plan)).toBe(3);
    const stepped = applySteps(
      inventedSeries(8, 3).map((row) => row.map(Math.abs)),
      plan,
    );
    expect(stepped.map((row) => row.map(Number.isNaN)).slice(0, 4)).toEqual([
      [false, true, true],
      [false, true, true],
      [false, true, true],
      [false, false, false],
    ]);
  });

  it("a gap stays a gap and reaches as far as a difference does", () => {
    expect(applySteps([[1], [NaN], [4], [9]], [[diff()]])).toEqual([[NaN], [NaN], [NaN], [5]]);
  });

  it.each([
    [log, 0, "log"],
    [log, -1, "log"],
    [sqrt, -1e-9, "sqrt"],
  ] as const)("%o refuses %d", (step, value, name) => {
    expect(() => applySteps([[1, 2], [3, value]], [[], [step]])).toThrow(
      expect.objectContaining({ facts: { code: "step-domain", step: name, series: 1, row: 1, value } }) as Issue,
    ); // prettier-ignore
  });

  it("the square root of zero is taken", () => {
    expect(applySteps([[0]], [[sqrt]])).toEqual([[0]]);
  });
});

describe("undoing steps", () => {
  const plans: readonly (readonly Step[])[] = [
    [],
    [log],
    [sqrt],
    [diff()],
    [diff(), diff()],
    [diff(4)],
    [diff(), diff(12)],
    [log, diff(7), diff()],
    [sqrt, diff(2), diff(2), diff()],
  ];

  it.each(
    plans.map((steps) => [
      steps.map((s) => (s.kind === "diff" ? `diff ${s.span}` : s.kind)).join(", "),
      steps,
    ]),
  )("%s: the rows that continue the steps come back as they were", (_, steps) => {
    const x = inventedSeries(60, 1, 3).map(([v]) => [Math.abs(v) + 1]);
    const plan = [steps as readonly Step[]];
    const stepped = applySteps(x, plan);
    close(undoSteps(x.slice(0, 40), plan, stepped.slice(40)), x.slice(40), { rtol: 1e-11 });
  });

  it("only the last rows matter", () => {
    const x = inventedSeries(50, 1).map(([v]) => v);
    const future = [1, 2, 3];
    expect(integrate(x, [1, 4], future)).toEqual(integrate(x.slice(-5), [1, 4], future));
  });

  it("a negative square root counts as zero", () => {
    expect(undoSteps([[4]], [[sqrt]], [[-3], [2]])).toEqual([[0], [4]]);
  });

  it("nothing to undo", () => {
    expect(undoSteps([[4]], [[]], [[-3]])).toEqual([[-3]]);
  });
});

it("inputs are left as they were", () => {
  const x = frozen(inventedSeries(20, 2).map((row) => row.map(Math.abs)));
  const plan = frozen([[log, diff()], [diff(2)]]);
  undoSteps(x, plan, frozen(applySteps(x, plan).slice(5)));
});
