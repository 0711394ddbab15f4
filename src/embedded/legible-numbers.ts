import { CellValueType, type Injector } from "@univerjs/core";
import { INTERCEPTOR_POINT, SheetInterceptorService } from "@univerjs/preset-sheets-core";

/** Figures shown where a cell has no number format of its own; the value itself keeps all of its digits. */
const FIGURES = 6;

/** Shows numbers without a format, such as those of a spilled result, at a legible length. */
export function showLegibleNumbers(injector: Injector): void {
  injector.get(SheetInterceptorService).intercept(INTERCEPTOR_POINT.CELL_CONTENT, {
    // after the number formats, which leave a cell with a pattern as text
    priority: -1,
    handler: (cell, _place, next) => {
      const shown = next(cell);
      const value = shown?.v;
      if (!shown || typeof value !== "number" || Number.isInteger(value) || shown.t === CellValueType.BOOLEAN)
        return shown;
      return { ...shown, v: Number(value.toPrecision(FIGURES)) };
    },
  });
}
