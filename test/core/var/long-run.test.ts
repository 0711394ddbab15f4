import { describe, expect, it } from "vitest";
import { multiply, subtract, transpose } from "../../../src/core/linalg";
import { identity, type Matrix } from "../../../src/core/matrix";
import { chooseOrder } from "../../../src/core/var/order";
import { fitModel } from "../../../src/core/var/fit";
import { lagMatrices } from "../../../src/core/var/lag-matrices";
import { analyseLongRun, longRunDesign } from "../../../src/core/var/long-run";
import type { VarModel } from "../../../src/core/var/model";
import { rootsOf } from "../../../src/core/var/roots";
import type { ModelSettings } from "../../../src/core/var/settings";
import { stepSample } from "../../../src/core/var/stepped";
import { blockClose, close } from "../../support/close";
import { readCsv } from "../../support/data";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { sampleOf, settingsOfOrder } from "../../support/requests";
import danish from "../../reference/danish-long-run.json";

const money = readCsv("danish_johansen_juselius_1990.csv", ["lrm", "lry", "ibo", "ide"]);

/** Two walks and a third series that keeps near their difference. */
const walks: Matrix = frozen(
  inventedSeries(120, 3).reduce<number[][]>((rows, [a, b, c]) => {
    const [x, z] = rows.at(-1) ?? [0, 0];
    const next = [x + a - 10, z + (b - 20) / 2];
    return [...rows, [...next, next[0] - next[1] + c - 30]];
  }, []),
);

const fit = (x: Matrix, order: number, changes: Partial<ModelSettings>, drivers: Matrix = []): VarModel =>
  fitModel({
    sample: sampleOf(x, drivers),
    plan: { kind: "fit", settings: settingsOfOrder(x[0].length, order, changes) },
  });

describe("Johansen's analysis", () => {
  it("of two series without terms is their squared canonical correlations, by hand", () => {
    // one series, one lag: λ = r², r the cosine between the changes and the levels before
    const x = [[1], [3], [2], [4]];
    const { eigenvalues } = analyseLongRun(
      longRunDesign(stepSample(sampleOf(x), [[]]), settingsOfOrder(1, 1, { terms: "none", longRun: 1 })),
    );
    const [changes, levels] = [[2, -1, 2], [1, 3, 2]]; // prettier-ignore
    const product = changes.reduce((sum, v, i) => sum + v * levels[i], 0);
    close(eigenvalues, [product ** 2 / (9 * 14)]);
  });

  it.each(danish.cases)("of Danish money demand: eigenvalues and first relation, $terms", (expected) => {
    const settings = settingsOfOrder(4, 2, {
      terms: expected.terms as ModelSettings["terms"],
      cycle: 4,
      longRun: 1,
    });
    const { eigenvalues, relations } = analyseLongRun(
      longRunDesign(stepSample(sampleOf(money), settings.steps), settings),
    );
    // half of the last digit printed
    close(eigenvalues, expected.eigenvalues, { atol: 5e-5, rtol: 0 });
    if (expected.relation)
      close(relations.map((row) => row[0] / relations[0][0]), expected.relation, { atol: 5.1e-5, rtol: 0 }); // prettier-ignore
  });
});

