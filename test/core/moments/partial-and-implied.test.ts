import { describe, expect, it } from "vitest";
import { impliedCovariances } from "../../../src/core/moments/implied-covariance";
import { partialLags } from "../../../src/core/moments/partial-lag";
import { allLags } from "../../../src/core/var/settings";
import { fitModel } from "../../../src/core/var/fit";
import { lagMatrices } from "../../../src/core/var/lag-matrices";
import { lagCovariances } from "../../../src/core/moments/lag-covariance";
import { regressorsOf } from "../../../src/core/var/regressors";
import type { Matrix } from "../../../src/core/matrix";
import type { VarModel } from "../../../src/core/var/model";
import { blockClose, close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { sampleOf, settingsOfOrder } from "../../support/requests";

/** A model by its lag matrices and innovation covariance, no terms. */
function modelOf(phi: readonly Matrix[], noiseCovariance: Matrix): VarModel {
  const series = noiseCovariance.length;
  const settings = settingsOfOrder(series, phi.length, { terms: "none" });
  return {
    settings,
    series,
    drivers: 0,
    regressors: regressorsOf(settings, series, 0),
    coefficients: phi.flatMap((m) => m[0].map((_, j) => m.map((row) => row[j]))),
    noiseCovariance,
    rows: 100,
    start: 1,
  };
}

describe("covariances that a model implies", () => {
  it("by hand: y1 = ½y1 + e1, y2 = ½y1 + ½y2 + e2 has Γ(0) = [4/3 4/9; 4/9 56/27]", () => {
    const gamma = impliedCovariances(modelOf([[[0.5, 0], [0.5, 0.5]]], [[1, 0], [0, 1]]), 2); // prettier-ignore
    close(gamma[0], [[4 / 3, 4 / 9], [4 / 9, 56 / 27]]); // prettier-ignore
    close(gamma[1], [[2 / 3, 2 / 9], [8 / 9, 34 / 27]]); // prettier-ignore
    close(gamma[2], [[1 / 3, 1 / 9], [7 / 9, 20 / 27]]); // prettier-ignore
  });

  it("Lütkepohl's VAR(2) example, to the three digits printed (2005, 2.1.4)", () => {
    const phi = [[[0.5, 0.1], [0.4, 0.5]], [[0, 0], [0.25, 0]]]; // prettier-ignore
    const gamma = impliedCovariances(modelOf(phi, [[0.09, 0], [0, 0.04]]), 1); // prettier-ignore
    close(gamma[0].flat(), [0.131, 0.066, 0.066, 0.181], { atol: 0.0005 });
    close(gamma[1].flat(), [0.072, 0.051, 0.104, 0.143], { atol: 0.0005 });
  });

  it("of a Yule–Walker fit are those of the data up to the order", () => {
    const y = inventedSeries(120, 3);
    const settings = settingsOfOrder(3, 2, { fit: "yule-walker" });
    const model = fitModel({ sample: sampleOf(y), plan: { kind: "fit", settings } });
    // the block's covariance carries n/(n − q), so the implied matrices do too
    const factor = 120 / (120 - 7);
    const data = lagCovariances(y, [0, 1, 2]);
    impliedCovariances(model, 2).forEach((gamma, k) =>
      blockClose(
        gamma,
        data[k].map((row) => row.map((v) => v * factor)),
        1e-9,
      ),
    );
  });

  it("are those of white noise at order 0, and do not exist when a root reaches 1", () => {
    expect(impliedCovariances(modelOf([], [[2, 1], [1, 3]]), 1)[1]).toEqual([[0, 0], [0, 0]]); // prettier-ignore
    expect(() => impliedCovariances(modelOf([[[1]]], [[1]]), 1)).toThrow("unstable");
    close(impliedCovariances(modelOf([[[1 - 1e-9]]], [[1]]), 0)[0][0][0], 1 / (1 - (1 - 1e-9) ** 2), {
      rtol: 1e-6,
    });
  });
});

describe("partial autoregression", () => {
  it("at lag 1 and beyond is the last matrix of the Yule–Walker fit", () => {
    const y = frozen(inventedSeries(90, 3));
    for (const { lag, matrix } of partialLags(y, 3)) {
      const settings = settingsOfOrder(3, lag, { fit: "yule-walker" });
      const model = fitModel({ sample: sampleOf(y), plan: { kind: "fit", settings } });
      blockClose(matrix, lagMatrices(model)[lag - 1], 1e-10);
    }
  });

  it("finds order 1 in invented series of order 1", () => {
    const [first, ...rest] = partialLags(inventedSeries(400, 2), 5);
    expect(first.p).toBeLessThan(1e-12);
    for (const { p } of rest) expect(p).toBeGreaterThan(0.005);
  });

  it("statistics do not depend on units or on the order of the series", () => {
    const y = inventedSeries(80, 3);
    const plain = partialLags(y, 4);
    const moved = partialLags(
      y.map(([a, b, c]) => [1e5 * c, a, 1e-3 * b]),
      4,
    );
    close(
      moved.map(({ statistic }) => statistic),
      plain.map(({ statistic }) => statistic),
      { rtol: 1e-8 },
    );
    expect(plain.map(({ lag }) => lag)).toEqual(allLags(4));
  });
});
