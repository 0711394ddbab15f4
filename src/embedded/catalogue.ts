import { FunctionType } from "@univerjs/preset-sheets-core";
import { hostFunctionClass, type HostSurroundings } from "./host-function";

interface Parameter {
  readonly name: string;
  readonly description: string;
  readonly optional?: boolean;
}

/** What functions.json says of one function. */
interface Listed {
  readonly id: string;
  readonly description: string;
  readonly parameters: readonly Parameter[];
}

const NAMESPACE = "COMOVE";

/** The functions as the engine takes them at construction, from functions.js (associated) and functions.json (listed). */
export function formulaConfig(
  associated: ReadonlyMap<string, (...args: unknown[]) => unknown>,
  listed: readonly Listed[],
  around: HostSurroundings,
) {
  const known = listed.filter(({ id }) => associated.has(id));
  return {
    function: known.map(({ id, parameters }) => {
      const required = parameters.filter(({ optional }) => !optional).length;
      return [
        hostFunctionClass(id, associated.get(id)!, parameters.length, required, around),
        `${NAMESPACE}.${id}`,
      ];
    }),
    description: known.map(({ id, description, parameters }) => ({
      functionName: `${NAMESPACE}.${id}`,
      functionType: FunctionType.User,
      description,
      abstract: description,
      functionParameter: parameters.map((parameter) => ({
        name: parameter.name,
        detail: parameter.description,
        example: parameter.name,
        require: parameter.optional ? 0 : 1,
        repeat: 0,
      })),
    })),
  };
}

/** Fetches the list of functions that was built beside functions.js. */
export async function fetchListed(): Promise<readonly Listed[]> {
  const response = await fetch("functions.json");
  return ((await response.json()) as { functions: Listed[] }).functions;
}
