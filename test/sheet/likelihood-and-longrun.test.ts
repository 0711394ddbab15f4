import { describe, expect, it } from "vitest";
import { ahead } from "../../src/sheet/calls/ahead";
import { bands } from "../../src/sheet/calls/bands";
import { estimates } from "../../src/sheet/calls/estimates";
import { granger } from "../../src/sheet/calls/granger";
import { impliedcov } from "../../src/sheet/calls/impliedcov";
import { model } from "../../src/sheet/calls/model";
import { fitted, residuals } from "../../src/sheet/calls/one-step";
import { residtest } from "../../src/sheet/calls/residtest";
import { response } from "../../src/sheet/calls/response";
import { roots } from "../../src/sheet/calls/roots";
import { shockpast } from "../../src/sheet/calls/shockpast";
import { shockshare } from "../../src/sheet/calls/shockshare";
import { simulate } from "../../src/sheet/calls/simulate";
import { whatif } from "../../src/sheet/calls/whatif";
import { blockClose, close } from "../support/close";
import { inventedSeries } from "../support/invented";
import { ask, errorOf, withHeader } from "../support/sheet";

const NAMES = ["fish", "ice", "trips"];
const rows = inventedSeries(80, 3);
const series = withHeader(NAMES, rows);
const gappy = withHeader(
  NAMES,
  rows.map((row, t) => row.map((v, k) => ((7 * t + k) % 13 === 0 ? null : v))),
);
const numbers = (table: readonly (readonly unknown[])[]): number[][] =>
  table.slice(1).map((row) => row.map((v) => (v === "" ? NaN : Number(v))));

const BLOCKS = {
  likelihood: "fit=likelihood; terms=trend; cycle=4",
  "moving average": "fit=likelihood; ma=1",
  "one relation": "longrun=1; terms=inside-constant",
  "two relations": "longrun=2; cycle=4; waves=1",
} as const;

