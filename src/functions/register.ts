import * as check from "./check";
import * as fit from "./fit";
import * as look from "./look";
import * as prepare from "./prepare";
import * as use from "./use";

/** Every sheet function by its id; the names of the wrappers are the ids. */
export const functions: Readonly<Record<string, (...args: never[]) => unknown>> = {
  ...look,
  ...prepare,
  ...fit,
  ...check,
  ...use,
};

for (const [id, fn] of Object.entries(functions))
  CustomFunctions.associate(id, fn as (...args: unknown[]) => unknown);
