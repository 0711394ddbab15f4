import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { exampleSheet } from "../support/example-sheet";
import { computeFormula } from "../support/formula";
import "../support/sheet";
import { wrappers } from "../support/wrappers";

const root = new URL("../../", import.meta.url);
const read = (file: string): string => readFileSync(new URL(file, root), "utf8");

interface Package {
  readonly version: string;
  readonly scripts: Readonly<Record<string, string>>;
  readonly dependencies: Readonly<Record<string, string>>;
  readonly devDependencies: Readonly<Record<string, string>>;
}
const settings = JSON.parse(read("package.json")) as Package;
const documents = ["README.md", "DEVELOPERS.md"].map((file) => ({ file, text: read(file) }));
const [readme, developers] = documents.map(({ text }) => text);

/** The part of a document under a heading. */
const under = (text: string, heading: string): string => text.split(`\n## ${heading}\n`)[1].split("\n## ")[0];

/** What stands in code marks. */
const quoted = (text: string): string[] => [...text.matchAll(/`([^`\n]+)`/g)].map(([, code]) => code);

describe("README.md", () => {
  it("names every function", () => {
    const named = quoted(under(readme, "What there is"));
    expect([...wrappers.keys()].filter((id) => !named.includes(id))).toEqual([]);
  });

  it("starts with the job, then the two commands", () => {
    const commands = [...readme.matchAll(/^npm ci && npm (\w+)$/gm)].map(([, script]) => script);
    expect(commands).toEqual(["start", "test"]);
    expect(readme.indexOf("Analysts who keep several related series")).toBeLessThan(readme.indexOf("npm ci"));
  });
});

describe("DEVELOPERS.md", () => {
  it("gives the reason of every dependency, and of none that is gone", () => {
    const packages = [...under(developers, "Why each dependency").matchAll(/^\|([^|]*)\|/gm)];
    const installed = Object.keys({ ...settings.dependencies, ...settings.devDependencies });
    expect(packages.flatMap(([, cell]) => quoted(cell)).sort()).toEqual(installed.sort());
  });

  it("explains every script that is called by name", () => {
    const table = under(developers, "Scripts");
    const called = [...table.matchAll(/`npm (?:run )?([a-z]+)/g)].map(([, script]) => script);
    const parts = settings.scripts["test"]
      .match(/npm run (\w+)/g)!
      .map((part) => part.replace("npm run ", ""));
    const own = Object.keys(settings.scripts).filter(
      (script) => !parts.includes(script) || script === "build",
    );
    expect(called.sort()).toEqual(own.sort());
  });

  it("names only files and folders that exist", () => {
    const paths = quoted(developers).filter((code) => /^(src|test|taskpane)\/[\w./-]+$/.test(code));
    expect(paths.filter((path) => !existsSync(new URL(path, root)))).toEqual([]);
  });
});

describe("CHANGELOG.md", () => {
  it("begins with the version of the package", () =>
    expect(/^## (\S+)/m.exec(read("CHANGELOG.md"))![1]).toBe(settings.version));
});

const links = documents.flatMap(({ file, text }) =>
  [...text.matchAll(/\]\((?!https?:|#)([^)#]+)/g)].map(([, target]) => ({ file, target })),
);
it.each(links)("$file links to $target, which exists", ({ target }) =>
  expect(existsSync(fileURLToPath(new URL(target, root)))).toBe(true),
);

const formulas = [...new Set(documents.flatMap(({ text }) => text.match(/=COMOVE\.\w+\([^`\n]*\)/g) ?? []))];
it.each(formulas)("%s, as the documents write it, computes", async (formula) => {
  const table = await computeFormula(formula, exampleSheet);
  expect(Array.isArray(table) && table.length > 1).toBe(true);
});
