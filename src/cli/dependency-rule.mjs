import { dirname, relative, resolve } from "node:path";

/**
 * The plan of the house as a lint rule: which room may import from which. Arrows point downwards only.
 * `texts` are words about what the core reports and take types from it.
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
  cli: ["functions", "audit", "sheet", "core", "assets"],
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

const roomOf = (file) => (file.startsWith("taskpane/") ? "taskpane" : /^src\/([^/]+)\//.exec(file)?.[1]);

export const dependencyRule = {
  meta: {
    type: "problem",
    schema: [],
    messages: {
      room: "{{from}} may not import from {{to}}.",
      matrix: "Only src/core/linalg.ts imports ml-matrix.",
      platform: "{{name}} is named only in the entry files, the Office host and the stub.",
    },
  },
  create(context) {
    const file = relative(context.cwd, context.filename).replaceAll("\\", "/");
    const room = roomOf(file);
    const check = (node) => {
      const source = node.source?.value;
      if (typeof source !== "string") return;
      if (source === "ml-matrix" && file.startsWith("src/") && file !== MATRIX_GATE) {
        context.report({ node, messageId: "matrix" });
      }
      if (!source.startsWith(".") || !(room in MAY_IMPORT)) return;
      const target = roomOf(
        relative(context.cwd, resolve(dirname(context.filename), source)).replaceAll("\\", "/"),
      );
      if (target !== undefined && target !== room && !MAY_IMPORT[room].includes(target)) {
        context.report({ node, messageId: "room", data: { from: room, to: target } });
      }
    };
    return {
      ImportDeclaration: check,
      ExportNamedDeclaration: check,
      ExportAllDeclaration: check,
      ImportExpression: check,
      Identifier(node) {
        if (!PLATFORM_GLOBALS.has(node.name) || room === undefined || PLATFORM_FILES.includes(file)) return;
        const { parent } = node;
        const isKey =
          (parent.type === "Property" && parent.key === node) ||
          (parent.type === "MemberExpression" && parent.property === node);
        const isType = parent.type === "TSQualifiedName" || parent.type === "TSTypeReference";
        if (!isKey && !isType) context.report({ node, messageId: "platform", data: { name: node.name } });
      },
    };
  },
};
