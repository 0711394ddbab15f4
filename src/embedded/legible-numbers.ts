import { CellValueType, HorizontalAlign, InterceptorEffectEnum, type Injector } from "@univerjs/core";
import {
  INTERCEPTOR_POINT,
  InterceptCellContentPriority,
  SheetInterceptorService,
} from "@univerjs/preset-sheets-core";
import { atDecimals } from "./column-decimals";
import { legible } from "./legible";
import { SpillFormats } from "./spill-formats";

/**
 * Shows numbers that have no format of their own at a legible length: in a spilled result at the decimals of their
 * column, with the names above them aligned to the right, elsewhere cut to a few figures.
 */
export function showLegibleNumbers(injector: Injector): void {
  const interceptors = injector.get(SheetInterceptorService);
  const formats = new SpillFormats(injector);

  interceptors.intercept(INTERCEPTOR_POINT.CELL_CONTENT, {
    effect: InterceptorEffectEnum.Value,
    // after the number formats, which turn a cell with a pattern into text
    priority: InterceptCellContentPriority.NUMFMT - 1,
    handler: (cell, { unitId, subUnitId, row, col }, next) => {
      const value = cell?.v;
      if (typeof value !== "number" || cell?.t === CellValueType.BOOLEAN) return next(cell);
      const decimals = formats.at(unitId, subUnitId, row, col)?.decimals ?? null;
      const shown = decimals === null ? legible(value) : atDecimals(value, decimals);
      return next({ ...cell, v: shown, t: CellValueType.NUMBER });
    },
  });

  interceptors.intercept(INTERCEPTOR_POINT.CELL_CONTENT, {
    effect: InterceptorEffectEnum.Style,
    priority: InterceptCellContentPriority.NUMFMT - 1,
    handler: (cell, { unitId, subUnitId, row, col, workbook }, next) => {
      const format = formats.at(unitId, subUnitId, row, col);
      const isHead = format !== null && row === format.range.startRow && format.decimals !== null;
      if (!isHead || workbook.getStyles().get(cell?.s)?.ht) return next(cell);
      const look = { ...cell?.interceptorStyle, ht: HorizontalAlign.RIGHT };
      return next({ ...cell, interceptorStyle: look });
    },
  });
}
