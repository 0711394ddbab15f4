/** Freezes nested arrays and objects, so that a function that changes its input fails loudly (typed arrays cannot be). */
export function frozen<T>(value: T): T {
  if (typeof value === "object" && value !== null && !ArrayBuffer.isView(value) && !Object.isFrozen(value)) {
    Object.freeze(value);
    Object.values(value).forEach(frozen);
  }
  return value;
}
