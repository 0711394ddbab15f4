import officeAddins from "eslint-plugin-office-addins";
import tseslint from "typescript-eslint";
import { dependencyRule } from "./src/cli/dependency-rule.mjs";

export default tseslint.config(
  { ignores: ["dist/", "coverage/", "node_modules/"] },
  ...tseslint.configs.recommended,
  {
    plugins: { comove: { rules: { "dependency-rule": dependencyRule } } },
    rules: {
      "comove/dependency-rule": "error",
      eqeqeq: ["error", "always"],
      "@typescript-eslint/consistent-type-imports": ["error", { fixStyle: "inline-type-imports" }],
      "@typescript-eslint/no-unused-vars": ["error", { argsIgnorePattern: "^_", varsIgnorePattern: "^_" }],
    },
  },
  {
    // the metadata generator understands `any` and `any[][]` and nothing narrower
    files: ["src/functions/*.ts", "test/**/*.ts"],
    rules: { "@typescript-eslint/no-explicit-any": "off" },
  },
  {
    files: ["taskpane/host/office-host.ts"],
    plugins: { "office-addins": officeAddins },
    rules: {
      "office-addins/load-object-before-read": "error",
      "office-addins/call-sync-before-read": "error",
      "office-addins/no-context-sync-in-loop": "error",
    },
  },
);
