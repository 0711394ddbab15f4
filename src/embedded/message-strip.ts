import type { Grid } from "./workbook";
import type { FaultNotes } from "./fault-notes";

/** Shows the message behind an error value while its cell is selected. */
export function mountMessageStrip(element: HTMLElement, { api }: Grid, faults: FaultNotes): void {
  const show = () => {
    const sheet = api.getActiveWorkbook()?.getActiveSheet();
    const range = sheet?.getSelection()?.getActiveRange()?.getRange();
    const message =
      sheet &&
      range &&
      faults.at({ sheet: sheet.getSheetId(), row: range.startRow, column: range.startColumn });
    element.textContent = message ?? "";
    element.hidden = !message;
  };
  for (const event of [api.Event.SelectionMoveEnd, api.Event.SelectionChanged, api.Event.ActiveSheetChanged])
    api.addEvent(event, show);
  api.getFormula().calculationResultApplied(show);
  show();
}
