import { describe, expect, it } from "vitest";
import { forecastBands, type Bands, type BandsRequest } from "../../../src/core/forecast/bands";
import { quantileOf } from "../../../src/core/forecast/quantile";
import { redrawnPaths } from "../../../src/core/forecast/redraw";
import { redrawnBands } from "../../../src/core/forecast/redrawn-bands";
import type { Matrix } from "../../../src/core/matrix";
import { randomSource } from "../../../src/core/random";
import { designOf } from "../../../src/core/var/design";
import { fitModel, fitSettings } from "../../../src/core/var/fit";
import { flatLeastSquares } from "../../../src/core/var/flat-least-squares";
import { leastSquares } from "../../../src/core/var/least-squares";
import { predictRow, oneStep } from "../../../src/core/var/residuals";
import { orderOf, type ModelSettings } from "../../../src/core/var/settings";
import { stepSample } from "../../../src/core/var/stepped";
import { termRow } from "../../../src/core/var/terms";
import { blockClose, close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const rows = frozen(inventedSeries(80, 3));
const driver = Array.from({ length: 90 }, (_, t) => [Math.cos(t * t)]);

const request = (changes: Partial<ModelSettings> = {}, more: Partial<BandsRequest> = {}): BandsRequest => ({
  sample: sampleOf(rows),
  plan: { kind: "fit", settings: settingsOfOrder(3, 2, changes) },
  horizon: 4,
  point: "median",
  coverage: 0.9,
  joint: false,
  bands: "redrawn",
  draws: 400,
  seed: 1,
  ...more,
});

function bandsOf(asked: BandsRequest): Bands {
  const work = redrawnBands(fitModel(asked), asked);
  for (;;) {
    const step = work.next();
    if (step.done) return step.value;
  }
}

describe("quantiles", () => {
  it("lie between neighbours in proportion", () => {
    const sorted = [1, 2, 4, 8];
    close(
      [0, 0.25, 0.5, 0.9, 1].map((p) => quantileOf(sorted, p)),
      [1, 1.75, 3, 4 + 0.7 * 4, 8],
    );
    expect(quantileOf([5], 0.3)).toBe(5);
  });
});

describe("flat least squares", () => {
  const columnMajor = (x: Matrix) => Float64Array.from(x[0].flatMap((_, j) => x.map((row) => row[j])));

  it.each([
    ["two lags", {}],
    ["trend, season and one lag", { terms: "quadratic", cycle: 12, lags: [1] }],
    ["far lags", { lags: [2, 7] }],
  ] as const)("has the coefficients of the careful fit: %s", (_, changes) => {
    const settings = settingsOfOrder(3, 2, changes);
    const design = designOf(stepSample(sampleOf(rows), settings.steps), settings, orderOf(settings));
    const { coefficients } = leastSquares(design);
    const size = { rows: design.z.length, regressors: design.z[0].length, series: 3 };
    const flat = flatLeastSquares(columnMajor(design.z), columnMajor(design.y), size)!;
    blockClose(
      coefficients.map((row, r) => row.map((_v, k) => flat[r * 3 + k])),
      coefficients,
      1e-10,
    );
  });

  it("tells an exact combination", () => {
    const z = columnMajor([[1, 2, 3], [1, 5, 6], [1, 7, 8], [1, 1, 2]]); // prettier-ignore
    expect(flatLeastSquares(z, new Float64Array(4), { rows: 4, regressors: 3, series: 1 })).toBeNull();
  });
});

describe("one redrawn path, done by hand with the same picks", () => {
  it.each([
    ["least squares", {}],
    ["differences, trend and a driver", { steps: [0, 1, 2].map(() => [{ kind: "diff", span: 1 } as const]), terms: "trend" }],
    ["Yule–Walker", { fit: "yule-walker" }],
    ["shrinkage", { fit: "shrinkage" }],
  ] as const)("%s", (name, changes) => {
    const settings = settingsOfOrder(3, 2, changes);
    const sample = sampleOf(rows, name.endsWith("driver") ? driver : []);
    const model = fitModel({ sample, plan: { kind: "fit", settings } });
    const stepped = stepSample(sample, settings.steps);
    const [path] = redrawnPaths(model, stepped, { horizon: 3, draws: 1, seed: 5 });

    const { residuals } = oneStep(model, stepped);
    const [T, q] = [residuals.length, model.coefficients.length];
    const centre = [0, 1, 2].map((k) => residuals.reduce((sum, row) => sum + row[k], 0) / T);
    const pool = residuals.map((row) => row.map((v, k) => (v - centre[k]) * Math.sqrt(T / (T - q))));
    const { below } = randomSource(5);
    const z = (y: Matrix, at: number) => [
      ...termRow(settings, 1 + at),
      ...y[at - 1],
      ...y[at - 2],
      ...(stepped.drivers[at] ?? []),
    ];
    const sampled = stepped.y.slice(0, 2).map((row) => [...row]);
    for (let t = 2; t < stepped.y.length; t++) {
      const picked = pool[below(T)];
      sampled.push(predictRow(model.coefficients, z(sampled, t), 3).map((v, k) => v + picked[k]));
    }
    const again = fitSettings(
      { series: sampled, drivers: stepped.drivers, start: 1 },
      { ...settings, steps: [[], [], []] },
    );
    const ahead = stepped.y.map((row) => [...row]);
    for (let j = 0; j < 3; j++) {
      const picked = pool[below(T)];
      ahead.push(predictRow(again.coefficients, z(ahead, ahead.length), 3).map((v, k) => v + picked[k]));
    }
    blockClose(path, ahead.slice(-3), 1e-10);
  }); // prettier-ignore
});

describe("redrawn bands", () => {
  const bands = bandsOf(request());

  it("are the same for the same seed, others for another, and hold the forecast", () => {
    expect(bandsOf(request())).toEqual(bands);
    expect(bandsOf(request({}, { seed: 2 })).low).not.toEqual(bands.low);
    bands.point.forEach((row, j) =>
      row.forEach((v, k) => expect(bands.low[j][k] < v && v < bands.high[j][k]).toBe(true)),
    );
  });

  it("have the point of AHEAD whatever is redrawn", () => {
    const fitted = forecastBands(request({}, { bands: "fitted" })) as Bands;
    expect(bands.point).toEqual(fitted.point);
  });

  it("on many rows with normal innovations come to the fitted ones", () => {
    const sample = sampleOf(inventedSeries(600, 2, 3));
    const plan = { kind: "fit", settings: settingsOfOrder(2, 1) } as const;
    const redrawn = bandsOf(request({}, { sample, plan, draws: 4000 }));
    const fitted = forecastBands(request({}, { sample, plan, bands: "fitted" })) as Bands;
    // a 5 % quantile of 4,000 draws of 600 residuals is known to some 4 % of the half width
    const half = fitted.high.map((row, j) => row.map((v, k) => (v - fitted.low[j][k]) / 2));
    for (const side of ["low", "high"] as const)
      redrawn[side].forEach((row, j) =>
        row.forEach((v, k) => expect(Math.abs(v - fitted[side][j][k]) / half[j][k]).toBeLessThan(0.12)),
      );
  });

  it("joint ones hold the stated share of whole paths, hence are wider", () => {
    const asked = request({}, { joint: true });
    const joint = bandsOf(asked);
    const model = fitModel(asked);
    const paths = [...redrawnPaths(model, stepSample(asked.sample, model.settings.steps), asked)];
    const inside = paths.filter((path) =>
      path.every((row, j) => row.every((v, k) => v >= joint.low[j][k] && v <= joint.high[j][k])),
    ).length;
    expect(Math.abs(inside - 0.9 * 400)).toBeLessThanOrEqual(1);
    joint.low.forEach((row, j) =>
      row.forEach((v, k) => expect(joint.high[j][k] - v).toBeGreaterThan(bands.high[j][k] - bands.low[j][k])),
    );
  });

  it("single ones leave the stated share of paths out on each side", () => {
    const model = fitModel(request());
    const paths = [...redrawnPaths(model, stepSample(sampleOf(rows), model.settings.steps), request())];
    bands.low.forEach((row, j) =>
      row.forEach((v, k) => expect(paths.filter((path) => path[j][k] < v).length).toBe(20)),
    );
  });

  it("undo the steps: logged series stay positive, differences start from the last row", () => {
    const steps = [0, 1, 2].map(() => [{ kind: "log" } as const, { kind: "diff", span: 1 } as const]);
    const { low, point, high } = bandsOf(request({ steps }));
    low.forEach((row, j) => row.forEach((v, k) => expect(0 < v && v < point[j][k] && point[j][k] < high[j][k]).toBe(true)));
    expect(high[3][0] - low[3][0]).toBeGreaterThan(1.3 * (high[0][0] - low[0][0]));
  }); // prettier-ignore

  it("take drivers, chosen lags and every estimator that is quick to fit", () => {
    const sample = sampleOf(rows, driver);
    for (const changes of [
      { lags: [1, 3] },
      { fit: "yule-walker" },
      { fit: "nuttall-strand" },
      { fit: "shrinkage" },
    ] as const) {
      const moments = "fit" in changes && changes.fit !== "shrinkage";
      const { low, high } = bandsOf(
        request(changes, { draws: 60, sample: moments ? sampleOf(rows) : sample }),
      );
      low.forEach((row, j) => row.forEach((v, k) => expect(v).toBeLessThan(high[j][k])));
    }
  });

  it("are refused where a fit is slow, and where they would take minutes", () => {
    expect(() => forecastBands(request({ fit: "likelihood" }))).toThrow("redraw-fit");
    const asked = request({}, { draws: 100_000, horizon: 10_000 });
    expect(() => redrawnBands(fitModel(asked), asked).next()).toThrow("redraw-heavy");
  });

  it("hold about nine in ten outcomes of a small simulated study", () => {
    // 200 series of 100 rows, the last two held back; both series two rows ahead: 400 outcomes, not all independent
    let inside = 0;
    for (let i = 0; i < 200; i++) {
      const whole = inventedSeries(102, 2, 9000 + i);
      const plan = { kind: "fit", settings: settingsOfOrder(2, 1) } as const;
      const { low, high } = bandsOf(
        request({}, { sample: sampleOf(whole.slice(0, 100)), plan, horizon: 2, draws: 300 }),
      );
      inside += whole[101].filter((v, k) => v >= low[1][k] && v <= high[1][k]).length;
    }
    // standard error at most √(0.09/200) = 0.021
    expect(Math.abs(inside / 400 - 0.9)).toBeLessThan(0.05);
  });
});