describe.each(Object.entries(BLOCKS))("a block of %s", (name, options) => {
  const block = ask(model, { series, model: 2, options });
  const byBlock = { series, model: block };

  it("says what it is, and fitting it anew gives it again", () => {
    const tag = String(block[0][0]);
    for (const part of options.split("; ")) expect(tag.replace("; ", ";")).toContain(part);
    expect(ask(model, byBlock)).toEqual(block);
  });

  it("forecasts as the options do", () => {
    const known = "bands=known";
    close(numbers(ask(ahead, { ...byBlock, horizon: 5 })), numbers(ask(ahead, { series, horizon: 5, model: 2, options }))); // prettier-ignore
    close(
      numbers(ask(bands, { ...byBlock, horizon: 5, options: known })),
      numbers(ask(bands, { series, horizon: 5, model: 2, options: `${options}; ${known}` })),
    );
  });

  it("one row ahead is the regressors times the block, residuals of the rows before standing for innovations", () => {
    const left = numbers(ask(residuals, byBlock));
    const before = numbers(ask(fitted, byBlock));
    const t = 40;
    const labels = block.slice(1, -3).map(([label]) => String(label));
    const z = labels.map((label) => {
      const lag = /^(innovation of )?(\w+), lag (\d+)$/.exec(label);
      if (lag) {
        const k = NAMES.indexOf(lag[2]);
        return (lag[1] ? left : rows)[t - Number(lag[3])][k];
      }
      if (label === "constant") return 1;
      if (label === "trend") return t + 1;
      const season = /^season (\d)$/.exec(label);
      if (season) return ((t + 1) % 4 === Number(season[1]) ? 1 : 0) - 1 / 4;
      return /sin/.test(label) ? Math.sin((Math.PI / 2) * (t + 1)) : Math.cos((Math.PI / 2) * (t + 1));
    });
    const forecast = NAMES.map((_, k) => z.reduce((sum, v, r) => sum + v * Number(block[r + 1][k + 1]), 0));
    close(forecast, before[t], { rtol: 1e-9 });
    close(left[t], rows[t].map((v, k) => v - before[t][k]), { rtol: 1e-7 }); // prettier-ignore
  });

  it("every reading of it works", () => {
    const stable = numbers(ask(roots, { model: block }))[0][0] < 1 - 1e-9;
    expect(stable).toBe(!options.includes("longrun"));
    expect(ask(response, { model: block, horizon: 3 })).toHaveLength(1 + 3 * 4);
    for (const row of ask(shockshare, { model: block, horizon: 3 }).slice(1))
      close(
        row.slice(2).reduce<number>((sum, v) => sum + Number(v), 0),
        1,
      );
    for (const row of numbers(ask(shockpast, { ...byBlock, target: "ice" })))
      close(
        row.slice(1).reduce((sum, v) => sum + v, 0),
        row[0],
        { rtol: 1e-9 },
      );
    const plan = withHeader(NAMES, [[null, null, null], [null, null, null]]); // prettier-ignore
    close(numbers(ask(whatif, { ...byBlock, plan })), numbers(ask(ahead, { ...byBlock, horizon: 2 })), {
      rtol: 1e-12,
    });
    const start = withHeader(NAMES, rows.slice(-2));
    expect(numbers(ask(simulate, { model: block, rows: 5, start }))).toHaveLength(5);
    const implied = errorOf(impliedcov, { model: block, lags: 2 });
    if (stable) expect(implied).toHaveLength(1 + 3 * 3);
    else expect(implied).toMatch(/^#N\/A This model is not stable/);
    const tests = ask(residtest, byBlock);
    expect(tests.length).toBeGreaterThan(15);
    expect(tests.some((row) => row[8] === "not defined beside a moving average")).toBe(
      name === "moving average",
    );
  });
});

it("a driver stands between lags and innovations, and keeps its name", () => {
  const drivers = withHeader(["wind"], rows.map((_, t) => [Math.sin(t * t)])); // prettier-ignore
  const block = ask(model, { series, model: 1, options: "fit=likelihood; ma=1", drivers });
  expect(block.map(([label]) => label).slice(4, 6)).toEqual(["trips, lag 1", "wind"]);
  const args = { series, drivers: [...drivers, [0], [0.5]], horizon: 2 };
  close(
    numbers(ask(ahead, { ...args, model: block })),
    numbers(ask(ahead, { ...args, model: 1, options: "fit=likelihood; ma=1" })),
  );
});

describe("residual tests count what was estimated", () => {
  const df = (options: string) =>
    Number(ask(residtest, { series, model: 2, options }).find((row) => row[2] === "portmanteau")![5]);
  it("K²·lags less K²p, less K²q of a moving average, or less K²(p − 1) and Kr of long-run relations", () => {
    expect(df("")).toBe(9 * 10 - 9 * 2);
    expect(df("fit=likelihood; ma=1")).toBe(9 * 10 - 9 * 2 - 9);
    expect(df("longrun=1")).toBe(9 * 10 - 9 - 3);
  });
});

describe("gaps", () => {
  const options = "fit=likelihood; gaps=allow";

  it("are refused with what can be done about them", () =>
    expect(errorOf(ahead, { series: gappy, horizon: 2 })).toMatch(
      /^#VALUE! Series fish, row 2 is blank\. Fill it, shorten the range, or set gaps=allow with fit=likelihood\.$/,
    ));

  it("are refused without that hint where they cannot be allowed", () =>
    expect(errorOf(residtest, { series: gappy, model: 1 })).toMatch(
      /row 2 is blank\. Fill it or shorten the range\.$/,
    ));

  it("need the likelihood to be fitted with", () =>
    expect(errorOf(model, { series: gappy, model: 1, options: "gaps=allow" })).toMatch(
      /^#VALUE! The option gaps needs fit=likelihood beside it\./,
    ));

  it("belong to the call: a block fitted with them does not say so, and forecasts past them by its numbers", () => {
    const block = ask(model, { series: gappy, model: 1, options });
    expect(block[0][0]).not.toContain("gaps");
    const path = numbers(ask(ahead, { series: gappy, horizon: 4, model: block, options: "gaps=allow" }));
    close(path, numbers(ask(ahead, { series: gappy, horizon: 4, model: 1, options })));
    expect(errorOf(ahead, { series: gappy, horizon: 4, model: block })).toMatch(/is blank/);
  });

  it("are not looked past over so many rows that memory would run out, which the horizon decides", () => {
    const far = { series: gappy, model: 1, options: `${options}; steps=diff 12` };
    expect(errorOf(ahead, { ...far, horizon: 10_000 })).toMatch(
      /^#VALUE! To look past gaps, 39 numbers would be carried through 10,068 rows: too much here\. Ask for fewer rows ahead/,
    );
    expect(numbers(ask(ahead, { ...far, horizon: 24 }))).toHaveLength(24);
  });

  it("leave blank residuals and full fitted values", () => {
    const block = ask(model, { series: gappy, model: 1, options });
    const args = { series: gappy, model: block, options: "gaps=allow" };
    const left = ask(residuals, args).slice(1);
    const before = ask(fitted, args).slice(1);
    gappy.slice(1).forEach((row, t) =>
      row.forEach((v, k) => {
        expect(left[t][k] === "").toBe(t < 1 || v === null);
        expect(before[t][k] === "").toBe(t < 1);
        if (t >= 1 && v !== null)
          close(Number(before[t][k]) + Number(left[t][k]), Number(v), { rtol: 1e-12 });
      }),
    );
  });

  it("none of them there, change nothing", () =>
    blockClose(
      numbers(ask(bands, { series, horizon: 4, model: 1, options })),
      numbers(ask(bands, { series, horizon: 4, model: 1, options: "fit=likelihood" })),
    ));

  it("let an automatic order be chosen on the rows that no gap reaches", () => {
    const few = withHeader(NAMES, rows.map((row, t) => row.map((v, k) => (t === 30 && k === 1 ? null : v)))); // prettier-ignore
    expect(ask(model, { series: few, options })[0][0]).toMatch(/p=1;/);
  });

  it("are passed by the numbers of any block, but its coefficients' errors are not known there", () => {
    const block = ask(model, { series, model: 1 });
    const args = { series: gappy, horizon: 3, model: block };
    expect(numbers(ask(bands, { ...args, options: "gaps=allow; bands=known" }))).toHaveLength(3);
    expect(errorOf(bands, { ...args, options: "gaps=allow" })).toMatch(
      /^#VALUE! bands=fitted cannot look past gaps/,
    );
  });
});

describe("what does not go together is refused in words", () => {
  it.each([
    [model, "ma=1", /The option ma needs fit=likelihood beside it/],
    [model, "longrun=1; fit=likelihood", /The option longrun needs fit=least-squares beside it/],
    [model, "longrun=4", /For the option longrun, '?4'? will not do\. Give a whole number from 0 to 3\./],
    [model, "terms=inside-trend", /The option terms needs longrun beside it/],
    [bands, "longrun=1; bands=fitted", /With long-run relations the coefficients' errors are not known/],
    [bands, "fit=likelihood; bands=redrawn", /fit=likelihood is too slow for/],
    [estimates, "longrun=1", /ESTIMATES has no errors to give for a model with long-run relations/],
    [granger, "fit=likelihood; ma=1", /GRANGER has no place for a moving-average part/],
  ] as const)("%# %s", (call, options, words) =>
    expect(errorOf(call, { series, horizon: 2, model: 2, options })).toMatch(words),
  );

  it("long-run relations without a lag, or without some of them", () => {
    expect(errorOf(model, { series, model: 0, options: "longrun=1" })).toMatch(
      /needs? an order of 1 or more/,
    );
    expect(errorOf(model, { series, options: "longrun=1; uselags=1 3" })).toMatch(/all lags up to the order/);
    expect(errorOf(model, { series, options: "longrun=1; maxorder=0" })).toMatch(/an order of 1 or more/);
  });

  it("a setting that a block contradicts", () => {
    const block = ask(model, { series, model: 2, options: "longrun=1" });
    expect(errorOf(ahead, { series, horizon: 2, model: block, options: "longrun=2" })).toMatch(
      /contradicts the model block/,
    );
    expect(errorOf(ahead, { series, horizon: 2, model: block, options: "ma=1; fit=likelihood" })).toMatch(
      /contradicts/,
    );
    expect(
      Array.isArray(errorOf(ahead, { series, horizon: 2, model: block, options: "longrun=1; ma=0" })),
    ).toBe(true);
  });

  it("a tag that was written by hand to say what cannot be", () => {
    const block = ask(model, { series, model: 2, options: "longrun=1" });
    const retagged = (from: string, to: string) => [
      [String(block[0][0]).replace(from, to), ...block[0].slice(1)],
      ...block.slice(1),
    ];
    for (const [from, to] of [["longrun=1", "longrun=9"], ["fit=least-squares", "fit=likelihood"], ["longrun=1", "ma=1"]])
      expect(errorOf(roots, { model: retagged(from, to) })).toMatch(/^#VALUE! The first cell of this model block was changed/); // prettier-ignore
  });
});

describe("bands with long-run relations", () => {
  it("are known unless said otherwise, and can be redrawn", () => {
    const args = { series, horizon: 3, model: 2 };
    expect(ask(bands, { ...args, options: "longrun=1" })).toEqual(
      ask(bands, { ...args, options: "longrun=1; bands=known" }),
    );
    const drawn = numbers(ask(bands, { ...args, options: "longrun=1; bands=redrawn; draws=50; seed=3" }));
    expect(drawn.every((row) => [0, 3, 6].every((k) => row[k] < row[k + 1] && row[k + 1] < row[k + 2]))).toBe(
      true,
    );
  });
});
