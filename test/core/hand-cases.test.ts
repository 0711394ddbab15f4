import { describe, expect, it } from "vitest";
import { impulseMatrices } from "../../src/core/forecast/impulse";
import { add, multiply, transpose } from "../../src/core/linalg";
import type { Matrix } from "../../src/core/matrix";
import { zeros } from "../../src/core/matrix";
import { lagCorrelations, lagCovariances } from "../../src/core/moments/lag-covariance";
import { whittleRecursion } from "../../src/core/moments/whittle";
import { fitModel } from "../../src/core/var/fit";
import { lagMatrices } from "../../src/core/var/lag-matrices";
import { bestOrder, compareOrders } from "../../src/core/var/order";
import { regressorsOf } from "../../src/core/var/regressors";
import { rootsOf } from "../../src/core/var/roots";
import { stepSample } from "../../src/core/var/stepped";
import type { VarModel } from "../../src/core/var/model";
import { close } from "../support/close";
import { readCsv } from "../support/data";
import { frozen } from "../support/frozen";
import { plainShape, sampleOf, settingsOfOrder } from "../support/requests";
import hand from "../reference/hand-cases.json";
import published from "../reference/bjsales-yule-walker.json";

const fraction = (text: string): number => {
  const [top, bottom = "1"] = text.split("/");
  return Number(top) / Number(bottom);
};
const fractions = (rows: readonly (readonly string[])[]): number[][] => rows.map((row) => row.map(fraction));

/** A model with the given lag matrices and no terms. */
function modelOf(phi: readonly Matrix[], sigma: Matrix): VarModel {
  const series = sigma.length;
  const settings = settingsOfOrder(series, phi.length, { terms: "none" });
  return {
    settings,
    series,
    drivers: 0,
    regressors: regressorsOf(settings, series, 0),
    coefficients: phi.flatMap((matrix) => transpose(matrix)),
    noiseCovariance: sigma,
    rows: 100,
    start: 1,
  };
}

/** Γ(0)…Γ(last) of a stable model, Γ(k) = Σ_i Ψ(i + k) Σ Ψ(i)ᵀ summed until nothing is left. */
function populationMoments(model: VarModel, last: number): Matrix[] {
  const psi = impulseMatrices(model, 400);
  const from = (k: number) =>
    psi
      .slice(0, 400 - k)
      .reduce<Matrix>(
        (sum, effect, i) =>
          add(sum, multiply(multiply(psi[i + k], model.noiseCovariance), transpose(effect))),
        zeros(model.series, model.series),
      );
  return Array.from({ length: last + 1 }, (_, k) => from(k));
}

describe("five points by hand", () => {
  const { x, y, c0, cov_xt_ytm1, cov_yt_xtm1, r_x_after_y, r_y_after_x } = hand.D_five_points;
  const rows = frozen(x.map((v, t) => [v, y[t]]));

  it("covariances in the same row divide by n", () => {
    close(lagCovariances(rows, [0])[0], [
      [c0.xx, c0.xy],
      [c0.xy, c0.yy],
    ]);
  });

  it("row = the later series, column = the earlier one", () => {
    const [gamma] = lagCovariances(rows, [1]);
    close([gamma[0][1], gamma[1][0]], [cov_xt_ytm1.div_n, cov_yt_xtm1.div_n]);
    const [short] = lagCovariances(rows, [1], "n-k");
    close([short[0][1], short[1][0]], [cov_xt_ytm1.div_n_minus_k, cov_yt_xtm1.div_n_minus_k]);
  });

  it("correlations use the means and variances of all rows, unlike two offset windows", () => {
    const [rho] = lagCorrelations(rows, [1]);
    close([rho[0][1], rho[1][0]], [r_x_after_y, r_y_after_x]);
    expect(Math.abs(rho[1][0] - hand.D_five_points.offset_CORREL.y_after_x)).toBeGreaterThan(0.3);
  });
});

