import { describe, it } from "vitest";
import { multiply, solveSquare, transpose } from "../../../src/core/linalg";
import type { Matrix } from "../../../src/core/matrix";
import { designOf } from "../../../src/core/var/design";
import { fitModel } from "../../../src/core/var/fit";
import { lagMatrices } from "../../../src/core/var/lag-matrices";
import { leastSquares } from "../../../src/core/var/least-squares";
import type { VarModel } from "../../../src/core/var/model";
import type { ModelSettings } from "../../../src/core/var/settings";
import { blockClose, close } from "../../support/close";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const settingsFor = (series: number, order: number, changes: Partial<ModelSettings> = {}): ModelSettings =>
  settingsOfOrder(series, order, { fit: "shrinkage", ...changes });
const fit = (
  series: Matrix,
  order: number,
  changes: Partial<ModelSettings> = {},
  drivers: Matrix = [],
): VarModel =>
  fitModel({
    sample: sampleOf(series, drivers),
    plan: { kind: "fit", settings: settingsFor(series[0].length, order, changes) },
  });

const y = frozen(inventedSeries(60, 3));

describe("shrinkage", () => {
  it("is the posterior mean (ZᵀZ + s²V⁻¹)⁻¹(Zᵀy + s²V⁻¹b₀), equation by equation, terms and drivers flat", () => {
    const [pull, fade] = [0.3, 1.5];
    const settings = settingsFor(3, 2, { pull, fade });
    const driver = y.map((_, t) => [Math.cos(t * t)]);
    const stepped = { y, drivers: driver, start: 1 };
    const { z, y: left, regressors } = designOf(stepped, settings, 2);
    // each series' own autoregression, by its own design
    const own = [0, 1, 2].map((k) => {
      const one = { y: y.map((row) => [row[k]]), drivers: [], start: 1 };
      const { residuals } = leastSquares(designOf(one, settingsOfOrder(1, 2), 2));
      return Math.sqrt(residuals.reduce((sum, [u]) => sum + u * u, 0) / (58 - 2 - 1));
    });
    const expected = own.map((s, i) => {
      const a = multiply(transpose(z), z).map((row) => [...row]);
      const b = multiply(
        transpose(z),
        left.map((row) => [row[i]]),
      ).map((row) => [...row]);
      regressors.forEach((regressor, r) => {
        if (regressor.kind !== "lag") return;
        const deviation = (pull * (s / own[regressor.series])) / regressor.lag ** fade;
        a[r][r] += s ** 2 / deviation ** 2;
        if (regressor.series === i && regressor.lag === 1) b[r][0] += s ** 2 / deviation ** 2;
      });
      return solveSquare(a, b).map(([v]) => v);
    });
    blockClose(transpose(fit(y, 2, { pull, fade }, driver).coefficients), expected, 1e-9);
  });

  it("with a very weak pull towards the prior is least squares", () => {
    blockClose(fit(y, 2, { pull: 1e6 }).coefficients, fit(y, 2, { fit: "least-squares" }).coefficients, 1e-8);
  });

  it("with a very strong one is a random walk with drift, and white noise where the steps include a difference", () => {
    const [phi] = lagMatrices(fit(y, 1, { pull: 1e-6 }));
    close(
      phi,
      [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ],
      { rtol: 1e-6, atol: 1e-6 },
    ); // prettier-ignore -- zeros are the prior's
    const diff = [{ kind: "diff", span: 1 } as const];
    const [changes] = lagMatrices(fit(y, 1, { pull: 1e-6, steps: [diff, [], diff] }));
    close(
      changes,
      [
        [0, 0, 0],
        [0, 1, 0],
        [0, 0, 0],
      ],
      { rtol: 1e-6, atol: 1e-6 },
    ); // prettier-ignore -- as above
  });

  it("does not depend on units or on the order of the series", () => {
    const plain = lagMatrices(fit(y, 2));
    const unit = [1e5, 1e-4, 7];
    const from = [1, 2, 0];
    const moved = lagMatrices(
      fit(
        y.map((row) => from.map((k, i) => unit[i] * row[k])),
        2,
      ),
    );
    moved.forEach((phi, lag) =>
      blockClose(
        phi.map((row, i) => row.map((v, j) => (v * unit[j]) / unit[i])),
        from.map((i) => from.map((j) => plain[lag][i][j])),
        1e-9,
      ),
    );
  });

  it("divides the residuals' squares by T − q", () => {
    const model = fit(y, 1);
    const { z, y: left } = designOf({ y, drivers: [], start: 1 }, settingsFor(3, 1), 1);
    const u = left.map((row, t) =>
      row.map((v, k) => v - z[t].reduce((sum, x, r) => sum + x * model.coefficients[r][k], 0)),
    );
    blockClose(
      model.noiseCovariance,
      multiply(transpose(u), u).map((row) => row.map((v) => v / (59 - 4))),
      1e-10,
    );
  });
});
