import type { Injector } from "@univerjs/core";
import { CellAlertManagerService } from "@univerjs/preset-sheets-core";

type Alert = Parameters<CellAlertManagerService["showAlert"]>[0];

/**
 * Puts our message into the note that the grid shows over an error under the mouse: its own words know only the
 * kind of the error. The note has no hook for words, so the one method that shows it is wrapped here.
 */
export function explainOnHover(
  injector: Injector,
  messageAt: (sheetId: string, row: number, column: number) => string | null,
): void {
  const alerts = injector.get(CellAlertManagerService);
  const showAlert = alerts.showAlert.bind(alerts);
  alerts.showAlert = (alert: Alert) => {
    const { subUnitId, row, col } = alert.location;
    const message = messageAt(subUnitId, row, col);
    // about 45 characters to a line of this width
    showAlert(
      message === null
        ? alert
        : { ...alert, message, width: 320, height: 40 + 20 * Math.ceil(message.length / 45) },
    );
  };
}