describe("a VAR(1) with exact fractions", () => {
  const { A, Gamma0, Gamma1_cov_yt_ytm1, Gamma2, backward_coef, backward_var } = hand.A_var1;
  const gamma = frozen([Gamma0, Gamma1_cov_yt_ytm1, Gamma2].map(fractions));
  const recursion = whittleRecursion(gamma);

  it("order 1 is the model itself, with unit innovations", () => {
    close(recursion[1].coefficients[0], fractions(A), { atol: 1e-15 }); // one entry is zero
    close(
      recursion[1].innovation,
      [
        [1, 0],
        [0, 1],
      ],
      { atol: 1e-14 }, // off the diagonal it is zero
    );
  });

  it("the second matrix of order 2 is zero", () => {
    close(recursion[2].coefficients[1], zeros(2, 2), { atol: 1e-14 }); // exactly zero on paper
  });

  it("run backwards in time, it gives the backward coefficients and variance", () => {
    const [, step] = whittleRecursion(gamma.map((matrix) => transpose(matrix)));
    close(step.coefficients[0], fractions(backward_coef), { rtol: 1e-13 });
    close(step.innovation, fractions(backward_var), { rtol: 1e-13 });
  });

  it("its moments follow from its impulse responses", () => {
    const model = modelOf([fractions(A)], [[1, 0], [0, 1]]); // prettier-ignore
    populationMoments(model, 2).forEach((moment, k) => close(moment, gamma[k], { rtol: 1e-13 }));
    const psi = impulseMatrices(model, 200);
    close(
      psi.reduce<Matrix>((sum, effect) => add(sum, effect), zeros(2, 2)),
      hand.A_var1.long_run,
      { rtol: 1e-13, atol: 1e-14 }, // one long-run response is zero
    );
  });

  it("has the roots ½ and ½", () => {
    const roots = rootsOf(modelOf([fractions(A)], [[1, 0], [0, 1]])); // prettier-ignore
    close(
      roots.map(({ modulus }) => modulus),
      [0.5, 0.5],
    );
  });
});

describe.each([
  ["VAR(1)", [hand.B_luetkepohl_var1.A], hand.B_luetkepohl_var1],
  ["VAR(2)", [hand.C_luetkepohl_var2.A1, hand.C_luetkepohl_var2.A2], hand.C_luetkepohl_var2],
] as const)("Lütkepohl's %s", (_, phi, printed) => {
  const moments = populationMoments(modelOf(phi, printed.Sigma), phi.length);

  it("has the printed autocovariances", () => {
    // three decimals are printed: half of the last one; the book's own rounding of intermediates adds as much again
    close(moments[0], printed.Gamma0, { rtol: 0, atol: 1e-3 });
    close(moments[1], printed.Gamma1, { rtol: 0, atol: 1e-3 });
  });

  it("is recovered from its autocovariances", () => {
    const { coefficients, innovation } = whittleRecursion(moments).at(-1)!;
    coefficients.forEach((matrix, j) => close(matrix, phi[j], { rtol: 1e-11, atol: 1e-13 })); // zeros among them
    close(innovation, printed.Sigma, { rtol: 1e-11, atol: 1e-13 }); // zeros among them
  });
});

describe("sales and their leading indicator", () => {
  const levels = frozen(readCsv("BJsales.csv", ["lead", "sales"]));
  const steps = [[{ kind: "diff", span: 1 } as const], [{ kind: "diff", span: 1 } as const]];
  const sample = sampleOf(levels);
  const settings = settingsOfOrder(2, 5, { steps, fit: "yule-walker" });
  const model = fitModel({ sample, plan: { kind: "fit", settings } });

  it("Yule–Walker of order 5 has the published coefficients", () => {
    lagMatrices(model).forEach((phi, j) =>
      close(phi, published.yule_walker_VAR5.Phi[j], { rtol: 0, atol: 5e-4 }),
    );
    close(model.coefficients[0], published.yule_walker_VAR5.intercept, { rtol: 0, atol: 5e-5 });
  });

  it("and the published innovation covariance once n − q is taken off again", () => {
    const n = 149;
    const q = 1 + 2 * 5;
    close(
      model.noiseCovariance.map((row) => row.map((v) => (v * (n - q)) / n)),
      published.yule_walker_VAR5.sigma_no_df,
      { rtol: 0, atol: 5e-5 },
    );
  });

  it("least squares of order 5 has the published innovation covariance with divisor T", () => {
    const fitted = fitModel({
      sample,
      plan: { kind: "fit", settings: { ...settings, fit: "least-squares" } },
    });
    const [rows, q] = [144, 11];
    close(
      fitted.noiseCovariance.map((row) => row.map((v) => (v * (rows - q)) / rows)),
      published.ols_VAR5_sigma_ml,
      { rtol: 0, atol: 5e-8 },
    );
  });

  it("differences of the lead run three rows ahead of those of sales", () => {
    const { y } = stepSample(sample, steps);
    const [rho] = lagCorrelations(y, [3]);
    close(rho[1][0], published.ccf_diff_R_convention_lag_negative_3, { rtol: 0, atol: 5e-3 });
    expect(Math.abs(rho[0][1])).toBeLessThan(0.3);
  });

  it("the Bayes criterion chooses order 5 among least-squares fits on the same rows", () => {
    const table = compareOrders(stepSample(sample, steps), plainShape(2), 8);
    expect(bestOrder(table, "bic")).toBe(5);
  });
});
