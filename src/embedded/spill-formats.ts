import { ICommandService, type Injector, type IRange } from "@univerjs/core";
import { FormulaDataModel, SetFormulaCalculationResultMutation } from "@univerjs/preset-sheets-core";
import { columnDecimals } from "./column-decimals";
import { currentSpills, spilledCells, type Spill } from "./spills";

/** How a column of a spilled result is shown. */
export interface ColumnFormat {
  readonly range: IRange;
  /** Null for a column without numbers. */
  readonly decimals: number | null;
}

/** Knows for every spilled cell how its column is shown; looked up anew after each calculation only. */
export class SpillFormats {
  readonly #formulas: FormulaDataModel;
  #spills: readonly { readonly spill: Spill; readonly decimals: readonly (number | null)[] }[] = [];

  constructor(injector: Injector) {
    this.#formulas = injector.get(FormulaDataModel);
    injector.get(ICommandService).onCommandExecuted(({ id }) => {
      if (id === SetFormulaCalculationResultMutation.id) this.#look();
    });
  }

  at(unitId: string, sheetId: string, row: number, column: number): ColumnFormat | null {
    const found = this.#spills.find(({ spill }) => {
      const { startRow, endRow, startColumn, endColumn } = spill.range;
      const here = spill.unitId === unitId && spill.sheetId === sheetId;
      return here && row >= startRow && row <= endRow && column >= startColumn && column <= endColumn;
    });
    if (!found) return null;
    const { range } = found.spill;
    return { range, decimals: found.decimals[column - range.startColumn] };
  }

  #look(): void {
    this.#spills = [...currentSpills(this.#formulas).values()].map((spill) => ({
      spill,
      decimals: this.#decimals(spill),
    }));
  }

  #decimals({ unitId, sheetId, range }: Spill): (number | null)[] {
    const at = spilledCells(this.#formulas, unitId, sheetId);
    return Array.from({ length: range.endColumn - range.startColumn + 1 }, (_, j) => {
      const numbers: number[] = [];
      for (let row = range.startRow; row <= range.endRow; row++) {
        const value = at(row, range.startColumn + j)?.v;
        if (typeof value === "number") numbers.push(value);
      }
      return numbers.length === 0 ? null : columnDecimals(numbers);
    });
  }
}
