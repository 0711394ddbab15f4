import { ICommandService, type Injector } from "@univerjs/core";
import {
  FormulaExecutedStateType,
  IFormulaRuntimeService,
  SetFormulaCalculationNotificationMutation,
  SetFormulaCalculationStopMutation,
  type ISetFormulaCalculationNotificationMutation,
} from "@univerjs/preset-sheets-core";
import type { RunningCalls } from "./running-calls";

/**
 * When cells change during a calculation, the engine wants to stop it and begin anew. It looks for that only between
 * formulas, and takes a calculation that was to stop during its last formula for done: the change was then lost. Here
 * running calls are let go of, and a calculation that was to stop counts as stopped, so that the engine begins anew.
 */
export function restartWhenChanged(injector: Injector, calls: RunningCalls): void {
  const runtime = injector.get(IFormulaRuntimeService);
  const succeeded = runtime.markedAsSuccessfullyExecuted.bind(runtime);
  runtime.markedAsSuccessfullyExecuted = () => {
    if (runtime.isStopExecution()) runtime.markedAsStopFunctionsExecuted();
    else succeeded();
  };
  injector.get(ICommandService).onCommandExecuted((command) => {
    if (command.id === SetFormulaCalculationStopMutation.id) calls.interrupt();
    if (command.id !== SetFormulaCalculationNotificationMutation.id) return;
    const { functionsExecutedState: state } = command.params as ISetFormulaCalculationNotificationMutation;
    if (state !== undefined && state !== FormulaExecutedStateType.STOP_EXECUTION) calls.settle();
  });
}
