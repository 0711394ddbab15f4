import { describe, expect, it } from "vitest";
import { forecastAhead } from "../../src/core/forecast/ahead";
import { multiply, solveSquare, transpose } from "../../src/core/linalg";
import { coefficientRoots } from "../../src/core/var/coefficient-covariance";
import { fitModel } from "../../src/core/var/fit";
import { bestOrder, compareOrders } from "../../src/core/var/order";
import { rootsOf } from "../../src/core/var/roots";
import { stepSample } from "../../src/core/var/stepped";
import { close } from "../support/close";
import { readCsv } from "../support/data";
import { plainShape, sampleOf, settingsOfOrder } from "../support/requests";
import expected from "../reference/lutkepohl-e1.json";

/**
 * The VAR(2) of West German investment, income and consumption, 1960Q2–1978Q4 in log differences:
 * Lütkepohl (2005), sections 3.2.3, 4.3 and 4.5. Digits printed there are checked as printed; the longer figures
 * were recomputed from the data (see the reference file).
 */
const levels = readCsv("e1_west_german_inv_inc_cons_1960Q1_1982Q4.csv", ["invest", "income", "cons"]);
const untilEnd1978 = levels.slice(0, 76);
const steps = Array.from({ length: 3 }, () => [{ kind: "log" } as const, { kind: "diff", span: 1 } as const]);
const sample = sampleOf(untilEnd1978);
const settings = settingsOfOrder(3, 2, { steps });
const model = fitModel({ sample, plan: { kind: "fit", settings } });

describe("Lütkepohl's investment, income, consumption example", () => {
  it("has 73 rows in the fit after differences and two lags", () => {
    expect(model.rows - 2).toBe(73);
  });

  it("gives the published coefficients", () => {
    const byEquation = model.coefficients[0].map((_, k) => model.coefficients.map((row) => row[k]));
    close(byEquation, expected.coef, { rtol: 1e-10, atol: 1e-12 });
  });

  it("gives the innovation covariance with T − Kp − 1", () => {
    close(model.noiseCovariance, expected.sigma_df_T_minus_Kp_minus_1, { rtol: 1e-10 });
  });

  it("gives the published criteria once the constants they leave out are taken off", () => {
    const shape = plainShape(3, { steps });
    const table = compareOrders(stepSample(sample, steps), shape, 4);
    const rows = 71;
    expected.order_selection_M4_T71.forEach((row, p) => {
      // Lütkepohl counts the K²p lag coefficients only; ours count the K constants too
      close(table[p].aic - (2 * 3) / rows, row.AIC);
      close(table[p].bic - (3 * Math.log(rows)) / rows, row.SC);
      close(table[p].hq - (2 * 3 * Math.log(Math.log(rows))) / rows, row.HQ);
      close(table[p].fpe, row.FPE, { rtol: 1e-9 });
    });
    expect(bestOrder(table, "aic")).toBe(2);
  });

  it("gives the companion moduli", () => {
    close(
      rootsOf(model).map((root) => root.modulus),
      [...expected.companion_moduli].sort((a, b) => b - a),
    );
  });

  it("gives the five-quarter forecast on the log-difference scale", () => {
    const path = forecastAhead({ sample, plan: { kind: "given", model }, horizon: 5, point: "median" });
    const logs = [untilEnd1978[75], ...path].map((row) => row.map(Math.log));
    const changes = logs.slice(1).map((row, t) => row.map((v, k) => v - logs[t][k]));
    close(changes, expected.forecast_1979Q1_to_1980Q1, { rtol: 1e-10, atol: 1e-13 });
  });

  // printed to three decimals; the sheet function tests one equation at a time, this ties its parts to the joint test
  it.each([
    ["income and consumption do not lead investment", [0], [1, 2], expected.granger_inc_cons_to_inv],
    ["investment leads neither income nor consumption", [1, 2], [0], expected.granger_inv_to_inc_cons],
  ] as const)("gives the published test that %s", (_, effects, causes, printed) => {
    const { inverseRoot, root } = coefficientRoots(model, stepSample(sample, steps));
    const among = multiply(inverseRoot, transpose(inverseRoot));
    const noise = multiply(root, transpose(root));
    const tested = effects.flatMap((effect) =>
      model.regressors.flatMap((regressor, r) =>
        regressor.kind === "lag" && causes.some((cause) => cause === regressor.series) ? [{ effect, r }] : [],
      ),
    );
    const b = tested.map(({ effect, r }) => [model.coefficients[r][effect]]);
    const covariance = tested.map((p) => tested.map((q) => among[p.r][q.r] * noise[p.effect][q.effect]));
    const [[wald]] = multiply(transpose(b), solveSquare(covariance, b));
    close(wald, printed.wald, { atol: 0.0006, rtol: 0 });
    close(wald / tested.length, printed.F, { atol: 0.0006, rtol: 0 });
    expect([tested.length, 3 * (73 - 7)]).toEqual(printed.df);
  });
});
