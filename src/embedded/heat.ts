import { InterceptorEffectEnum, type Injector } from "@univerjs/core";
import {
  FormulaDataModel,
  INTERCEPTOR_POINT,
  InterceptCellContentPriority,
  SheetInterceptorService,
} from "@univerjs/preset-sheets-core";
import { spilledCells } from "./spills";
import { tint } from "./tint";

/** A rectangle of correlations on a sheet, rows and columns counted from 0, last ones included. */
export interface HeatRegion {
  readonly sheet: string;
  readonly startRow: number;
  readonly endRow: number;
  readonly startColumn: number;
  readonly endColumn: number;
  /** The column that holds the bound beside each row. */
  readonly boundColumn: number;
}

/** Tints the cells of a region by the correlation in them. */
export function tintCorrelations(injector: Injector, region: HeatRegion): void {
  const formulas = injector.get(FormulaDataModel);
  injector.get(SheetInterceptorService).intercept(INTERCEPTOR_POINT.CELL_CONTENT, {
    effect: InterceptorEffectEnum.Style,
    // the chain of interceptors ends below 0
    priority: InterceptCellContentPriority.NUMFMT - 2,
    handler: (cell, place, next) => {
      const { row, col, unitId, subUnitId } = place;
      const inside =
        subUnitId === region.sheet &&
        row >= region.startRow &&
        row <= region.endRow &&
        col >= region.startColumn &&
        col <= region.endColumn;
      if (!inside) return next(cell);
      const at = spilledCells(formulas, unitId, subUnitId);
      const rgb = tint(Number(at(row, col)?.v), Number(at(row, region.boundColumn)?.v));
      return next(
        rgb === null ? cell : { ...cell, interceptorStyle: { ...cell?.interceptorStyle, bg: { rgb } } },
      );
    },
  });
}
