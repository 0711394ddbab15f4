import { ICommandService } from "@univerjs/core";
import { SetSelectionsOperation, SetWorksheetActiveOperation } from "@univerjs/preset-sheets-core";
import type { Grid } from "./workbook";

const MOVES = new Set([SetSelectionsOperation.id, SetWorksheetActiveOperation.id]);

/**
 * Calls the listener after every move of the selection, by mouse, keyboard or program: the grid's own events leave
 * out some of the last. Returns a function that stops listening.
 */
export function onSelectionMoved({ injector }: Grid, listener: () => void): () => void {
  const heard = injector.get(ICommandService).onCommandExecuted(({ id }) => {
    if (MOVES.has(id)) listener();
  });
  return () => heard.dispose();
}
