import { dirname, relative, resolve } from "node:path";

/**
 * The plan of the house as a lint rule: which room may import from which. Arrows point downwards only.
 * `texts` are words about what the core reports and take types from it.
 * @type {Readonly<Record<string, readonly string[]>>}
 */
const MAY_IMPORT = {
  core: [],
  texts: ["core"],
  sheet: ["core", "texts"],
  engine: ["core"],
  functions: ["core", "sheet", "engine"],
  audit: ["core", "sheet", "texts"],
  taskpane: ["core", "sheet", "engine", "audit", "texts"],
  embedded: ["taskpane", "functions", "sheet", "engine", "core", "texts"],
  cli: ["functions", "audit", "sheet", "core", "texts", "assets"],
  assets: [],
};

const MATRIX_GATE = "src/core/linalg.ts";

/** The files that may name the platform's globals. */
const PLATFORM_FILES = [
  "src/functions/register.ts",
  "src/functions/answer.ts",
  "src/embedded/office-stub.ts",
  "taskpane/main.ts",
  "taskpane/host/office-host.ts",
];
const PLATFORM_GLOBALS = new Set(["Office", "Excel", "CustomFunctions"]);
const GLOBAL_OBJECTS = new Set(["globalThis", "window", "self"]);

/**
 * The room that a file stands in, none for what is no product code.
 * @param {string} file
 */
const roomOf = (file) => (file.startsWith("taskpane/") ? "taskpane" : /^src\/([^/]+)\//.exec(file)?.[1]);

/** @type {import("eslint").Rule.RuleModule} */
export const dependencyRule = {
  meta: {
    type: "problem",
    schema: [],
    messages: {
      room: "{{from}} may not import from {{to}}.",
      unplanned: "src/{{room}} is not on the plan of the house: add it to the dependency rule.",
      matrix: "Only src/core/linalg.ts imports ml-matrix.",
      platform: "{{name}} is named only in the entry files, the Office host and the stub.",
    },
  },
  create(context) {
    /** @param {string} path */
    const inProject = (path) => relative(context.cwd, path).replaceAll("\\", "/");
    const file = inProject(context.filename);
    const room = roomOf(file);
    if (room === undefined) return {};
    if (!(room in MAY_IMPORT)) {
      return { Program: (node) => context.report({ node, messageId: "unplanned", data: { room } }) };
    }

    /**
     * @param {import("estree").Node} node
     * @param {unknown} source  what stands between the quotes
     */
    const checkImport = (node, source) => {
      if (typeof source !== "string") return;
      if (/^ml-matrix(\/|$)/.test(source) && file !== MATRIX_GATE)
        context.report({ node, messageId: "matrix" });
      if (!source.startsWith(".")) return;
      const target = roomOf(inProject(resolve(dirname(context.filename), source)));
      if (target !== undefined && target !== room && !MAY_IMPORT[room].includes(target)) {
        context.report({ node, messageId: "room", data: { from: room, to: target } });
      }
    };
    /** @param {any} node */
    const checkSource = (node) => checkImport(node, node.source?.value);

    /** @param {import("estree").Identifier & import("eslint").Rule.NodeParentExtension} node */
    const checkName = (node) => {
      if (!PLATFORM_GLOBALS.has(node.name) || PLATFORM_FILES.includes(file)) return;
      const { parent } = node;
      const isKey = parent.type === "Property" && parent.key === node;
      const isMember = parent.type === "MemberExpression" && parent.property === node && !parent.computed;
      // the metadata generator knows an invocation by the name of its type, so the wrappers have to name it
      const isWrapperType = room === "functions" && /** @type {string} */ (parent.type) === "TSQualifiedName";
      if (isKey || isWrapperType || (isMember && !isGlobalObject(parent.object))) return;
      context.report({ node, messageId: "platform", data: { name: node.name } });
    };

    return {
      ImportDeclaration: checkSource,
      ExportNamedDeclaration: checkSource,
      ExportAllDeclaration: checkSource,
      ImportExpression: checkSource,
      TSImportType: checkSource,
      /** @param {any} node */
      TSExternalModuleReference: (node) => checkImport(node, node.expression.value),
      Identifier: checkName,
    };
  },
};

/**
 * `globalThis`, `window` or `self`, also inside a type assertion.
 * @param {any} node
 * @returns {boolean}
 */
function isGlobalObject(node) {
  if (node.type === "TSAsExpression" || node.type === "TSNonNullExpression")
    return isGlobalObject(node.expression);
  return node.type === "Identifier" && GLOBAL_OBJECTS.has(node.name);
}
