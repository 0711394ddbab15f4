import { describe, expect, it } from "vitest";
import { chiSquareUpper, normalQuantile } from "../../src/core/distributions";
import { ahead } from "../../src/sheet/calls/ahead";
import { bands } from "../../src/sheet/calls/bands";
import { lagcorr } from "../../src/sheet/calls/lagcorr";
import { lagcov } from "../../src/sheet/calls/lagcov";
import { model } from "../../src/sheet/calls/model";
import { order } from "../../src/sheet/calls/order";
import { roots } from "../../src/sheet/calls/roots";
import { steps } from "../../src/sheet/calls/steps";
import { unstep } from "../../src/sheet/calls/unstep";
import { close } from "../support/close";
import { ask, withHeader } from "../support/sheet";

/** One small case per function, every number worked with pencil and paper. */

// deviations from 3: x −2 −1 0 1 2, y −1 −2 1 0 2
const five = withHeader(["x", "y"], [[1, 2], [2, 1], [3, 4], [4, 3], [5, 5]]); // prettier-ignore

// rows 2…5 on rows 1…4: means 3.5 and 2.5, Sxx = 5, Sxy = 2, Syy = 5
const short = [[1], [2], [4], [3], [5]];
const numbers = (table: readonly (readonly unknown[])[]) => table as number[][];

describe("LAGCOV", () => {
  it("stacks Γ(0) and Γ(1) under a header", () => {
    const table = ask(lagcov, { series: five, lags: 1 });
    expect(table[0]).toEqual(["lag", "series", "x", "y"]);
    expect(table.slice(1).map((row) => row.slice(0, 2))).toEqual([[0, "x"], [0, "y"], [1, "x"], [1, "y"]]); // prettier-ignore
    // y one row after x: (−2)(−2) + 1(−1) + 0·0 + 2·1 = 5; x one row after y: 2; y after y: 2 − 2 + 0 + 0 = 0
    close(
      numbers(table.slice(1).map((row) => row.slice(2))),
      [[2, 1.6], [1.6, 2], [0.8, 0.4], [1, 0]],
      { rtol: 1e-14 },
    ); // prettier-ignore
  });

  it("divides by n − k where asked; Γ(−1) is Γ(1) transposed", () => {
    const table = ask(lagcov, { series: five, lags: [[1, -1]], options: "divisor=n-k; labels=no" });
    close(numbers(table), [[1, 0.5], [1.25, 0], [1, 1.25], [0.5, 0]], { rtol: 1e-14 }); // prettier-ignore
  });
});

describe("LAGCORR", () => {
  it("carries the bound 1.96/√n", () => {
    const table = ask(lagcorr, { series: five, lags: [[1]] });
    expect(table[0]).toEqual(["lag", "series", "x", "y", "bound"]);
    // one cell means 0 … 1
    expect(table.length).toBe(1 + 2 * 2);
    close(numbers(table.slice(3).map((row) => row.slice(2))), [
      [0.4, 0.2, 1.96 / Math.sqrt(5)],
      [0.5, 0, 1.96 / Math.sqrt(5)],
    ]);
  });
});

describe("STEPS and UNSTEP", () => {
  it("differences, and back", () => {
    expect(ask(steps, { series: [[1], [3], [6]], steps: "diff" })).toEqual([[""], [2], [3]]);
    expect(ask(unstep, { series: [[1], [3], [6]], steps: "diff", values: [[4], [5]] })).toEqual([[10], [15]]);
  });

  it("one list per series; a row that any series loses is blank throughout", () => {
    const series = withHeader(["a", "b"], [[1, 10], [4, 20], [9, 40]]); // prettier-ignore
    expect(ask(steps, { series, steps: "sqrt | diff" })).toEqual([["a", "b"], ["", ""], [2, 10], [3, 20]]); // prettier-ignore
    expect(ask(unstep, { series, steps: "sqrt | diff", values: [[4, 1]] })).toEqual([["a", "b"], [16, 41]]); // prettier-ignore
  });
});

