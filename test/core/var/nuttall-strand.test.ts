import { describe, expect, it } from "vitest";
import { forecastPath } from "../../../src/core/forecast/path";
import { column, type Matrix } from "../../../src/core/matrix";
import { fitModel } from "../../../src/core/var/fit";
import { lagMatrices } from "../../../src/core/var/lag-matrices";
import type { VarModel } from "../../../src/core/var/model";
import { nuttallStrand } from "../../../src/core/var/nuttall-strand";
import { largestRoot } from "../../../src/core/var/roots";
import type { ModelSettings } from "../../../src/core/var/settings";
import reference from "../../reference/r-burg.json";
import { blockClose, close } from "../../support/close";
import { readCsv } from "../../support/data";
import { frozen } from "../../support/frozen";
import { inventedSeries } from "../../support/invented";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const fit = (series: Matrix, order: number, changes: Partial<ModelSettings> = {}): VarModel =>
  fitModel({
    sample: sampleOf(series),
    plan: {
      kind: "fit",
      settings: settingsOfOrder(series[0].length, order, { fit: "nuttall-strand", ...changes }),
    },
  });

describe("the Nuttall–Strand recursion", () => {
  it("is Burg's by hand for one series: 2·Σxₜxₜ₋₁ / Σ(xₜ² + xₜ₋₁²)", () => {
    // 1·2 + 2·1 + 1·(−1) = 3, twice that over (4 + 1 + 1) + (1 + 4 + 1)
    const { lagMatrices: phi, innovation } = nuttallStrand([[1], [2], [1], [-1]], 1);
    close(phi[0], [[0.5]]);
    close(innovation, [[(7 / 4) * (1 - 0.25)]]);
  });

  it("at order 0 leaves the covariance of the deviations", () => {
    const { lagMatrices: phi, innovation } = nuttallStrand(
      [
        [1, 0],
        [-1, 2],
        [0, -2],
      ],
      0,
    );
    expect(phi).toEqual([]);
    close(innovation, [[2 / 3, -2 / 3], [-2 / 3, 8 / 3]]); // prettier-ignore
  });

  it("treats independent permutations and units of the series alike", () => {
    const y = inventedSeries(90, 3);
    const [plain] = [fit(y, 2)];
    const moved = fit(
      y.map(([a, b, c]) => [1e4 * c, a, 1e-3 * b]),
      2,
    );
    const from = [2, 0, 1];
    const unit = [1e4, 1, 1e-3];
    lagMatrices(moved).forEach((phi, lag) =>
      blockClose(
        phi.map((row, i) => row.map((v, j) => (v * unit[j]) / unit[i])),
        from.map((i) => from.map((j) => lagMatrices(plain)[lag][i][j])),
        1e-9,
      ),
    );
  });

  it("is always stable, and comes near least squares on a long series", () => {
    const y = inventedSeries(4000, 3);
    const burg = fit(y, 1);
    const squares = fit(y, 1, { fit: "least-squares" });
    expect(largestRoot(burg)).toBeLessThan(1);
    blockClose(lagMatrices(burg)[0], lagMatrices(squares)[0], 0.02);
    expect(largestRoot(fit(inventedSeries(14, 2), 3))).toBeLessThan(1);
  });

  it.each(reference.cases)(
    "agrees with R on the lynx, order $order",
    ({ order, coefficients, mean, innovation }) => {
      const lynx = readCsv("lynx.csv", ["lynx"]).map(([v]) => [Math.log(v)]);
      const model = fit(lynx, order);
      close(column(model.coefficients, 0).slice(1), coefficients, { rtol: 1e-10 });
      close(model.coefficients[0][0], mean * (1 - coefficients.reduce((sum, v) => sum + v, 0)), {
        rtol: 1e-10,
      });
      // ours is scaled by n/(n − q); R's is the recursion's own
      close((model.noiseCovariance[0][0] * (114 - order - 1)) / 114, innovation, { rtol: 1e-10 });
    },
  );

  it("carries a trend and a season through the lags: adding them to the data adds them to the forecast", () => {
    const y = inventedSeries(81, 2);
    const extra = (t: number, k: number) => 0.3 * t * (k + 1) + (t % 4 === 0 ? 5 : 0);
    const ahead = (series: Matrix) =>
      forecastPath(fit(series, 1, { terms: "trend", cycle: 4 }), { y: series, drivers: [], start: 1 }, 6)
        .forecast;
    const lifted = ahead(y.map((row, t) => row.map((v, k) => v + extra(t, k))));
    blockClose(
      lifted.map((row, j) => row.map((v, k) => v - extra(81 + j, k))),
      ahead(y),
      1e-9,
    );
  });

  it("leaves its input unchanged", () => {
    const y = frozen(inventedSeries(40, 2));
    expect(() => fit(y, 2)).not.toThrow();
  });
});
