import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { licences } from "../../src/cli/licences.mjs";

let project: string;

/** Source files of four packages; two share a text, one only names its licence, one grants nothing. */
beforeAll(() => {
  project = mkdtempSync(join(tmpdir(), "comove-licences-"));
  const files: Record<string, string> = {
    "node_modules/oak/package.json": '{"name":"oak","version":"1.0.0"}',
    "node_modules/oak/LICENSE": "Do as you like.\r\n",
    "node_modules/@tree/elm/package.json": '{"name":"@tree/elm","version":"2.1.0","license":"MIT"}',
    "node_modules/@tree/elm/license.md": "Do as you like.",
    "node_modules/oak/node_modules/ash/package.json": '{"name":"ash","version":"3.0.0","license":"ISC"}',
    "node_modules/bare/package.json": '{"name":"bare","version":"4.0.0"}',
  };
  for (const [name, text] of Object.entries(files)) {
    mkdirSync(join(project, dirname(name)), { recursive: true });
    writeFileSync(join(project, name), text);
  }
});

afterAll(() => rmSync(project, { recursive: true }));

const of = (...files: string[]): string => licences(files.map((file) => join(project, file)));

describe("licences", () => {
  it("name each package once and each text once", () => {
    const text = of("node_modules/oak/a.js", "node_modules/oak/b.js", "node_modules/@tree/elm/lib/index.js");
    expect(text.match(/^oak 1\.0\.0$/gm)).toHaveLength(1);
    expect(text.match(/Do as you like\./g)).toHaveLength(1);
    expect(text).toContain("@tree/elm 2.1.0\noak 1.0.0\n\nDo as you like.");
  });

  it("belong to the innermost package, by name where no text is at hand", () => {
    const text = of("node_modules/oak/node_modules/ash/x.js");
    expect(text).toContain("ash 3.0.0\n\nLicence: ISC");
    expect(text).not.toContain("oak");
  });

  it("are not asked of the project's own files", () => expect(of("src/x.ts")).not.toContain("---"));

  it("stop the build where nothing is granted", () =>
    expect(() => of("node_modules/bare/x.js")).toThrow("No licence is granted by bare 4.0.0."));
});
