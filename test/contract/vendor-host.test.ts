import { describe, expect, it } from "vitest";
import { buildMetadata, DEVELOPMENT_URL } from "../../src/cli/metadata.mjs";
import { close } from "../support/close";
import { inventedSeries } from "../support/invented";
import "../support/sheet";
import { wrappers } from "../support/wrappers";
import {
  errorCell,
  openVendorHost,
  richCell,
  richError,
  type Answer,
  type CallOf,
  type ParameterKind,
} from "./vendor-host";

/** The built functions in the vendor's own library: what really reaches a cell. */
const host = openVendorHost();
const { functions } = await buildMetadata({ baseUrl: DEVELOPMENT_URL });

const rows = inventedSeries(40, 2);
const series = [["price", "sales"], ...rows];
const drivers = [["advert"], ...rows.map((_, t) => [Math.sin(t)]), [0.5], [0.25]];

const sheet = (value: Answer): unknown[][] => {
  if (!value.ok) throw new Error(`an error instead of a table: ${JSON.stringify(value)}`);
  return value.value as unknown[][];
};
const [block] = (await host.callAll([["MODEL", [series, [[2]], null, null]]])).map(sheet);

/** What stands for a required argument in a plain use of a function. */
const PLAIN: Readonly<Record<string, unknown>> = {
  series,
  horizon: 2,
  lags: [[2]],
  maxorder: [[3]],
  model: block,
  steps: [["log, diff"]],
  values: [[0.01, 0.02], [0.03, -0.01]],
  plan: [[null, 20], [11, null]],
  target: "sales",
  rows: 6,
}; // prettier-ignore

const plainUses = functions.map((f): CallOf => [
  f.id,
  f.parameters.map((p) => (p.optional ? null : (PLAIN[p.name] ?? null))),
]);

const fullerUses: CallOf[] = [
  ["LAGCOV", [series, [[1, 3]], [["divisor=n-k"]]]],
  ["LAGCORR", [series, [[2]], [["labels", "no"]]]],
  ["STEPS", [series, [["log | diff"]]]],
  ["ORDER", [series, [[3]], [["terms", "trend"]], drivers.slice(0, 41)]],
  ["MODEL", [series, [[1]], [["terms=trend"]], drivers.slice(0, 41)]],
  ["AHEAD", [series, 3, block, null, null]],
  ["AHEAD", [series, 2, [[1]], null, drivers]],
  ["BANDS", [series, 2, [["auto"]], [["coverage=0.8"]], drivers]],
];

const uses = [...plainUses, ...fullerUses];
const answers = await host.callAll(uses);
const cases = uses.map(([name, params], i) => ({
  name,
  params,
  answer: answers[i],
  of: `${name}, use ${i}`,
}));

const kindsIn = (table: unknown[][]): string[] => [
  ...new Set(
    table.flat().map((cell) => (typeof cell === "number" && !Number.isFinite(cell) ? "gap" : typeof cell)),
  ),
];

describe("every function of functions.json", () => {
  it("is registered under its id, once, and nothing else is", () =>
    expect([...host.registered].sort()).toEqual(functions.map(({ id }) => id).sort()));

  it.each(cases)("$of fills cells with a rectangle of numbers, text and logical values", ({ answer }) => {
    const table = sheet(answer);
    expect(new Set(table.map((row) => row.length)).size).toBe(1);
    // null would show as 0
    expect(["number", "string", "boolean"]).toEqual(expect.arrayContaining(kindsIn(table)));
  });

  it.each(cases)("$of reaches the cell as it was computed", async ({ name, params, answer }) =>
    expect(sheet(answer)).toEqual(await wrappers.get(name)!(...params)),
  );

  it("says what is missing when every argument is left out", async () => {
    const empty = await host.callAll(functions.map((f): CallOf => [f.id, f.parameters.map(() => null)]));
    for (const answer of empty) {
      const message = expect.stringMatching(/^Nothing is given/) as string;
      expect(answer).toMatchObject({ ok: false, code: "#VALUE!", message });
    }
  });
});

