import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { examples } from "../../src/assets/help/examples.mjs";
import { options } from "../../src/assets/help/options.mjs";
import { OPTIONS } from "../../src/sheet/option-specs";
import { exampleSheet } from "../support/example-sheet";
import { computeFormula } from "../support/formula";
import "../support/sheet";
import { wrappers } from "../support/wrappers";

const page = readFileSync(new URL("../../dist/help/index.html", import.meta.url), "utf8");
const ids = [...wrappers.keys()].sort();

describe("the help page", () => {
  it("has a section for every function, where its address points", () => {
    const anchors = [...page.matchAll(/<section id="([^"]+)">/g)].map(([, id]) => id);
    expect(anchors).toEqual(ids);
  });

  it("has an example of every function and of nothing else", () =>
    expect(Object.keys(examples).sort()).toEqual(ids));

  it("explains every option once", () =>
    expect(options.map(([key]) => key).sort()).toEqual(Object.keys(OPTIONS).sort()));

  it("names the default and every word that an option allows", () => {
    for (const [key, values] of options) {
      const { allowed } = OPTIONS[key as keyof typeof OPTIONS];
      if (allowed.kind === "one-of") expect(values, key).toBe(allowed.values.join(", "));
    }
  });

  it("says how a lead is read, and what neither a forecast nor a lead is", () => {
    const words = page.replace(/\s+/g, " ");
    expect(words).toContain("the column series leads the row series by k rows");
    expect(words).toContain("A forecast is not a guarantee, and a lead is not a cause.");
    expect(words).toContain("the licensed practitioner decide, not this sheet");
  });
});

const cases = Object.entries(examples).flatMap(([id, list]) => list.map(({ formula }) => ({ id, formula })));

describe("an example", () => {
  it.each(cases)("$formula computes", async ({ id, formula }) => {
    expect(formula).toMatch(new RegExp(`^=COMOVE\\.${id}\\(`));
    const table = await computeFormula(formula, exampleSheet);
    expect(Array.isArray(table) && table.length > 1 && table[0].length > 1).toBe(true);
  });
});
