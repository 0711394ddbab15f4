import { describe, expect, it } from "vitest";
import { responsesTo, shockShares } from "../../../src/core/forecast/responses";
import type { Matrix } from "../../../src/core/matrix";
import type { VarModel } from "../../../src/core/var/model";
import hand from "../../reference/hand-cases.json";
import reference from "../../reference/statsmodels-responses.json";
import { blockClose, close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { responseSuite } from "../../support/response-references";
import { modelWith, permuted, rescaled, threeSeries } from "../../support/models";

const fraction = (text: string | number): number => {
  const [top, bottom = "1"] = String(text).split("/");
  return Number(top) / Number(bottom);
};
const { A, long_run, fevd_series2_from_shock1 } = hand.A_var1;
const halves = modelWith([A.map((row) => row.map(fraction))], [[1, 0], [0, 1]]); // prettier-ignore
const at = (model: VarModel, horizon: number, shock: "orthogonal" | "unit" | "generalised") =>
  responsesTo({ model, horizon, shock });

describe("by hand: two series, roots one half", () => {
  it("responses add up to the long-run response", () => {
    const sum = at(halves, 200, "orthogonal").reduce<number[][]>(
      (total, matrix) => total.map((row, i) => row.map((v, j) => v + matrix[i][j])),
      [[0, 0], [0, 0]],
    ); // prettier-ignore
    close(sum, long_run, { rtol: 1e-13, atol: 1e-14 }); // one long-run response is zero
  });

  it("shares of the first shock in the second series are 0, 1/6, … 5/14", () => {
    const shares = shockShares({ model: halves, horizon: 200 });
    close(shares[0][1][0], fraction(fevd_series2_from_shock1.h1), { atol: 1e-15 }); // exactly zero on paper
    close(shares[1][1][0], fraction(fevd_series2_from_shock1.h2), { rtol: 1e-14 });
    close(shares[199][1][0], fraction(fevd_series2_from_shock1.inf), { rtol: 1e-13 });
  });

  it("the row of the shock itself comes first: the impact", () => {
    const [impact, next] = at(
      modelWith([[[0.5, 0], [0.25, 0.5]]], [[4, 2], [2, 10]]),
      1,
      "orthogonal",
    ); // prettier-ignore
    close(
      impact,
      [
        [2, 0],
        [1, 3],
      ],
      { atol: 1e-15 },
    ); // prettier-ignore — above the diagonal it is zero
    close(next, [[1, 0], [1, 1.5]], { atol: 1e-15 }); // prettier-ignore
  });
});

describe("identities", () => {
  const model = frozen(threeSeries());

  it("shares lie between 0 and 1 and add up to 1", () => {
    for (const matrix of shockShares({ model, horizon: 30 })) {
      for (const row of matrix) {
        close(
          row.reduce((sum, v) => sum + v, 0),
          1,
          { rtol: 1e-14 },
        );
        row.forEach((v) => expect(v >= 0 && v <= 1).toBe(true));
      }
    }
  });

  it("generalised shocks are orthogonal ones where innovations are uncorrelated", () => {
    const apart = { ...model, noiseCovariance: [[1, 0, 0], [0, 2, 0], [0, 0, 4]] }; // prettier-ignore
    at(apart, 10, "generalised").forEach((matrix, j) => blockClose(matrix, at(apart, 10, "orthogonal")[j], 1e-14));
  }); // prettier-ignore

  it("the first generalised shock is the first orthogonal one, the others are not", () => {
    const [g, o] = [at(model, 5, "generalised"), at(model, 5, "orthogonal")];
    const first = (matrices: readonly Matrix[]) => matrices.map((matrix) => matrix.map((row) => row[0]));
    blockClose(first(g), first(o), 1e-14);
    expect(Math.abs(g[0][0][2] - o[0][0][2])).toBeGreaterThan(0.1);
  });

  it("a generalised shock in series j moves series i by its covariance over the deviation of j", () => {
    const [impact] = at(model, 1, "generalised");
    close(impact[2][1], 0.5 / Math.sqrt(2));
    close(impact[1][2], 0.5 / 2);
  });

  it("a unit shock strikes one series alone", () => {
    close(
      at(model, 1, "unit")[0],
      [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ],
      { atol: 1e-300 },
    ); // prettier-ignore — exact
    close(at(model, 1, "unit")[1][1], [0.3, 0.4, -0.2]);
  });

  it("orthogonal is unit times the Cholesky factor: squares add up to the error covariance", () => {
    const sum = at(model, 6, "orthogonal").reduce((s, m) => s + m[2].reduce((t, v) => t + v * v, 0), 0);
    const units = at(model, 6, "unit");
    const direct = units.reduce(
      (s, psi) =>
        s + psi[2].reduce((t, v, i) => t + psi[2].reduce((r, w, j) => r + v * w * model.noiseCovariance[i][j], 0), 0),
      0,
    );
    close(sum, direct, { rtol: 1e-13 });
  }); // prettier-ignore

  it.each(["unit", "generalised"] as const)("%s responses follow the series when these change places", (shock) => {
    const order = [2, 0, 1];
    const moved = at(permuted(model, order), 8, shock);
    at(model, 8, shock).forEach((matrix, j) => blockClose(moved[j], order.map((a) => order.map((b) => matrix[a][b])), 1e-13));
  }); // prettier-ignore

  it("responses take the units of the responding series, shares none", () => {
    const factor = [1e-3, 7, 1e5];
    const scaled = rescaled(model, factor);
    at(model, 8, "orthogonal").forEach((matrix, j) => {
      const moved = at(scaled, 8, "orthogonal")[j];
      matrix.forEach((row, i) =>
        close(
          moved[i],
          row.map((v) => v * factor[i]),
          { rtol: 1e-10, atol: 1e-12 * factor[i] }, // above the diagonal of the impact it is zero
        ),
      );
    });
    shockShares({ model, horizon: 8 }).forEach((matrix, j) =>
      blockClose(shockShares({ model: scaled, horizon: 8 })[j], matrix, 1e-12),
    );
  });

  it("one series: all of its error is its own, and its response is the scalar one", () => {
    const one = modelWith([[[0.8]]], [[9]]);
    close(at(one, 3, "orthogonal").flat(2), [3, 2.4, 1.92, 1.536]);
    close(shockShares({ model: one, horizon: 3 }).flat(2), [1, 1, 1]);
  });
});

responseSuite(reference);
