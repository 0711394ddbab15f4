import { pageWords } from "../texts/en/page";
import type { FaultNotes } from "./fault-notes";
import { onSelectionMoved } from "./selection-moves";
import { cellReader, errorShown } from "./sheet-cells";
import type { Grid } from "./workbook";

/** The message behind the error that a cell shows now; null where it shows none. */
export function faultMessage(
  grid: Grid,
  faults: FaultNotes,
  sheetId: string,
  row: number,
  column: number,
): string | null {
  const sheet = grid.api.getActiveWorkbook()?.getSheetBySheetId(sheetId);
  const error = sheet ? errorShown(cellReader(grid, sheet)(row, column)) : null;
  if (error === null) return null;
  // a note outlives its error when the formula is replaced or catches it, so the error is asked first
  return faults.at({ sheet: sheetId, row, column }) ?? pageWords.gridErrors[error] ?? null;
}

/** Shows the message behind an error value while its cell is selected. */
export function mountMessageStrip(element: HTMLElement, grid: Grid, faults: FaultNotes): void {
  const { api } = grid;
  const show = () => {
    const sheet = api.getActiveWorkbook()?.getActiveSheet();
    const range = sheet?.getSelection()?.getActiveRange();
    const message =
      sheet && range && faultMessage(grid, faults, sheet.getSheetId(), range.getRow(), range.getColumn());
    element.replaceChildren();
    if (message)
      element.append(
        Object.assign(document.createElement("b"), { textContent: range.getA1Notation() }),
        message,
      );
    element.hidden = !message;
  };
  onSelectionMoved(grid, show);
  api.getFormula().calculationResultApplied(show);
  show();
}
