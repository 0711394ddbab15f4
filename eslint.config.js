import officeAddins from "eslint-plugin-office-addins";
import tseslint from "typescript-eslint";
import { dependencyRule } from "./src/cli/dependency-rule.mjs";

const typed = tseslint.configs.recommendedTypeCheckedOnly;

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
    // a promise that nobody waits for hides its failure: in a test, an expectation that was never checked
    files: ["src/**/*.ts", "taskpane/**/*.ts", "test/**/*.ts"],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: { "@typescript-eslint/no-floating-promises": "error" },
  },
  {
    // what the grid of the embedded page hands out is untyped, so its room is left out
    files: ["src/**/*.ts", "taskpane/**/*.ts"],
    ignores: ["src/embedded/**"],
    extends: typed,
    rules: {
      "@typescript-eslint/unbound-method": "off",
      "@typescript-eslint/require-await": "off",
      // the host's enumerations are text at run time
      "@typescript-eslint/no-unsafe-enum-comparison": "off",
      // the host's errors are no Error objects to the type checker
      "@typescript-eslint/only-throw-error": "off",
      // what was caught is passed on as it is
      "@typescript-eslint/prefer-promise-reject-errors": ["error", { allowThrowingUnknown: true }],
      "@typescript-eslint/no-unnecessary-type-assertion": "off",
      "@typescript-eslint/no-base-to-string": "off",
    },
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
