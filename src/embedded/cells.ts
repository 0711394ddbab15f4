import {
  ArrayValueObject,
  BooleanValueObject,
  ErrorType,
  ErrorValueObject,
  NumberValueObject,
  StringValueObject,
  type BaseValueObject,
} from "@univerjs/preset-sheets-core";

/** How this page hands a blank cell to a function: clients of the platform differ. */
export type BlankAs = "nothing" | "zero";

/** One value of the grid in the form in which the platform passes it. */
export function toPlatform(value: BaseValueObject | null | undefined, blankAs: BlankAs): unknown {
  if (value === null || value === undefined || value.isNull()) return blankAs === "zero" ? 0 : null;
  if (value.isError()) return { type: "Error", basicValue: (value as ErrorValueObject).getErrorType() };
  if (value.isBoolean()) return Boolean(value.getValue());
  if (value.isNumber()) return Number(value.getValue());
  return String(value.getValue());
}

/** A function's result as a value of the grid. */
export function fromPlatform(result: unknown): BaseValueObject {
  if (!Array.isArray(result)) return scalar(result);
  const rows = (result as unknown[][]).map((row) => row.map(scalar));
  if (rows.length === 1 && rows[0].length === 1) return rows[0][0];
  return ArrayValueObject.create({
    calculateValueList: rows,
    rowCount: rows.length,
    columnCount: rows[0].length,
    unitId: "",
    sheetId: "",
    row: -1,
    column: -1,
  });
}

function scalar(value: unknown): BaseValueObject {
  if (typeof value === "number") return NumberValueObject.create(value);
  if (typeof value === "boolean") return BooleanValueObject.create(value);
  return StringValueObject.create(typeof value === "string" ? value : "");
}

/** An error of the functions as the error value of a cell. */
export function faultValue(thrown: unknown): ErrorValueObject {
  const code = (thrown as { code?: unknown } | null)?.code;
  return ErrorValueObject.create(code === "#N/A" ? ErrorType.NA : ErrorType.VALUE);
}
