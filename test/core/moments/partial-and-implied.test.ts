import { describe, expect, it } from "vitest";
import { impliedCovariances } from "../../../src/core/moments/implied-covariance";
import { partialLags } from "../../../src/core/moments/partial-lag";
import { impulseMatrices } from "../../../src/core/forecast/impulse";
import { add, multiply, transpose } from "../../../src/core/linalg";
import { compareOrders } from "../../../src/core/var/order";
import { allLags } from "../../../src/core/var/settings";
import { fitModel } from "../../../src/core/var/fit";
import { lagMatrices } from "../../../src/core/var/lag-matrices";
import { lagCovariances } from "../../../src/core/moments/lag-covariance";
import { regressorsOf } from "../../../src/core/var/regressors";
import { identity, type Matrix } from "../../../src/core/matrix";
import type { VarModel } from "../../../src/core/var/model";
import hand from "../../reference/hand-cases.json";
import { blockClose, close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { plainShape, sampleOf, settingsOfOrder } from "../../support/requests";

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

  it.each([
    ["VAR(1)", [hand.B_luetkepohl_var1.A], hand.B_luetkepohl_var1],
    ["VAR(2)", [hand.C_luetkepohl_var2.A1, hand.C_luetkepohl_var2.A2], hand.C_luetkepohl_var2],
  ] as const)("Lütkepohl's %s as printed", (_, phi, { Sigma, Gamma0, Gamma1 }) => {
    const gamma = impliedCovariances(frozen(modelOf(phi, Sigma)), 1);
    // printed to three decimals
    close(gamma[0], Gamma0, { atol: 0.0006, rtol: 0 });
    close(gamma[1], Gamma1, { atol: 0.0006, rtol: 0 });
  });

  it("are refused where they would hold the page up, however large the block", () => {
    const diagonal = identity(10).map((row) => row.map((v) => v / 50));
    const long = modelOf(Array.from({ length: 40 }, () => diagonal), identity(10)); // prettier-ignore
    expect(() => impliedCovariances(long, 1)).toThrow("too-many-states");
  });

  it("are those of white noise at order 0, and do not exist when a root reaches 1", () => {
    expect(impliedCovariances(modelOf([], [[2, 1], [1, 3]]), 1)[1]).toEqual([[0, 0], [0, 0]]); // prettier-ignore
    expect(() => impliedCovariances(modelOf([[[1]]], [[1]]), 1)).toThrow("unstable");
    close(impliedCovariances(modelOf([[[1 - 1e-9]]], [[1]]), 0)[0][0][0], 1 / (1 - (1 - 1e-9) ** 2), {
      rtol: 1e-6,
    });
  });
});

describe("with a moving average", () => {
  const withPast = (phi: readonly Matrix[], theta: readonly Matrix[], sigma: Matrix): VarModel => {
    const plain = modelOf(phi, sigma);
    const settings = { ...plain.settings, movingAverage: theta.length };
    return frozen({
      ...plain,
      settings,
      regressors: regressorsOf(settings, plain.series, 0),
      coefficients: [...plain.coefficients, ...theta.flatMap((m) => transpose(m))],
    });
  };

  it("by hand: y = ½y(−1) + e + ⅖e(−1) has Γ(0) = 2.08, Γ(1) = ½Γ(0) + ⅖, Γ(2) = ½Γ(1)", () => {
    const gamma = impliedCovariances(withPast([[[0.5]]], [[[0.4]]], [[1]]), 2).flat(2);
    close(gamma, [2.08, 1.44, 0.72]);
  });

  it("by hand: a pure one of order 1 has Γ(0) = Σ + ΘΣΘᵀ, Γ(1) = ΘΣ, and nothing beyond", () => {
    const gamma = impliedCovariances(withPast([], [[[0.5, 1], [0, 2]]], [[4, 1], [1, 2]]), 3); // prettier-ignore
    close(gamma[0], [[8, 6], [6, 10]]); // prettier-ignore
    close(gamma[1], [[3, 2.5], [2, 4]]); // prettier-ignore
    expect(gamma.slice(2).flat(2)).toEqual(new Array(8).fill(0));
  });

  it("is Σ Ψ(i + k)ΣΨ(i)ᵀ summed until nothing is left, for orders p ≤ q and p > q", () => {
    const phi: Matrix[] = [[[0.5, 0.1], [0.4, 0.3]], [[0.1, 0], [0.25, -0.2]], [[0, 0.1], [0, 0.1]]]; // prettier-ignore
    const theta: Matrix[] = [[[0.4, 0], [-0.3, 0.2]], [[0, 0.3], [0.1, 0.5]]]; // prettier-ignore
    for (const order of [1, 2, 3]) {
      const model = withPast(phi.slice(0, order), theta, [[1, 0.4], [0.4, 2]]); // prettier-ignore
      const psi = impulseMatrices(model, 600);
      impliedCovariances(model, 5).forEach((gamma, k) => {
        const terms = psi
          .slice(0, 600 - k)
          .map((m, i) => multiply(multiply(psi[i + k], model.noiseCovariance), transpose(m)));
        blockClose(gamma, terms.reduce<Matrix>(add, [[0, 0], [0, 0]])); // prettier-ignore
      });
    }
  });
});

describe("partial autoregression", () => {
  it("tests as the table of orders does where both use the same rows", () => {
    const y = inventedSeries(90, 3);
    for (const { lag, statistic, p } of partialLags(y, 4)) {
      const row = compareOrders({ y, drivers: [], start: 1 }, plainShape(3), lag)[lag];
      close([statistic, p], [row.lr!, row.lrP!], { rtol: 1e-9 });
    }
  });

  it("refuses a series that never changes", () => {
    expect(() => partialLags(inventedSeries(40, 2).map(([a]) => [a, 5]), 1)).toThrow("constant-series"); // prettier-ignore
  });

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
