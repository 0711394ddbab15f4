import { mountPane } from "../../taskpane/pane";
import "../../taskpane/pane.css";
import { pageWords } from "../texts/en/page";
import { blankSwitch } from "./blank-switch";
import { DATA } from "./demo/data-sheet";
import { EmbeddedHost } from "./embedded-host";
import { FaultNotes } from "./fault-notes";
import type { HostSurroundings } from "./host-function";
import { mountMessageStrip } from "./message-strip";
import "./page.css";
import { RunningCalls } from "./running-calls";
import { openWorkbook, type Grid } from "./workbook";

/** The cell whose formula fills the forecast: the formula line shows it when the page opens. */
const FIRST_CELL = "H4";

/** The page without Excel: the grid with the demo book, and the pane beside it. */
async function open(): Promise<void> {
  const around: HostSurroundings = {
    faults: new FaultNotes(),
    calls: new RunningCalls(),
    blankAs: "nothing",
  };
  const grid = await openWorkbook("grid", around);
  const host = new EmbeddedHost(grid);
  grid.api.getActiveWorkbook()!.getActiveSheet().getRange(FIRST_CELL).activate();
  await firstResults(grid);
  mountMessageStrip(document.getElementById("message")!, grid, around.faults);
  mountPane(document.getElementById("pane")!, host, {
    helpUrl: "help/index.html",
    firstBlock: DATA,
    extras: blankSwitch(around, grid),
  });
  document.getElementById("opening")!.remove();
  // for whoever drives the page from outside: the browser tests and the measuring script
  Object.assign(globalThis, { comovePage: { grid, host } });
}

/** Waits until the formulas of the book have filled their cells: before that, what they fill looks free. */
const firstResults = ({ api }: Grid): Promise<void> =>
  new Promise((done) => {
    const heard = api.getFormula().calculationResultApplied(() => {
      heard.dispose();
      done();
    });
  });

open().catch((fault: unknown) => {
  document.getElementById("opening")!.textContent = pageWords.broken;
  throw fault;
});
