import { describe, expect, it } from "vitest";
import { toCells } from "../../src/sheet/cell";
import { ahead } from "../../src/sheet/calls/ahead";
import { bands } from "../../src/sheet/calls/bands";
import { model } from "../../src/sheet/calls/model";
import { roots } from "../../src/sheet/calls/roots";
import { readModelBlock } from "../../src/sheet/model-block";
import { digest, parseTag } from "../../src/sheet/model-tag";
import { close } from "../support/close";
import { inventedSeries, normals } from "../support/invented";
import { ask, errorOf, withHeader } from "../support/sheet";

const NAMES = ["price", "orders", "stock"];
const rows = inventedSeries(90, 3);
const series = withHeader(NAMES, rows);
const block = ask(model, { series, model: 2 });
const read = (cells: unknown) => readModelBlock(toCells(cells)!);
const refusal = (cells: unknown) => errorOf(ahead, { series, horizon: 2, model: cells });
type Cells = readonly (readonly unknown[])[];
const put = (cells: Cells, row: number, column: number, value: unknown): unknown[][] =>
  cells.map((line, i) => line.map((cell, j) => (i === row - 1 && j === column - 1 ? value : cell)));

describe("a model block of order 2 of three series", () => {
  it("has a tag, a constant, six lags, three covariance rows", () => {
    expect(block.map((row) => row[0])).toEqual([
      expect.stringMatching(
        /^comove model p=2; fit=least-squares; terms=constant; series=3; n=90; sum=[0-9a-f]{8}$/,
      ),
      "constant",
      "price, lag 1",
      "orders, lag 1",
      "stock, lag 1",
      "price, lag 2",
      "orders, lag 2",
      "stock, lag 2",
      "innovation cov price",
      "innovation cov orders",
      "innovation cov stock",
    ]);
    expect(block[0].slice(1)).toEqual(NAMES);
  });

  it("the one-step forecast is the row of regressors times the block", () => {
    const z = [1, ...rows[89], ...rows[88]];
    const expected = NAMES.map((_, k) => z.reduce((sum, v, r) => sum + v * (block[r + 1][k + 1] as number), 0));
    close(ask(ahead, { series: rows, horizon: 1, model: 2 }) as number[][], [expected], { rtol: 1e-12 });
  }); // prettier-ignore

  it.each([
    "terms=none",
    "terms=quadratic; cycle=4",
    "cycle=4; waves=2",
    "uselags=1 3",
    "steps=diff",
    "steps=diff | none | diff 4",
    "fit=yule-walker",
    "terms=trend; start=12",
  ])("forecasts and bands of the block are those without it: %s", (options) => {
    const order = options.startsWith("uselags") ? null : 2;
    const own = ask(model, { series, model: order, options });
    expect(read(own).edited).toBe(false);
    for (const call of [ahead, bands])
      expect(ask(call, { series, horizon: 4, model: own })).toEqual(
        ask(call, { series, horizon: 4, model: order, options }),
      );
  });

  it("with drivers too", () => {
    const drivers = withHeader(
      ["rain", "wind"],
      rows.concat(rows).map((_, t) => [Math.sin(t * t), Math.cos(t * t * 3)]),
    );
    const own = ask(model, { series, model: 1, drivers });
    expect(own.map((row) => row[0]).slice(5, 7)).toEqual(["rain", "wind"]);
    expect(ask(ahead, { series, horizon: 3, model: own, drivers })).toEqual(
      ask(ahead, { series, horizon: 3, model: 1, drivers }),
    );
  });

  it("MODEL of a block estimates its settings anew", () => {
    expect(ask(model, { series, model: put(block, 3, 2, 99) })).toEqual(block);
  });

  it("settings repeated beside a block are welcome, others are refused", () => {
    const call = (options: string) => errorOf(ahead, { series, horizon: 2, model: block, options });
    expect(call("terms=constant; fit=least-squares; steps=none; uselags=1 2")).toEqual(
      ask(ahead, { series, horizon: 2, model: block }),
    );
    expect(call("terms=trend")).toMatch(
      /^#VALUE! The option terms=trend contradicts the model block \(p=2; fit=least-squares; terms=constant\)\. /,
    );
    expect(call("steps=log")).toMatch(/^#VALUE! The option steps=log contradicts/);
    expect(call("uselags=2")).toMatch(/^#VALUE! The option uselags=2 contradicts/);
    expect(call("criterion=bic")).toMatch(/^#VALUE! The model block fixes the order/);
  });
});

describe("an edited block", () => {
  const edited = put(block, 3, 2, 0.25);

  it("is used as it stands", () => {
    const z = [1, ...rows[89], ...rows[88]];
    const column = edited.slice(1, 8).map((row) => row[1] as number);
    const [[first]] = ask(ahead, { series, horizon: 1, model: edited, options: "labels=no" }) as number[][];
    close(first, z.reduce((sum, v, r) => sum + v * column[r], 0)); // prettier-ignore
  });

  it("is known as edited, and as it was once the edit is taken back", () => {
    expect(read(block).edited).toBe(false);
    expect(read(edited).edited).toBe(true);
    expect(read(put(edited, 3, 2, block[2][1])).edited).toBe(false);
    expect(read(put(block, 11, 4, (block[10][3] as number) * (1 + 1e-10))).edited).toBe(true);
  });

  it.each([15, 12])("copied through text of %d digits is not an edited one", (digits) => {
    const copied = block.map((row) =>
      row.map((v) => (typeof v === "number" ? Number(v.toPrecision(digits)) : v)),
    );
    expect(copied).not.toEqual(block);
    expect(read(copied).edited).toBe(false);
  });

  it("no number loses the digest by keeping 15 digits", () => {
    const draw = normals(31);
    for (let i = 0; i < 20_000; i++) {
      const v = draw() * 10 ** (i % 12);
      if (digest([[[v]]]) !== digest([[[Number(v.toPrecision(15))]]])) expect.fail(`${v}`);
    }
  });

  it("zero and minus zero are the same number", () => {
    expect(digest([[[0]]])).toBe(digest([[[-0]]]));
  });

  it("a blank coefficient is refused, a zero is not", () => {
    expect(refusal(put(block, 3, 2, ""))).toBe(
      "#VALUE! Row 3, column 2 of this model block is blank. Every coefficient needs a number; write 0 to leave one out.",
    );
    expect(refusal(put(block, 3, 2, 0))).toBeInstanceOf(Array);
  });

  it("a covariance edited on one side is refused where it is used, and only there", () => {
    const lopsided = put(block, 10, 2, 7);
    expect(refusal(lopsided)).toBeInstanceOf(Array);
    expect(errorOf(bands, { series, horizon: 2, model: lopsided })).toBe(
      "#VALUE! The innovation covariance of orders and price differs from that of price and orders. Make the two cells equal.",
    );
  });

  it("a covariance that is none is refused as not available", () => {
    const negative = put(block, 9, 2, -1);
    expect(errorOf(bands, { series, horizon: 2, model: negative })).toMatch(
      /^#N\/A The innovation covariance is not positive definite/,
    );
  });

  it("numbers that run out of range end in one message, never in blanks", () => {
    const wild = block.map((row, i) => (i > 1 && i < 8 ? [row[0], 1e300, -1e300, 1e300] : row));
    for (const call of [ahead, bands])
      expect(errorOf(call, { series, horizon: 5, model: wild })).toMatch(/^#N\/A Some numbers run beyond/);
  });
});

describe("a block that was moved or damaged", () => {
  it.each<[string, Cells, string]>([
    [
      "one cell",
      [[block[0][0]]],
      "This is one cell of a model block. Point at the whole block, F2#.",
    ],
    [
      "cut off below",
      block.slice(0, -1),
      "This model block is cut off: it has 10 rows, its first cell announces 11. Point at the whole block.",
    ],
    [
      "cut off at the right",
      block.map((row) => row.slice(0, 3)),
      "This model block is cut off: it has 3 columns, its first cell announces 4. Point at the whole block.",
    ],
    [
      "cut off above",
      block.slice(1),
      "This is not a model block: its first cell does not begin with 'comove model'. Point at the whole result of MODEL.",
    ],
    [
      "begun too high",
      [[null, null, null, null, null], ...block.map((row) => [null, ...row])],
      "The model block begins in row 2, column 2 of this range. Start the range at that cell.",
    ],
    [
      "a row put in",
      [...block.slice(0, 5), ["", "", "", ""], ...block.slice(5)],
      "Row 6 of this model block is blank: a row was put in. Remove it.",
    ],
    [
      "a column put in",
      block.map(([a, b, ...rest]) => [a, b, null, ...rest]),
      "Column 3 of this model block is blank: a column was put in. Remove it.",
    ],
    [
      "a row with something in it put in",
      [...block.slice(0, 5), ["note", 1, 2, 3], ...block.slice(5)],
      "This model block has 12 rows, its first cell announces 11. Remove the rows put in, or point at the block alone.",
    ],
    [
      "notes beside it",
      block.map((row, i) => [...row, i === 3 ? "see mail" : ""]),
      "This model block has 5 columns, its first cell announces 4. Remove the columns put in, or point at the block alone.",
    ],
    [
      "rows exchanged",
      [...block.slice(0, 2), block[3], block[2], ...block.slice(4)],
      "Row 3 of this model block is 'orders, lag 1' where 'price, lag 1' belongs. Rows were moved; put them back in order.",
    ],
    [
      "columns exchanged",
      block.map(([a, b, c, d]) => [a, c, b, d]),
      "Column 2 of this model block is 'orders' where 'price' belongs. Columns were moved; put them back in order.",
    ],
    [
      "a text in it",
      put(block, 4, 3, "0,5"),
      "Row 4, column 3 of this model block holds '0,5'. A number is needed there.",
    ],
    [
      "its tag edited",
      put(block, 1, 1, String(block[0][0]).replace("terms=constant", "terms=line")),
      "The first cell of this model block was changed: 'terms' cannot be read. Spill the block anew with MODEL, or undo the change.",
    ],
  ])("%s", (_, cells, message) => {
    expect(refusal(cells)).toBe(`#VALUE! ${message}`);
    expect(errorOf(roots, { model: cells })).toBe(`#VALUE! ${message}`);
  }); // prettier-ignore

  it("blank rows and columns behind it are taken along without harm", () => {
    const generous = [...block.map((row) => [...row, "", null]), ...Array.from({ length: 3 }, () => [" "])];
    expect(refusal(generous)).toEqual(refusal(block));
  });

  it("labels rewritten in other words decide nothing", () => {
    const renamed = block.map((row, i) => (i === 0 ? row : [`row ${i}`, ...row.slice(1)]));
    expect(refusal(renamed)).toEqual(refusal(block));
  });

  it("other series, or the same in another order, are refused", () => {
    const call = (names: string[]) => errorOf(ahead, { series: withHeader(names, rows), horizon: 2, model: block });
    expect(call(["price", "stock", "orders"])).toBe(
      "#VALUE! The model block is for price, orders and stock; this range holds price, stock and orders. Use the same series in the same order, header included.",
    );
    expect(call(["a", "b", "c"])).toMatch(/^#VALUE! The model block is for price, orders and stock; this range holds a, b and c\. /);
    expect(errorOf(ahead, { series: rows, horizon: 2, model: block })).toMatch(/this range holds y1, y2 and y3\. /);
  }); // prettier-ignore

  it("drivers beside a block without any are refused, and the other way round", () => {
    const drivers = withHeader(["rain"], rows.concat(rows).map((_, t) => [Math.sin(t * t)]));
    expect(errorOf(ahead, { series, horizon: 2, model: block, drivers })).toBe(
      "#VALUE! The model block uses no drivers, but rain is given. Leave the drivers out.",
    );
    const own = ask(model, { series, model: 1, drivers });
    expect(errorOf(ahead, { series, horizon: 2, model: own })).toBe(
      "#VALUE! The model block needs the drivers rain. Point at them in the last argument.",
    );
  }); // prettier-ignore

  it("too few rows to start from", () => {
    expect(errorOf(ahead, { series: series.slice(0, 2), horizon: 2, model: block })).toBe(
      "#N/A This model looks back 2 rows, but the range has only 1 row to start from. Use a longer range.",
    );
  });

  it("a number, a text or nothing where only a block will do", () => {
    expect(errorOf(roots, { model: 2 })).toBe(
      "#VALUE! A model block is needed here, and 2 is none. Fit one with MODEL and point at its whole spill, F2#.",
    );
    expect(errorOf(roots, { model: null })).toMatch(/^#VALUE! Nothing is given for model/);
  });
});

describe("the tag", () => {
  it("reads in any case and with any blanks", () => {
    const tag = parseTag(
      "  Comove Model P=2;FIT = least-squares;terms=Constant ;  series=3;n=90;sum=12345678",
    );
    expect(tag.settings.lags).toEqual([1, 2]);
    expect([tag.series, tag.drivers, tag.rows, tag.start, tag.sum]).toEqual([3, 0, 90, 1, "12345678"]);
  });

  it.each([
    ["uselags=2 5", "p=5"],
    ["cycle=4; waves=1", "cycle=4; waves=1"],
    ["steps=log | none | diff, diff 12", "steps=log | none | diff, diff 12"],
    ["steps=log", "steps=log"],
    ["fit=yule-walker; terms=none", "fit=yule-walker; terms=none"],
    ["terms=trend; start=5", "start=5"],
  ])("%s is written and read back", (options, part) => {
    const positive = rows.map((row) => row.map((v, k) => Math.exp(v / (20 * (k + 1)))));
    const order = options.startsWith("uselags") ? null : 1;
    const own = ask(model, { series: positive, model: order, options });
    expect(own[0][0]).toContain(part);
    expect(ask(model, { series: positive, model: own })).toEqual(own);
  });
});
