import { describe, expect, it } from "vitest";
import { figure } from "../../src/core/diagnostics/figure";
import { MODEL } from "../../src/functions/fit";
import { residtest } from "../../src/sheet/calls/residtest";
import { residualReading } from "../../src/texts/en";
import { inventedSeries, normals } from "../support/invented";
import { ask, errorOf, withHeader } from "../support/sheet";

const names = ["ice", "fish", "trips"];
const rows = inventedSeries(160, 3);
const series = withHeader(names, rows);
const table = (args: Record<string, unknown>) => ask(residtest, { series, ...args });
const reading = (found: readonly (readonly unknown[])[], method: string, about = "all series") =>
  found.find((row) => row[1] === about && row[2] === method)!.at(-1);

describe("RESIDTEST", () => {
  const found = table({ model: 1 });

  it("heads its columns and asks its questions in order", () => {
    expect(found[0]).toEqual([
      "question", "about", "method", "lags", "statistic", "df", "df 2", "p-value", "reading",
    ]); // prettier-ignore
    expect([...new Set(found.slice(1).map(([question]) => question))]).toEqual([
      "anything left to predict?",
      "does the spread change?",
      "is the shape normal?",
      "did the equation change?",
      "fit to use?",
    ]);
    expect(found).toHaveLength(1 + 4 + 3 + 1 + 3 + 3 + 3);
    expect(found.filter(([, about]) => about === "fish").map(([, , method]) => method)).toEqual([
      "Ljung–Box",
      "largest Chow Wald",
    ]);
  });

  it("says that nothing is left by a model that fits, and that something is by one that does not", () => {
    expect(reading(found, "portmanteau, few rows")).toBe("nothing left that the lags could predict");
    expect(reading(table({ model: 0 }), "portmanteau, few rows")).toBe(
      "something is left: more lags, or steps, may help",
    );
  });

  it("is labelled without a header too, and cannot be bare", () => {
    const bare = ask(residtest, { series: rows, model: 1 });
    expect(bare[0]).toEqual(found[0]);
    expect(bare[5][1]).toBe("y1");
    expect(errorOf(residtest, { series, model: 1, options: "labels=no" })).toMatch(/^#VALUE! /);
  });

  it("takes one to three lags", () => {
    const lags = (options: string) =>
      table({ model: 1, options })
        .filter(([, about]) => about === "all series")
        .slice(0, 5)
        .map((row) => row[3]);
    expect(lags("testlags=12")).toEqual([12, 12, 2, 2, 2]);
    expect(lags("testlags=12, 3")).toEqual([12, 12, 3, 3, 2]);
    expect(lags("testlags=12 3 1")).toEqual([12, 12, 3, 3, 1]);
    for (const bad of ["0", "1 2 3 4", "x", "1.5", "1 -2"])
      expect(errorOf(residtest, { series, model: 1, options: `testlags=${bad}` })).toMatch(
        /^#VALUE! .*one to three whole numbers from 1/,
      );
  });

  it("judges a block by its numbers as they stand", async () => {
    const block = await MODEL(series as any[][], [[1]]);
    expect(table({ model: block })).toEqual(found);
    const edited = block.map((row, i) => (i === 2 ? [row[0], 0, 0, 0] : row));
    expect(reading(table({ model: edited }), "Breusch–Godfrey LM")).toMatch(/^something is left/);
  });

  it("tells changing spread, heavy tails, a change and too few rows", () => {
    const draw = normals(3);
    let spread = 1;
    const lively = Array.from({ length: 400 }, () => {
      const value = Math.sqrt(spread) * draw();
      spread = 0.3 + 0.7 * value * value;
      return [value];
    });
    const told = ask(residtest, { series: lively, model: 0 });
    expect(reading(told, "ARCH LM")).toMatch(/^spread changes with time/);
    expect(reading(told, "kurtosis")).toBe("tails heavier than normal: bands may be too narrow");
    const turned = Array.from({ length: 120 }, (_, t) => [(t < 60 ? 0 : 4) + draw()]);
    expect(reading(ask(residtest, { series: turned, model: 0 }), "largest Chow Wald", "y1")).toBe(
      "signs of a change: a shorter range, or a driver, may help (p below 0.001)",
    );
    const short = ask(residtest, { series: rows.slice(0, 13), model: 2 });
    expect(reading(short, "rows per coefficient")).toBe("fewer than 3 rows per coefficient: too many lags");
    expect(short.find((row) => row[2] === "ARCH LM")!.slice(3)).toEqual([
      "", "", "", "", "", "too few rows for this test",
    ]); // prettier-ignore
  });

  it("p-values that no table holds stay blank: more than 30 coefficients", () => {
    const wide = ask(residtest, { series: inventedSeries(400, 4), model: 8 });
    const row = wide.find(([, about, method]) => about === "y2" && method === "largest Chow Wald")!;
    expect(row[4]).toBeGreaterThan(0);
    expect(row.slice(6)).toEqual(["", "", "more than 30 coefficients: no p-value known"]);
  });

  it("the largest root says that shocks fade, or what is wrong where they do not", () => {
    expect(reading(found, "largest root")).toMatch(/^shocks fade: .*half left after [0-9.]+ rows$/);
    const root = (modulus: number) =>
      residualReading({
        question: "use",
        method: "root",
        about: null,
        figure: figure({ statistic: modulus }),
        root: { modulus, real: modulus, imaginary: 0, period: null },
        heavyTails: false,
      });
    expect(root(0.5)).toBe("shocks fade: half left after 1 row");
    expect(root(0)).toBe("shocks fade: gone at once");
    expect(root(0.99)).toMatch(/^hardly fades/);
    expect(root(1.1)).toBe("grows: the forecast explodes");
  });

  it("where nothing is found it says so, and claims no more", () => {
    expect(reading(found, "ARCH LM")).toBe("no sign that the spread changes");
    expect(reading(found, "largest Chow Wald", "ice")).toBe("no sign that the equation changed");
  });

  it("every reading is short and plain", () => {
    for (const [, , , , , , , , said] of [...found.slice(1), ...table({ model: 0 }).slice(1)]) {
      expect(said).toMatch(/^[a-z].{5,90}$/);
      expect(said).not.toMatch(/null|NaN|undefined|hypothesis|reject|heterosk|autocorrel/i);
    }
  });
});
