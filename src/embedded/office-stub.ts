/**
 * The little of the platform's globals that the functions script uses, for the page without Excel: the vendor's
 * own script belongs to the real host and calls home. Loaded before functions.js.
 */
type SheetFunction = (...args: unknown[]) => unknown;

const ErrorCode = {
  invalidValue: "#VALUE!",
  notAvailable: "#N/A",
  divisionByZero: "#DIV/0!",
  invalidNumber: "#NUM!",
  invalidName: "#NAME?",
  invalidReference: "#REF!",
  nullReference: "#NULL!",
} as const;

/** An error that a cell shows, with the message that stands beside it. */
class CellFault extends Error {
  constructor(
    readonly code: string,
    message?: string,
  ) {
    super(message);
  }
}

const associated = new Map<string, SheetFunction>();

Object.assign(globalThis, {
  CustomFunctions: {
    ErrorCode,
    Error: CellFault,
    associate: (id: string, fn: SheetFunction) => associated.set(id, fn),
  },
  /** Where the page takes the functions from. */
  comoveAssociated: associated,
});
