import { answer } from "../../src/functions/answer";
import type { Call, RawArguments } from "../../src/sheet/call";
import type { OutTable } from "../../src/sheet/cell";

/** The error object of the host, as far as the functions use it. */
class HostError extends Error {
  constructor(
    readonly code: string,
    message?: string,
  ) {
    super(message);
  }
}

Object.assign(globalThis, {
  CustomFunctions: { Error: HostError, ErrorCode: { invalidValue: "#VALUE!", notAvailable: "#N/A" } },
});

/** Calls a sheet function the way a wrapper does. */

export const ask = (call: Call<any, any>, args: RawArguments): OutTable => answer(call, args);

/** The error that a call ends in, as "#CODE message"; the result when it does not fail. */

export function errorOf(call: Call<any, any>, args: RawArguments): string | OutTable {
  try {
    return ask(call, args);
  } catch (thrown) {
    if (thrown instanceof HostError) return `${thrown.code} ${thrown.message}`;
    throw thrown;
  }
}

/** Rows of numbers under their names, as a range is passed. */
export const withHeader = (names: readonly string[], rows: readonly (readonly unknown[])[]): unknown[][] => [
  [...names],
  ...rows.map((row) => [...row]),
];