describe("a range", () => {
  const same = async (...calls: CallOf[]): Promise<void> => {
    const [first, ...others] = (await host.callAll(calls)).map(sheet);
    for (const other of others) expect(other).toEqual(first);
  };

  it("of a single cell may come bare or as a range of one", () =>
    same(["LAGCOV", [series, [[1]], null]], ["LAGCOV", [series, 1, null]]));

  it("of one text may come bare or as a range of one", () =>
    same(["STEPS", [series, [["diff"]]]], ["STEPS", [series, "diff"]]));

  it("stands for a single value too", () =>
    same(["AHEAD", [series, 2, 1, null, null]], ["AHEAD", [series, [[2]], [[1]], null, null]]));

  it("may be left out as null, as blank text or as a blank cell", () =>
    same(
      ["AHEAD", [series, 2, null, null, null]],
      ["AHEAD", [series, 2, "", "", ""]],
      ["AHEAD", [series, 2, [[null]], [[""]], [[null]]]],
    ));

  it("may hold formatted numbers as objects with a type", () => {
    const dressed = series.map((row) =>
      row.map((v) =>
        typeof v === "number" ? richCell({ type: "Double", basicValue: v, numberFormat: "0.0" }) : v,
      ),
    );
    return same(["LAGCOV", [series, 1, null]], ["LAGCOV", [dressed, 1, null], "rich"]);
  });
});

describe("an error of ours", () => {
  const refused: [title: string, call: CallOf, code: string, start: string][] = [
    ["names the limits of an argument", ["LAGCOV", [series, 99, null]], "#VALUE!", "For lags, 99 will not do."],
    ["quotes an unknown option", ["LAGCOV", [series, 1, "colour=red"]], "#VALUE!", "There is no option 'colour'."],
    ["asks for what is missing", ["AHEAD", [series, null, null, null, null]], "#VALUE!", "Nothing is given for horizon."],
    ["shows #N/A where no result exists", ["MODEL", [series.slice(0, 6), 3, null, null]], "#N/A", "3 lags of 2 series"],
  ]; // prettier-ignore
  const errors = host.callAll(refused.map(([, call]) => call));

  it.each(refused.map(([title, , code, start], i) => ({ title, code, start, i })))(
    "$title",
    async ({ code, start, i }) => {
      const message = expect.stringContaining(start) as string;
      expect((await errors)[i]).toMatchObject({ ok: false, code, message });
    },
  );

  it("leaves the other calls of its batch alone", async () => {
    const [bad, good] = await host.callAll([
      ["LAGCOV", [series, 99, null]],
      ["LAGCOV", [series, 1, null]],
    ]);
    expect([bad.ok, good.ok]).toEqual([false, true]);
  });
});

describe("a special cell in the body", () => {
  const withCell = (cell: unknown): unknown[][] => [...series.slice(0, 21), [cell, 7], ...series.slice(22)];

  const fit = (cell: unknown, kind?: ParameterKind): CallOf => [
    "MODEL",
    [withCell(cell), 1, null, null],
    kind ?? "plain",
  ];

  const errorCells = host.callAll([fit(errorCell("#N/A"), "errors"), fit(richError("#N/A"), "rich")]);

  it.each([
    ["as hosts without rich values send it", 0],
    ["as a rich value", 1],
  ])("an error %s is found by series, row and code", async (_form, i) => {
    const message = expect.stringMatching(/^Series price, row 22: the error #N\/A/) as string;
    expect((await errorCells)[i]).toMatchObject({ ok: false, code: "#VALUE!", message });
  });

  // text over a bridge cannot carry undefined: it arrives as null
  const blanks = [null, "", undefined];
  const blankCells = host.callAll(blanks.map((blank) => fit(blank)));

  it.each(blanks.map((blank, i) => ({ blank: JSON.stringify(blank), i })))(
    "a blank that comes as $blank is a gap and not a zero",
    async ({ i }) => {
      const message = expect.stringMatching(/^Series price, row 22 is blank/) as string;
      expect((await blankCells)[i]).toMatchObject({ ok: false, code: "#VALUE!", message });
    },
  );

  it("a blank that an old host sends as 0 cannot be told from a zero", async () => {
    const [zero] = (await host.callAll([["STEPS", [withCell(0), "diff"]]])).map(sheet);
    close([[zero[21][0] as number]], [[-rows[19][0]]], { rtol: 1e-14 });
  });
});

describe("a call that is taken back", () => {
  const redrawn = "bands=redrawn; draws=20000";

  it("is given up, and says so", async () => {
    const before = performance.now();
    const answer = await host.callAndCancel("BANDS", [series, 3, 1, redrawn, null]);
    const message = "This calculation was given up because the formula or its inputs changed.";
    expect(answer).toEqual({ ok: false, code: "#N/A", message });
    // 20,000 draws would take seconds
    expect(performance.now() - before).toBeLessThan(2000);
  });

  it("without being taken back it is answered in its time, the page staying alive", async () => {
    const [table] = (
      await host.callAll([["BANDS", [series, 3, 1, "bands=redrawn; draws=3000", null], "cancelable"]])
    ).map(sheet);
    expect(table).toEqual(await wrappers.get("BANDS")!(series, 3, 1, "bands=redrawn; draws=3000"));
  });
});
