import {
  AsyncObject,
  BaseFunction,
  type BaseValueObject,
  type FunctionVariantType,
} from "@univerjs/preset-sheets-core";
import { faultValue, fromPlatform, toPlatform, type BlankAs } from "./cells";
import type { FaultNotes } from "./fault-notes";
import { Interrupted, type RunningCalls } from "./running-calls";

type SheetFunction = (...args: unknown[]) => unknown;

/** What all functions of a page share. */
export interface HostSurroundings {
  readonly faults: FaultNotes;
  readonly calls: RunningCalls;
  blankAs: BlankAs;
}

/**
 * Makes the engine's function class for one of our functions: arguments go in as the platform would pass them, results
 * and messages come back.
 */
export function hostFunctionClass(
  id: string,
  fn: SheetFunction,
  parameters: number,
  required: number,
  around: HostSurroundings,
) {
  return class extends BaseFunction {
    // references, not values: only they tell a blank from a zero
    override needsReferenceObject = true;
    override minParams = required;
    override maxParams = parameters;

    /** The engine waits for the result of every one of our functions, as any may answer with a promise. */
    override isAsync(): boolean {
      return true;
    }

    override calculate(...variants: FunctionVariantType[]): FunctionVariantType {
      const given = variants.map((variant) => argument(variant, around.blankAs));
      const args = Array.from({ length: parameters }, (_, i) => given[i] ?? null);
      const place = { sheet: this.subUnitId ?? "", row: this.row, column: this.column };
      const failed = (thrown: unknown) => {
        // what was let go of is not shown, so nothing is to be said about it
        if (thrown instanceof Interrupted) return faultValue(thrown);
        around.faults.set(place, thrown instanceof Error ? thrown.message : "");
        return faultValue(thrown);
      };
      try {
        const result = around.calls.run(id, place, (invocation) => fn(...args, invocation));
        around.faults.clear(place);
        if (!(result instanceof Promise)) return fromPlatform(result);
        return new AsyncObject(result.then(fromPlatform, failed) as never) as unknown as FunctionVariantType;
      } catch (thrown) {
        return failed(thrown);
      }
    }
  };
}

function argument(variant: FunctionVariantType, blankAs: BlankAs): unknown {
  if (!variant.isReferenceObject() && !variant.isArray())
    return toPlatform(variant as BaseValueObject, blankAs);
  const range = variant as unknown as {
    getRangePosition(): { startRow: number; endRow: number; startColumn: number; endColumn: number };
    getCellData?(row: number, column: number): { v?: unknown } | null | undefined;
    iterator(visit: (value: BaseValueObject | null, row: number, column: number) => void): void;
  };
  const { startRow, endRow, startColumn, endColumn } = range.getRangePosition();
  const blank = toPlatform(null, blankAs);
  const cells = Array.from({ length: endRow - startRow + 1 }, () =>
    new Array<unknown>(endColumn - startColumn + 1).fill(blank),
  );
  range.iterator((value, row, column) => {
    // the engine takes a result's text of no length for a blank; the platform does not
    const isText = value === null && range.getCellData?.(row, column)?.v === "";
    cells[row - startRow][column - startColumn] = isText ? "" : toPlatform(value, blankAs);
  });
  return cells;
}
