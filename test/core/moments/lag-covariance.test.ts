import { describe, expect, it } from "vitest";
import { type Issue } from "../../../src/core/issue";
import { multiply, symmetricEigen, transpose } from "../../../src/core/linalg";
import { zeros, type Matrix } from "../../../src/core/matrix";
import { mean } from "../../../src/core/moments/centre";
import { lagCorrelations, lagCovariances } from "../../../src/core/moments/lag-covariance";
import { whittleRecursion } from "../../../src/core/moments/whittle";
import { blockClose, close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";

const x = frozen(inventedSeries(200, 3));
const code = (facts: object) =>
  expect.objectContaining({ facts: expect.objectContaining(facts) as object }) as Issue;

describe("lagCovariances", () => {
  it("a series that alternates", () => {
    // deviations ±1: at lag 1 three products of −1 over n = 4
    close(lagCovariances([[1], [3], [1], [3]], [0, 1, 2, 3]).flat(2), [1, -0.75, 0.5, -0.25]);
    close(lagCovariances([[1], [3], [1], [3]], [1, 2, 3], "n-k").flat(2), [-1, 1, -1]);
  });

  it("Γ(−k) = Γ(k)ᵀ", () => {
    for (const k of [0, 1, 4]) {
      const [ahead, back] = lagCovariances(x, [k, -k]);
      expect(back).toEqual(transpose(ahead));
    }
  });

  it("Γ(0) is symmetric and Γ(1) is not", () => {
    const [zero, one] = lagCovariances(x, [0, 1]);
    expect(zero).toEqual(transpose(zero));
    expect(Math.abs(one[1][0] - one[0][1])).toBeGreaterThan(0.5);
  });

  it("the follower's row holds the leader's lead", () => {
    const late = inventedSeries(200, 1).map(([v], t, all) => [v, t >= 2 ? all[t - 2][0] : 10]);
    const rho = lagCorrelations(late, [2, -2]);
    expect(rho[0][1][0]).toBeGreaterThan(0.9);
    expect(Math.abs(rho[1][1][0])).toBeLessThan(0.6);
  });

  it("with divisor n the block matrix of lags 0…3 is positive definite", () => {
    const gamma = lagCovariances(x, [0, 1, 2, 3]);
    const at = (lag: number) => (lag >= 0 ? gamma[lag] : transpose(gamma[-lag]));
    const block = zeros(12, 12);
    for (let r = 0; r < 4; r++)
      for (let c = 0; c < 4; c++)
        at(r - c).forEach((row, i) => row.forEach((v, j) => (block[3 * r + i][3 * c + j] = v)));
    expect(Math.min(...symmetricEigen(block).values)).toBeGreaterThan(0);
  });

  it("lags come in the order asked for, again and again", () => {
    const [a, b, c] = lagCovariances(x, [2, 1, 2]);
    expect(a).toEqual(c);
    expect(a).not.toEqual(b);
  });

  it("a constant series has zero covariances", () => {
    expect(lagCovariances(x.map(([v]) => [v, 0.1]), [0, 1]).map((g) => [g[0][1], g[1][0], g[1][1]])).toEqual([[0, 0, 0], [0, 0, 0]]); // prettier-ignore
  });

  it("refuses lags that reach beyond the rows", () => {
    expect(() => lagCovariances([[1], [2], [3]], [2])).not.toThrow();
    expect(() => lagCovariances([[1], [2], [3]], [-3])).toThrow(code({ code: "lags-beyond-rows", lag: -3, rows: 3 })); // prettier-ignore
  });
});

describe("lagCorrelations", () => {
  it("lie between −1 and 1, exactly 1 for a series with itself", () => {
    const rho = lagCorrelations(x, [0, 1, 2, 3, -1]);
    rho.flat(2).forEach((v) => expect(Math.abs(v)).toBeLessThanOrEqual(1 + 1e-15));
    rho[0].forEach((row, i) => expect(row[i]).toBe(1));
  });

  it.each([1e-300, 1e-150, 1e150, 1e300])("do not depend on units, even %d", (unit) => {
    close(
      lagCorrelations(
        x.map((row) => row.map((v) => v * unit)),
        [0, 1],
      ).flat(),
      lagCorrelations(x, [0, 1]).flat(),
      { rtol: 1e-11 },
    );
  });

  it("a constant series has none", () => {
    expect(() => lagCorrelations(x.map(([v]) => [v, 7]), [1])).toThrow(code({ code: "constant-series", series: 1 })); // prettier-ignore
  });
});

describe("mean", () => {
  it("keeps the digits that a large offset takes", () => {
    const values = Array.from({ length: 1001 }, (_, t) => 1e7 + (t === 0 ? 0.2 : t % 2 ? 0.1 : 0.3));
    expect(Math.abs(mean(values) - (1e7 + 0.2))).toBeLessThan(4e-9);
  });
});

describe("whittleRecursion", () => {
  const gamma = lagCovariances(x, [0, 1, 2, 3, 4]);
  const at = (lag: number): Matrix => (lag >= 0 ? gamma[lag] : transpose(gamma[-lag]));
  const steps = whittleRecursion(gamma);

  it("every order solves its Yule–Walker equations", () => {
    for (const { order, coefficients, innovation } of steps.slice(1)) {
      const sum = (k: number) =>
        coefficients
          .map((phi, j) => multiply(phi, at(k - 1 - j)))
          .reduce((total, m) => total.map((row, i) => row.map((v, c) => v + m[i][c])));
      for (let k = 1; k <= order; k++) blockClose(sum(k), at(k), 1e-11);
      blockClose(
        innovation,
        at(0).map((row, i) => row.map((v, j) => v - sum(0)[i][j])),
        1e-11,
      );
    }
  });

  it("innovation variances never grow with the order", () => {
    steps.slice(1).forEach(({ innovation }, i) =>
      innovation.forEach((row, k) => expect(row[k]).toBeLessThanOrEqual(steps[i].innovation[k][k] * (1 + 1e-12))),
    );
  }); // prettier-ignore

  it("order 0 is the covariance itself", () => {
    expect(steps[0]).toEqual({ order: 0, coefficients: [], innovation: gamma[0] });
  });

  it("a copy of a series leaves nothing to solve", () => {
    const copy = lagCovariances(x.map(([v]) => [v, 2 * v]), [0, 1]); // prettier-ignore
    expect(() => whittleRecursion(copy)).toThrow(code({ code: "singular-system" }));
  });
});