describe("ORDER", () => {
  it("orders 0 and 1 on the same four rows", () => {
    const table = ask(order, { series: short, maxorder: 1 });
    expect(table[0]).toEqual([
      "order",
      "log det",
      "AIC",
      "AICc",
      "BIC",
      "HQ",
      "FPE",
      "LR",
      "LR p-value",
      "chosen by",
    ]);
    const [zero, one] = [Math.log(1.25), Math.log(1.05)];
    const hq = (2 * Math.log(Math.log(4))) / 4;
    const lr = 1.5 * Math.log(1.25 / 1.05);
    close(numbers([table[1].slice(0, 7)]), [
      [0, zero, zero + 0.5, zero + 4, zero + Math.log(4) / 4, zero + hq, 1.25 * (5 / 3)],
    ]);
    expect(table[1].slice(7, 9)).toEqual(["", ""]);
    close(numbers([table[2].filter((_, j) => j !== 3 && j !== 9)]), [
      [1, one, one + 1, one + (2 * Math.log(4)) / 4, one + 2 * hq, 3.15, lr, chiSquareUpper(lr, 1)],
    ]);
    expect(table[2][3]).toBe("");
    expect(table.map((row) => row[9])).toEqual(["chosen by", "AIC, AICc, BIC, FPE", "HQ"]);
  });
});

describe("MODEL and what reads it", () => {
  const block = ask(model, { series: short, model: 1 });

  it("MODEL: slope 2/5, height 3.5 − 0.4·2.5, variance 4.2/(4 − 2)", () => {
    expect(block.map((row) => row[0]).slice(1)).toEqual(["constant", "y1, lag 1", "innovation cov y1"]);
    expect(block[0][0]).toMatch(
      /^comove model p=1; fit=least-squares; terms=constant; series=1; n=5; sum=[0-9a-f]{8}$/,
    );
    expect(block[0][1]).toBe("y1");
    close(numbers(block.slice(1).map((row) => row.slice(1))), [[2.5], [0.4], [2.1]], { rtol: 1e-13 });
  });

  it("AHEAD: 2.5 + 0.4·5, then 2.5 + 0.4·4.5", () => {
    close(numbers(ask(ahead, { series: short, horizon: 2, model: block })), [[4.5], [4.3]], { rtol: 1e-13 });
  });

  it("BANDS with known coefficients: variance 2.1, then 2.1·(1 + 0.4²)", () => {
    const reach = normalQuantile(0.975);
    const table = ask(bands, { series: short, horizon: 2, model: block, options: "bands=known" });
    const [one, two] = [reach * Math.sqrt(2.1), reach * Math.sqrt(2.1 * 1.16)];
    close(
      numbers(table),
      [
        [4.5 - one, 4.5, 4.5 + one],
        [4.3 - two, 4.3, 4.3 + two],
      ],
      { rtol: 1e-12 },
    );
  });

  it("BANDS with fitted coefficients: 2.1·(1 + ¼ + 2.5²/5), then 2.1·(1.16 + 2.29)", () => {
    // two rows ahead the forecast moves by 1.4 with the constant and by 4.5 + 0.4·5 with the slope;
    // (ZᵀZ)⁻¹ = [1.5 −0.5; −0.5 0.2], so 1.4²·1.5 − 2·0.5·1.4·6.5 + 6.5²·0.2 = 2.29
    const reach = normalQuantile(0.95);
    const table = ask(bands, { series: short, horizon: 2, model: block, options: "coverage=0.9" });
    const [one, two] = [reach * Math.sqrt(2.1 * 2.5), reach * Math.sqrt(2.1 * 3.45)];
    close(
      numbers(table),
      [
        [4.5 - one, 4.5, 4.5 + one],
        [4.3 - two, 4.3, 4.3 + two],
      ],
      { rtol: 1e-12 },
    );
  });

  it("BANDS heads its columns NAME low, NAME, NAME high", () => {
    const table = ask(bands, { series: withHeader(["ice"], short), horizon: 1, model: 1 });
    expect(table[0]).toEqual(["ice low", "ice", "ice high"]);
  });

  it("ROOTS: one root, 0.4, half left after ln ½ / ln 0.4 = 0.76 rows", () => {
    const [head, root] = ask(roots, { model: block });
    expect(head).toEqual(["modulus", "real", "imaginary", "period (rows)", "reading"]);
    close(numbers([root.slice(0, 3)]), [[0.4, 0.4, 0]], { rtol: 1e-13 });
    expect(root.slice(3)).toEqual(["", "half left after 0.76 rows"]);
  });
});
