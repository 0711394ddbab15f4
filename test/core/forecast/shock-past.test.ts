import { describe, expect, it } from "vitest";
import { shockPast } from "../../../src/core/forecast/shock-past";
import { responsesTo } from "../../../src/core/forecast/responses";
import { invertTriangle, multiply, transpose } from "../../../src/core/linalg";
import { fitModel } from "../../../src/core/var/fit";
import { innovationRoot } from "../../../src/core/var/innovation-root";
import { oneStep } from "../../../src/core/var/residuals";
import { stepSample } from "../../../src/core/var/stepped";
import { close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { modelWith } from "../../support/models";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const rows = frozen(inventedSeries(60, 3));

describe("by hand: one series, y = ½ of the row before + shock", () => {
  const plan = { kind: "given", model: modelWith([[[0.5]]], [[1]]) } as const;
  const past = shockPast({ sample: sampleOf([[8], [6], [1], [2]]), plan, target: 0 });

  it("the baseline halves from the first row", () => close(past.baseline, [4, 2, 1]));
  it("shocks 2, −2, 1.5 add up as they fade", () => close(past.contributions, [[2], [-1], [1]]));
  it("the actual rows are those after the first", () => close(past.actual, [6, 1, 2]));
});

describe.each([
  ["levels", {}],
  ["a trend and a season", { terms: "trend", cycle: 4 }],
  [
    "logs and differences",
    { steps: [0, 1, 2].map(() => [{ kind: "log" } as const, { kind: "diff", span: 1 } as const]) },
  ],
  ["chosen lags", { lags: [1, 3] }],
  ["Yule–Walker", { fit: "yule-walker" }],
] as const)("%s", (_, changes) => {
  const drivers = "fit" in changes ? [] : rows.map((_row, t) => [Math.sin(t * t)]);
  const sample = sampleOf(rows, drivers);
  const settings = settingsOfOrder(3, 2, changes);
  const plan = { kind: "fit", settings } as const;

  it.each([0, 1, 2])("baseline and contributions add up to the actual: series %i", (target) => {
    const { actual, baseline, contributions } = shockPast({ sample, plan, target });
    expect(actual.length).toBe(stepSample(sample, settings.steps).y.length - settings.lags.at(-1)!);
    close(
      actual,
      baseline.map((v, t) => contributions[t].reduce((sum, c) => sum + c, v)),
      { rtol: 1e-9, atol: 1e-12 }, // differences of logs cross zero
    );
  });
});

it("contributions are the responses to the shocks behind the residuals, summed over the past", () => {
  const sample = sampleOf(rows);
  const settings = settingsOfOrder(3, 2);
  const model = fitModel({ sample, plan: { kind: "fit", settings } });
  const { contributions } = shockPast({ sample, plan: { kind: "given", model }, target: 2 });
  const { residuals } = oneStep(model, stepSample(sample, settings.steps));
  const shocks = multiply(residuals, transpose(invertTriangle(innovationRoot(model))));
  const responses = responsesTo({ model, horizon: rows.length, shock: "orthogonal" });
  const direct = residuals.map((_, t) =>
    [0, 1, 2].map((j) =>
      shocks.slice(0, t + 1).reduce((sum, shock, s) => sum + responses[t - s][2][j] * shock[j], 0),
    ),
  );
  close(contributions, direct, { rtol: 1e-8, atol: 1e-12 }); // sums of both signs
});

it("without any shock the actual is the baseline", () => {
  const model = modelWith([[[0.5, 0.2], [0.1, 0.3]]], [[2, 0.5], [0.5, 1]], { terms: [[1, 4]] }); // prettier-ignore
  const path = [[3, 9]];
  for (let t = 1; t < 12; t++) {
    const [a, b] = path[t - 1];
    path.push([1 + 0.5 * a + 0.2 * b, 4 + 0.1 * a + 0.3 * b]);
  }
  const { actual, baseline, contributions } = shockPast({
    sample: sampleOf(path),
    plan: { kind: "given", model },
    target: 1,
  });
  close(actual, baseline, { rtol: 1e-14 });
  close(
    contributions,
    actual.map(() => [0, 0]),
    { atol: 1e-13 }, // all of them are zero
  );
});
