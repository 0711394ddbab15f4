import { ESLint } from "eslint";
import { describe, expect, it } from "vitest";

const RULE = "comove/dependency-rule";

/** The project's own settings, for files that exist only here: no types are known of them, and only our rule runs. */
const eslint = new ESLint({
  ruleFilter: ({ ruleId }) => ruleId === RULE,
  overrideConfig: { files: ["**/*.ts"], languageOptions: { parserOptions: { projectService: false } } },
});

/** Rule messages that a line of code draws when it stands in a file. */
async function complaints(filePath: string, code: string): Promise<string[]> {
  const [{ messages }] = await eslint.lintText(code, { filePath });
  return messages.map(({ message }) => message);
}

describe("the dependency rule", () => {
  it.each([
    [
      "src/core/var/x.ts",
      'import { toCell } from "../../sheet/cell"; toCell(1);',
      "core may not import from sheet.",
    ],
    [
      "src/sheet/x.ts",
      'import { engine } from "../engine/engine"; engine;',
      "sheet may not import from engine.",
    ],
    [
      "src/engine/x.ts",
      'import { toCell } from "../sheet/cell"; toCell(1);',
      "engine may not import from sheet.",
    ],
    ["src/functions/x.ts", 'export * from "../../taskpane/pane";', "functions may not import from taskpane."],
    [
      "taskpane/x.ts",
      'import { x } from "../src/embedded/page"; x;',
      "taskpane may not import from embedded.",
    ],
    [
      "src/core/var/x.ts",
      'import { Matrix } from "ml-matrix"; new Matrix(1, 1);',
      "Only src/core/linalg.ts imports ml-matrix.",
    ],
    [
      "taskpane/pane.ts",
      "Excel.run(() => undefined);",
      "Excel is named only in the entry files, the Office host and the stub.",
    ],
    [
      "taskpane/pane.ts",
      'import { Matrix } from "ml-matrix"; new Matrix(1, 1);',
      "Only src/core/linalg.ts imports ml-matrix.",
    ],
    [
      "src/sheet/x.ts",
      'export type Engine = import("../engine/engine").Engine;',
      "sheet may not import from engine.",
    ],
    ["src/core/x.ts", 'void import("../texts/en");', "core may not import from texts."],
    [
      "taskpane/x.ts",
      "export let range: Excel.Range;",
      "Excel is named only in the entry files, the Office host and the stub.",
    ],
    [
      "src/sheet/x.ts",
      "(globalThis as any).Office.onReady();",
      "Office is named only in the entry files, the Office host and the stub.",
    ],
    [
      "src/cellar/x.ts",
      "export const x = 1;",
      "src/cellar is not on the plan of the house: add it to the dependency rule.",
    ],
  ])("%s may not hold: %s", async (file, code, message) => {
    expect(await complaints(file, code)).toEqual([message]);
  });

  it.each([
    ["src/core/linalg.ts", 'import { Matrix } from "ml-matrix"; new Matrix(1, 1);'],
    ["src/sheet/x.ts", 'import { Issue } from "../core/issue"; Issue;'],
    ["src/functions/x.ts", 'import { engine } from "../engine/engine"; engine;'],
    ["src/embedded/x.ts", 'import { mountPane } from "../../taskpane/pane"; mountPane;'],
    ["taskpane/host/office-host.ts", "Excel.run(() => undefined);"],
    ["taskpane/x.ts", "export const hosts = { Excel: 1 }; export const host = hosts.Excel;"],
    ["src/functions/x.ts", "export let call: CustomFunctions.CancelableInvocation;"],
    ["test/x.ts", 'import { Matrix } from "ml-matrix"; new Matrix(1, 1);'],
  ])("%s may hold: %s", async (file, code) => {
    expect(await complaints(file, code)).toEqual([]);
  });
});
