import { describe, expect, it } from "vitest";
import { ahead } from "../../src/sheet/calls/ahead";
import { bands } from "../../src/sheet/calls/bands";
import { model } from "../../src/sheet/calls/model";
import { close } from "../support/close";
import { inventedSeries } from "../support/invented";
import { ask, errorOf, withHeader } from "../support/sheet";

const series = withHeader(["fish", "ice", "trips"], inventedSeries(60, 3));
const numbers = (table: readonly (readonly unknown[])[]): number[][] =>
  table.slice(1).map((row) => row.map(Number));

describe("estimators from the sheet", () => {
  it.each(["yule-walker", "nuttall-strand", "shrinkage", "shrinkage; pull=0,35; fade=0.5"])(
    "fit=%s goes through a block: the same forecast and bands with and without it",
    (fit) => {
      const options = `fit=${fit}; terms=trend; cycle=4`;
      const block = ask(model, { series, model: 2, options });
      for (const call of [ahead, bands]) {
        close(
          numbers(ask(call, { series, horizon: 5, model: block })),
          numbers(ask(call, { series, horizon: 5, model: 2, options })),
        );
      }
      expect(ask(model, { series, model: block })).toEqual(block);
    },
  );

  it("the tag keeps pull and fade with a decimal point", () => {
    const [[tag]] = ask(model, { series, model: 1, options: "fit=shrinkage; pull=0,35; fade=2" });
    expect(tag).toMatch(/fit=shrinkage; .*pull=0\.35; fade=2;/);
  });

  it("bands of a shrunk model are no wider at one step than the posterior says", () => {
    const known = numbers(
      ask(bands, { series, horizon: 1, model: 2, options: "fit=shrinkage; bands=known" }),
    )[0];
    const fitted = numbers(ask(bands, { series, horizon: 1, model: 2, options: "fit=shrinkage" }))[0];
    const squares = numbers(ask(bands, { series, horizon: 1, model: 2 }))[0];
    const width = (row: number[], k: number) => row[3 * k + 2] - row[3 * k];
    for (let k = 0; k < 3; k++) {
      expect(width(fitted, k)).toBeGreaterThan(width(known, k));
      // the prior adds knowledge: its share of the band is smaller than that of least squares
      expect(width(fitted, k) / width(known, k)).toBeLessThan(
        width(squares, k) /
          width(numbers(ask(bands, { series, horizon: 1, model: 2, options: "bands=known" }))[0], k),
      );
    }
  });

  it("what does not go together is refused in words", () => {
    expect(errorOf(model, { series, options: "fit=nuttall-strand; uselags=1 3" })).toBe(
      "#VALUE! The fit nuttall-strand uses all lags up to the order. Leave uselags out, or choose least-squares or yule-walker.",
    );
    expect(errorOf(model, { series, options: "pull=0.1" })).toBe(
      "#VALUE! The option pull needs fit=shrinkage beside it. Add fit=shrinkage, or leave pull out.",
    );
    const drivers = series.map((_, t) => [t === 0 ? "wind" : t]);
    expect(errorOf(model, { series, model: 1, options: "fit=nuttall-strand", drivers })).toMatch(/^#VALUE! /);
    const block = ask(model, { series, model: 1, options: "fit=shrinkage" });
    expect(errorOf(ahead, { series, horizon: 2, model: block, options: "pull=0.5" })).toMatch(
      /contradicts the model block/,
    );
  });
});
