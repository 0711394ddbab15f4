import { describe, expect, it } from "vitest";
import { frozen } from "../support/frozen";
import { goodValue, hostileMixes, hostileValues, type Args } from "../support/hostile";
import "../support/sheet";
import { wrappers } from "../support/wrappers";

/**
 * Every function of the sheet, whatever it is given, answers with a rectangle of finite numbers, text and logical
 * values, or with one error whose message a person can act on; quickly, and without touching what it was given.
 * Functions are found by themselves: every exported function of src/functions with a name in capitals.
 */
interface SheetFunction {
  readonly name: string;
  readonly parameters: readonly string[];
  readonly call: (...args: Args) => unknown;
}

const functions: SheetFunction[] = [...wrappers]
  .filter(([name, value]) => /^[A-Z]{3,}$/.test(name) && typeof value === "function")
  .map(([name, value]) => ({ name, parameters: parametersOf(value), call: value }));

function parametersOf(f: (...args: never[]) => unknown): string[] {
  const inside = /\(([^)]*)\)/.exec(f.toString())![1];
  return inside
    .split(",")
    .map((part) => part.trim())
    .filter((part) => part !== "" && part !== "invocation");
}

/** Functions that start from a model block alone. */
const needsBlock = ({ parameters }: SheetFunction): boolean => parameters[0] === "model";

/** Words that belong to a program and not to a person. */
const PROGRAM_WORDS =
  /undefined|\bNaN\b|Infinity|\[object|TypeError|RangeError|Error:|\bat \w+\.|\bnull\b|stack|BigInt|Symbol/;
const BUG_WORDS = "failed on something it should have handled";

/** Of the processor, so that a machine busy with other work changes nothing. */
const SECONDS = 2;

const FITS = [
  "least-squares",
  "yule-walker",
  "nuttall-strand",
  "likelihood",
  "likelihood; ma=1",
  "shrinkage",
  "least-squares; longrun=1",
];
const TERMS = ["constant", "none", "trend", "constant; cycle=4; waves=1; steps=diff"];
const driver = [["rain"], ...Array.from({ length: 90 }, (_, t) => [Math.sin(t * t)])];

/** What is wrong with an answer, or null. */
async function faultIn(f: SheetFunction, args: Args): Promise<string | null> {
  const before = process.cpuUsage();
  let fault: string | null;
  try {
    fault = faultInTable(await f.call(...args));
  } catch (thrown) {
    fault = faultInError(thrown);
  }
  const { user, system } = process.cpuUsage(before);
  const seconds = (user + system) / 1e6;
  return fault ?? (seconds > SECONDS ? `took ${seconds.toFixed(1)} s` : null);
}

function faultInTable(table: unknown): string | null {
  if (!Array.isArray(table) || table.length === 0) return "is no rectangle";
  const width = (table[0] as unknown[]).length;
  for (const row of table as unknown[]) {
    if (!Array.isArray(row) || row.length !== width || width === 0) return "is ragged";
    for (const cell of row as unknown[]) {
      if (typeof cell === "number" ? !Number.isFinite(cell) : !["string", "boolean"].includes(typeof cell))
        return `holds ${String(cell)}`;
      if (typeof cell === "string" && PROGRAM_WORDS.test(cell)) return `says '${cell}'`;
    }
  }
  return null;
}

function faultInError(thrown: unknown): string | null {
  const { code, message } = thrown as { code?: unknown; message?: unknown };
  if (code !== "#VALUE!" && code !== "#N/A") return `threw ${String(thrown)}`;
  if (typeof message !== "string" || message.length < 20) return "has no message";
  if (message.includes(BUG_WORDS)) return "failed on something it should have handled";
  if (message.length > 255) return `has a message of ${message.length} characters: ${message.slice(0, 300)}`;
  if (PROGRAM_WORDS.test(message)) return `says '${message}'`;
  if (!message.endsWith(".")) return `ends without a full stop: ${message}`;
  if (!/^[^\s].{15,}/.test(message.slice(0, 100))) return `says little: ${message}`;
  return null;
}

/** One line per fault, so that a failing run shows them all. */
async function faults(f: SheetFunction, table: readonly { what: string; args: Args }[]): Promise<string[]> {
  const found: string[] = [];
  for (const { what, args } of table) {
    const fault = await faultIn(f, args.map(frozen));
    if (fault !== null) found.push(`${f.name}, ${what}: ${fault}`);
  }
  return found;
}

const good = (f: SheetFunction): unknown[] =>
  f.parameters.map((parameter) => goodValue(parameter, needsBlock(f)));

it("the functions of the first storey are all found", () => {
  const names = functions.map(({ name }) => name);
  expect(names).toEqual(
    expect.arrayContaining([
      "LAGCOV",
      "LAGCORR",
      "STEPS",
      "UNSTEP",
      "ORDER",
      "MODEL",
      "ROOTS",
      "AHEAD",
      "BANDS",
    ]),
  );
});

it("the table holds far more than 300 sets of arguments", () => {
  const count = functions.flatMap(({ parameters }) => parameters.map((p) => hostileValues(p).length));
  expect(count.reduce((a, b) => a + b, 0)).toBeGreaterThan(1000);
});

describe.each(functions.map((f) => [f.name, f] as const))("%s", (_, f) => {
  it("answers arguments in order with a result", async () => {
    const table = await f.call(...good(f).map(frozen));
    expect(faultInTable(table)).toBeNull();
  });

  it("may be given too few arguments and too many", async () => {
    const table = [
      ...f.parameters.map((__, count) => ({ what: `${count} arguments`, args: good(f).slice(0, count) })),
      { what: "more arguments", args: [...good(f), 1, "more", null] },
    ];
    expect(await faults(f, table)).toEqual([]);
  });

  it.each(f.parameters)("stands whatever is given for %s", { timeout: 120_000 }, async (parameter) => {
    const at = f.parameters.indexOf(parameter);
    const table = hostileValues(parameter).map(({ what, value }) => ({
      what: `${parameter} = ${what}`,
      args: good(f).map((v, i) => (i === at ? value : v)),
    }));
    expect(await faults(f, table)).toEqual([]);
  });

  it("answers every estimator with every kind of terms, order and driver", { timeout: 120_000 }, async () => {
    if (!f.parameters.includes("options") || !f.parameters.includes("model")) return;
    const table = FITS.flatMap((fit) =>
      TERMS.flatMap((terms) =>
        [0, 1, "auto"].flatMap((model) =>
          [null, driver].map((drivers) => ({
            what: `fit=${fit}; terms=${terms}, order ${model}, ${drivers ? "a driver" : "no driver"}`,
            args: good(f).map(
              (v, i) => ({ options: `fit=${fit}; terms=${terms}`, model, drivers })[f.parameters[i]] ?? v,
            ),
          })),
        ),
      ),
    );
    expect(await faults(f, table)).toEqual([]);
  });

  it("stands hostile arguments all at once", { timeout: 120_000 }, async () => {
    const table = hostileMixes(f.parameters, 60, 2024).map((mix) => ({
      what: mix.map(({ what }, i) => `${f.parameters[i]} = ${what}`).join("; "),
      args: mix.map(({ value }) => value),
    }));
    expect(await faults(f, table)).toEqual([]);
  });
});