describe("the model in levels", () => {
  it("of Danish money demand pulls by the published loadings", () => {
    const model = fit(money, 2, { terms: "inside-constant", cycle: 4, longRun: 1 });
    const [first, second] = lagMatrices(model);
    // Π = Φ(1) + Φ(2) − I = αβᵀ, and β begins with 1
    const pull = first.map((row, i) => row[0] + second[i][0] - (i === 0 ? 1 : 0));
    close(pull, danish.cases[0].loadings!, { atol: 5.1e-5, rtol: 0 });
  });

  it.each([0, 1, 2, 3])(
    "with %i relations has a pull of that rank, and as many roots of one as are left",
    (rank) => {
      const model = fit(walks, 2, { terms: "none", longRun: rank });
      const ones = rootsOf(model).filter(({ real, imaginary }) => Math.hypot(real - 1, imaginary) < 1e-7);
      expect(ones).toHaveLength(3 - rank);
    },
  );

  it.each(["none", "constant", "trend", "quadratic"] as const)(
    "with as many relations as series is least squares: %s",
    (terms) =>
      blockClose(
        fit(walks, 2, { terms, longRun: 3, cycle: 4 }).coefficients,
        fit(walks, 2, { terms, cycle: 4 }).coefficients,
        1e-8,
      ),
  );

  it.each([
    ["inside-constant", "constant"],
    ["inside-trend", "trend"],
  ] as const)("with as many relations as series and %s is least squares with %s", (inside, free) =>
    blockClose(
      fit(walks, 3, { terms: inside, longRun: 3 }).coefficients,
      fit(walks, 3, { terms: free }).coefficients,
      1e-8,
    ),
  );

  it("without relations is the regression of changes on past changes", () => {
    const levels = fit(walks, 3, { longRun: 0 });
    const changes = walks.slice(1).map((row, t) => row.map((v, k) => v - walks[t][k]));
    const inChanges = lagMatrices(fit(changes, 2, {}));
    const phi = lagMatrices(levels);
    const none = inChanges[0].map((row) => row.map(() => 0));
    const gamma = [none, ...inChanges, none];
    phi.forEach((matrix, j) => {
      const unit = j === 0 ? identity(3) : none;
      blockClose(matrix, subtract(subtract(gamma[j + 1], gamma[j]), unit.map((row) => row.map((v) => -v))), 1e-8); // prettier-ignore
    });
    blockClose([levels.coefficients[0]], [fit(changes, 2, {}).coefficients[0]], 1e-8);
  });

  it("keeps a term inside the relations out of the directions that they leave free", () => {
    const model = fit(walks, 2, { terms: "inside-constant", longRun: 1 });
    const [first, second] = lagMatrices(model);
    const pull = first.map((row, i) => row.map((v, k) => v + second[i][k] - (i === k ? 1 : 0)));
    // constant and pull are multiples of the same loadings
    const ratio = model.coefficients[0].map((v, i) => v / pull[i][0]);
    close(ratio, [ratio[0], ratio[0], ratio[0]], { rtol: 1e-6 });
  });

  it("takes drivers and a season along unrestricted", () => {
    const driver = walks.map((_, t) => [Math.sin(t * t)]);
    const model = fit(walks, 2, { longRun: 3, cycle: 4, waves: 1 }, driver);
    blockClose(model.coefficients, fit(walks, 2, { cycle: 4, waves: 1 }, driver).coefficients, 1e-8);
  });

  it("moves along when series are measured in other units or stand in another order", () => {
    const model = fit(walks, 2, { longRun: 1 });
    const factor = [1e5, -2, 1e-3];
    const scaled = lagMatrices(fit(walks.map((row) => row.map((v, k) => v * factor[k])), 2, { longRun: 1 })); // prettier-ignore
    lagMatrices(model).forEach(
      (phi, j) =>
      blockClose(scaled[j].map((row, i) => row.map((v, k) => (v * factor[k]) / factor[i])), phi, 1e-7), // prettier-ignore
    );
    const order = [2, 0, 1];
    const turned = lagMatrices(fit(walks.map((row) => order.map((k) => row[k])), 2, { longRun: 1 })); // prettier-ignore
    lagMatrices(model).forEach(
      (phi, j) =>
      blockClose(turned[j], order.map((i) => order.map((k) => phi[i][k])), 1e-7), // prettier-ignore
    );
  });

  it("has residuals covariance with the divisor of the unrestricted model", () => {
    const model = fit(walks, 2, { longRun: 1 });
    const z = walks.slice(2).map((_, i) => [1, ...walks[i + 1], ...walks[i]]);
    const u = subtract(walks.slice(2), multiply(z, model.coefficients));
    blockClose(model.noiseCovariance, multiply(transpose(u), u).map((row) => row.map((v) => v / (118 - 7))), 1e-10); // prettier-ignore
  });

  it("never has an automatic order of 0", () => {
    const noise = inventedSeries(80, 2).map((row, t) =>
      row.map((v, k) => Math.sin(t * t * (k + 1)) + v * 1e-9),
    );
    const shape = settingsOfOrder(2, 0, { longRun: 1 });
    const stepped = stepSample(sampleOf(noise), shape.steps);
    expect(chooseOrder(stepped, { ...shape, longRun: null }, "bic", 3)).toBe(0);
    expect(chooseOrder(stepped, shape, "bic", 3)).toBeGreaterThan(0);
  });
});
