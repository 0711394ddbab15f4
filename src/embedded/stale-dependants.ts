import { CommandType, ICommandService, type ICommandInfo, type Injector, type IRange } from "@univerjs/core";
import {
  FormulaDataModel,
  IActiveDirtyManagerService,
  SetFormulaCalculationResultMutation,
} from "@univerjs/preset-sheets-core";

const VACATED = "comove.mutation.spill-vacated";

interface Spill {
  readonly unitId: string;
  readonly sheetId: string;
  readonly range: IRange;
}

/**
 * The engine keeps serving old values to formulas that read cells which a spill has left, when it shrinks, errors
 * or is deleted. After each calculation the cells left are marked as changed.
 */
export function cureStaleDependants(injector: Injector): void {
  const commands = injector.get(ICommandService);
  const formulas = injector.get(FormulaDataModel);
  commands.registerCommand({ id: VACATED, type: CommandType.MUTATION, handler: () => true });
  injector.get(IActiveDirtyManagerService).register(VACATED, {
    commandId: VACATED,
    getDirtyData: (command: ICommandInfo) => ({
      dirtyRanges: (command.params as { vacated: Spill[] }).vacated,
    }),
  });
  let before = spills(formulas);
  commands.onCommandExecuted((command) => {
    if (command.id !== SetFormulaCalculationResultMutation.id) return;
    const now = spills(formulas);
    const vacated = [...before].flatMap(([key, spill]) => cellsLeft(spill, now.get(key)?.range));
    before = now;
    if (vacated.length > 0) void commands.executeCommand(VACATED, { vacated }, { onlyLocal: true });
  });
}

/** Every range that is spilled now, by its first cell. */
function spills(formulas: FormulaDataModel): Map<string, Spill> {
  const found = new Map<string, Spill>();
  const data = formulas.getArrayFormulaCellData();
  for (const [unitId, sheets] of Object.entries(formulas.getArrayFormulaRange() ?? {})) {
    for (const [sheetId, rows] of Object.entries(sheets ?? {})) {
      for (const [row, columns] of Object.entries(rows ?? {})) {
        for (const [column, range] of Object.entries((columns ?? {}) as Record<string, IRange>)) {
          const value = (
            data?.[unitId]?.[sheetId] as unknown as Record<string, Record<string, { v?: unknown }>>
          )?.[row]?.[column]?.v;
          if (range && value !== "#SPILL!")
            found.set([unitId, sheetId, row, column].join(" "), { unitId, sheetId, range: { ...range } });
        }
      }
    }
  }
  return found;
}

/** The parts of a spill that its successor (at least the first cell) no longer covers. */
function cellsLeft({ unitId, sheetId, range }: Spill, successor: IRange | undefined): Spill[] {
  const endRow = successor?.endRow ?? range.startRow;
  const endColumn = successor?.endColumn ?? range.startColumn;
  const below = { ...range, startRow: endRow + 1 };
  const beside = { ...range, endRow: Math.min(endRow, range.endRow), startColumn: endColumn + 1 };
  return [below, beside]
    .filter(
      ({ startRow, endRow: last, startColumn, endColumn: right }) => startRow <= last && startColumn <= right,
    )
    .map((left) => ({ unitId, sheetId, range: left }));
}
