import { CellValueType, InterceptorEffectEnum, type Injector } from "@univerjs/core";
import {
  INTERCEPTOR_POINT,
  InterceptCellContentPriority,
  SheetInterceptorService,
} from "@univerjs/preset-sheets-core";

/** Figures shown where a cell has no number format of its own; the value itself keeps all of its digits. */
const FIGURES = 6;

/** Shows numbers without a format, such as those of a spilled result, at a legible length. */
export function showLegibleNumbers(injector: Injector): void {
  injector.get(SheetInterceptorService).intercept(INTERCEPTOR_POINT.CELL_CONTENT, {
    effect: InterceptorEffectEnum.Value,
    // after the number formats, which turn a cell with a pattern into text
    priority: InterceptCellContentPriority.NUMFMT - 1,
    handler: (cell, _place, next) => {
      const value = cell?.v;
      const long = typeof value === "number" && !Number.isInteger(value) && cell?.t !== CellValueType.BOOLEAN;
      return next(long ? { ...cell, v: Number(value.toPrecision(FIGURES)) } : cell);
    },
  });
}
