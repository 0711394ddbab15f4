import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { buildMetadata, DEVELOPMENT_URL } from "../../src/cli/metadata.mjs";
import { wrappers } from "../support/wrappers";

/** What the host accepts of functions.json; it drops the whole file, or a function, without saying why. */
const metadata = await buildMetadata({ baseUrl: DEVELOPMENT_URL });
const { functions } = metadata;
const parameters = functions.flatMap((f) => f.parameters.map((p) => ({ ...p, of: f.id })));

/** The arguments that are one value and not a range. */
const SCALARS = ["horizon", "rows", "target"];

describe("functions.json as a whole", () => {
  it("lists exactly the functions that the wrapper modules export", () =>
    expect(functions.map(({ id }) => id).sort()).toEqual([...wrappers.keys()].sort()));

  it("lets error cells reach the functions", () => expect(metadata.allowErrorForDataTypeAny).toBe(true));

  it("stays below one megabyte", () =>
    expect(Buffer.byteLength(JSON.stringify(metadata))).toBeLessThan(1_000_000));

  it("has no help address outside the folder that serves the add-in", async () => {
    const moved = await buildMetadata({ baseUrl: "https://example.org/comove/" });
    expect(moved.functions.map((f) => f.helpUrl)).toEqual(
      functions.map(({ id }) => `https://example.org/comove/help/index.html#${id}`),
    );
    expect(JSON.stringify(moved)).not.toContain("localhost");
  });
});

describe.each(functions)("$id", (f) => {
  it("has an id and a name that the host takes", () => {
    for (const text of [f.id, f.name]) expect(text).toMatch(/^[A-Z][A-Z0-9_.]{2,63}$/);
    expect(f.name).toBe(f.id);
  });

  it("cannot be taken for a cell address", () => {
    expect(f.id).not.toMatch(/^[A-Z]{1,3}[0-9]+$/);
    expect(f.id).not.toMatch(/^R[0-9]*C[0-9]*$/);
  });

  it("is described in at most 1024 characters", () => {
    expect(f.description).toMatch(/^[A-Z].*\.$/);
    expect(f.description!.length).toBeLessThanOrEqual(1024);
  });

  it("answers with a range", () => expect(f.result?.dimensionality).toBe("matrix"));

  it("asks for nothing after its first optional argument", () => {
    const optional = f.parameters.map((p) => p.optional === true);
    expect(optional).toEqual([...optional].sort((a, b) => Number(a) - Number(b)));
  });

  // a function that can be cancelled is handed its invocation after the parameters
  it("declares every parameter of its wrapper", () =>
    expect(f.parameters).toHaveLength(wrappers.get(f.id)!.length - (f.options?.cancelable ? 1 : 0)));
});

describe.each(parameters)("$of($name)", (parameter) => {
  it("has a name of at most 64 characters", () => expect(parameter.name).toMatch(/^[a-z]{3,64}$/));

  it("is described in at most 512 characters", () => {
    expect(parameter.description).toMatch(/^[A-Z].*\.$/);
    expect(parameter.description!.length).toBeLessThanOrEqual(512);
  });

  // a typed parameter is converted by the host before the call, and refused there without a word of ours
  it("takes anything that a cell can hold", () => expect(parameter.type).toBe("any"));

  it("takes a range unless it is a single value", () =>
    expect(parameter.dimensionality === "matrix").toBe(!SCALARS.includes(parameter.name)));
});

describe("making functions.json", () => {
  const declared = (id: string, code: string): string =>
    `/**\n * Adds.\n * @customfunction ${id}\n */\n${code}\n`;
  const adds = (id: string): string =>
    declared(id, `export function ${id}(x: any[][]): any[][] { return x; }`);

  async function made(files: Record<string, string>): Promise<unknown> {
    const sources = mkdtempSync(join(tmpdir(), "comove-metadata-"));
    for (const [name, text] of Object.entries(files)) writeFileSync(join(sources, name), text);
    return buildMetadata({ baseUrl: DEVELOPMENT_URL, sources }).finally(() =>
      rmSync(sources, { recursive: true }),
    );
  }

  it("gathers the functions of all files", async () =>
    expect(await made({ "a.ts": adds("ONE"), "b.ts": adds("TWO") })).toMatchObject({
      functions: [{ id: "ONE" }, { id: "TWO" }],
    }));

  it("stops when one id is declared in two files", () =>
    expect(made({ "a.ts": adds("SAME"), "b.ts": adds("SAME") })).rejects.toThrow(
      "The id SAME is declared more than once.",
    ));

  it("stops when a declaration stands over something that the generator passes over", () =>
    expect(made({ "a.ts": declared("ARROW", "export const ARROW = (x: any[][]) => x;") })).rejects.toThrow(
      /ARROW in .*a\.ts is declared but is not a top-level function/,
    ));

  it("stops when the generator meets a type that it cannot describe", () =>
    expect(
      made({
        "a.ts": declared("MIX", "export function MIX(x: (string | number)[][]): any[][] { return x; }"),
      }),
    ).rejects.toThrow("functions.json cannot be made:\n- "));
});
