import { describe, expect, it } from "vitest";
import { simulate } from "../../../src/core/forecast/simulate";
import type { Matrix } from "../../../src/core/matrix";
import { impliedCovariances } from "../../../src/core/moments/implied-covariance";
import { lagCovariances } from "../../../src/core/moments/lag-covariance";
import { fitModel } from "../../../src/core/var/fit";
import { stationaryMean } from "../../../src/core/var/stationary-mean";
import type { VarModel } from "../../../src/core/var/model";
import { blockClose, close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { modelWith, threeSeries } from "../../support/models";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const draw = (model: VarModel, rows: number, seed = 1, start: Matrix | null = null) =>
  simulate({ model, rows, start, seed });
const average = (x: Matrix, k: number) => x.reduce((sum, row) => sum + row[k], 0) / x.length;

describe("the stationary state", () => {
  const model = frozen(threeSeries());
  const long = draw(model, 40_000);

  it("has the moments that the model implies", () => {
    const implied = impliedCovariances(model, 3);
    const variance = Math.max(...implied[0].map((row, k) => row[k]));
    // 40,000 rows with this much memory: the sampling error of a covariance is below 1 % of the largest variance
    lagCovariances(long, [0, 1, 2, 3]).forEach((gamma, k) =>
      close(gamma, implied[k], { rtol: 0, atol: 0.03 * variance }),
    );
  });

  it("has the mean (I − ΣΦ)⁻¹c", () => {
    const [mean] = stationaryMean(model);
    mean.forEach((mu, k) => expect(Math.abs(average(long, k) - mu)).toBeLessThan(0.1));
  });

  it("fitted again, gives the model back", () => {
    const settings = settingsOfOrder(3, 2);
    const again = fitModel({ sample: sampleOf(long), plan: { kind: "fit", settings } });
    blockClose(again.coefficients, model.coefficients, 0.05);
    blockClose(again.noiseCovariance, model.noiseCovariance, 0.03);
  });

  it("begins at the mean however slowly the model forgets", () => {
    const slow = modelWith([[[0.995]]], [[1e-6]], { terms: [[5]] });
    // mean 1000; after 200 rows a start at 0 would still be 367 away
    close(draw(slow, 1)[0], [1000], { rtol: 1e-4 });
  });
});

describe("seeds", () => {
  const model = threeSeries();
  it("the same seed is the same draw, and a longer one begins with it", () => {
    expect(draw(model, 20, 7)).toEqual(draw(model, 20, 7));
    expect(draw(model, 50, 7).slice(0, 20)).toEqual(draw(model, 20, 7));
  });
  it("another seed is another draw", () => expect(draw(model, 5, 7)).not.toEqual(draw(model, 5, 8)));
});

describe("terms", () => {
  const tiny = [[1e-20, 0], [0, 1e-20]]; // prettier-ignore
  const phi = [[0.5, 0.2], [-0.1, 0.4]]; // prettier-ignore

  it("a trend is 1 at the first row drawn", () => {
    // mean a + bt with b = (I − Φ)⁻¹·slope
    const model = modelWith([phi], tiny, { terms: [[2, 1], [3, 0.5]] }); // prettier-ignore
    const mean = stationaryMean(model);
    const drawn = draw(model, 30);
    close(
      drawn,
      drawn.map((_, i) => [0, 1].map((k) => mean[0][k] + mean[1][k] * (i + 1))),
      { rtol: 1e-9 },
    );
    // and that mean solves the equation
    close(drawn[5], [0, 1].map((k) => [2, 1][k] + [3, 0.5][k] * 6 + phi[k][0] * drawn[4][0] + phi[k][1] * drawn[4][1]), { rtol: 1e-9 }); // prettier-ignore
  });

  it("season 1 is the first row drawn, by indicators and by waves", () => {
    for (const [waves, terms] of [
      [null, [[10, 20], [4, 0], [0, 8], [0, 0]]],
      [1, [[10, 20], [4, 0], [0, 8]]],
    ] as const) {
      const model = modelWith([phi], tiny, { cycle: 4, waves });
      const { settings } = model;
      const seasonal: VarModel = {
        ...model,
        settings: { ...settings, terms: "constant" },
        regressors: fitModelRegressors(waves),
        coefficients: [...terms, ...model.coefficients],
      };
      const drawn = draw(seasonal, 12);
      close(drawn.slice(4, 8), drawn.slice(0, 4), { rtol: 1e-9 });
      const t1 = (k: number) =>
        waves === null
          ? terms[0][k] + terms[1][k] * 0.75 - 0.25 * (terms[2][k] + terms[3]![k])
          : terms[0][k] + terms[1][k];
      // the fifth row is season 1 again
      close(drawn[4], [0, 1].map((k) => t1(k) + phi[k][0] * drawn[3][0] + phi[k][1] * drawn[3][1]), { rtol: 1e-9, atol: 1e-9 });
    }
  }); // prettier-ignore
});

/** constant, then the season of four rows, then one lag of two series. */
const fitModelRegressors = (waves: number | null) => [
  { kind: "constant" } as const,
  ...(waves === null
    ? [1, 2, 3].map((season) => ({ kind: "season", season }) as const)
    : (["sin", "cos"] as const).map((part) => ({ kind: "wave", wave: 1, part }) as const)),
  ...[0, 1].map((series) => ({ kind: "lag", series, lag: 1 }) as const),
];

describe("rows to start from", () => {
  it("carry the draw on: the last p of them count", () => {
    const model = threeSeries();
    const start = frozen([[9, 9, 9], [5, 6, 7], [1, 2, 3]]); // prettier-ignore
    const calm = { ...model, noiseCovariance: [[1e-20, 0, 0], [0, 1e-20, 0], [0, 0, 1e-20]] }; // prettier-ignore
    close(
      draw(calm, 1, 1, start)[0],
      [0, 1, 2].map((k) => {
        const z = [1, 1, 2, 3, 5, 6, 7];
        return z.reduce((sum, v, r) => sum + v * model.coefficients[r][k], 0);
      }),
      { rtol: 1e-9 },
    );
  });

  it("are needed by an unstable model, which then runs on from them", () => {
    const walk = modelWith([[[1]]], [[1]]);
    expect(() => draw(walk, 5)).toThrow("start-needed");
    const path = draw(walk, 400, 1, [[100]]).map(([v]) => v);
    const changes = path.map((v, t) => v - (path[t - 1] ?? 100));
    const variance = changes.reduce((sum, v) => sum + v * v, 0) / 400;
    expect(Math.abs(variance - 1)).toBeLessThan(5 * Math.sqrt(2 / 400));
  });

  it("must be as many as the model looks back", () =>
    expect(() => draw(threeSeries(), 5, 1, [[1, 2, 3]])).toThrow("block-needs-rows"));
});

it("order 0 draws the innovations around the constant", () => {
  const model = modelWith([], [[4, 1], [1, 9]], { terms: [[3, -3]] }); // prettier-ignore
  const drawn = draw(model, 20_000);
  blockClose(lagCovariances(drawn, [0])[0], [[4, 1], [1, 9]], 0.03); // prettier-ignore
  expect(Math.abs(average(drawn, 1) + 3)).toBeLessThan(0.15);
});

it("a model with drivers has none to draw with", () =>
  expect(() => draw({ ...threeSeries(), drivers: 1 }, 5)).toThrow("drivers-not-here"));
