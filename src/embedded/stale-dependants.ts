import { CommandType, ICommandService, type ICommandInfo, type Injector, type IRange } from "@univerjs/core";
import {
  FormulaDataModel,
  IActiveDirtyManagerService,
  SetFormulaCalculationResultMutation,
} from "@univerjs/preset-sheets-core";
import { currentSpills, type Spill } from "./spills";

const VACATED = "comove.mutation.spill-vacated";

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
  let before = currentSpills(formulas);
  commands.onCommandExecuted((command) => {
    if (command.id !== SetFormulaCalculationResultMutation.id) return;
    const now = currentSpills(formulas);
    const vacated = [...before].flatMap(([key, spill]) => cellsLeft(spill, now.get(key)?.range));
    before = now;
    if (vacated.length > 0) void commands.executeCommand(VACATED, { vacated }, { onlyLocal: true });
  });
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
