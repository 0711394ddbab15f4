import { mountPane } from "../../taskpane/pane";
import "../../taskpane/pane.css";
import { demoSelection } from "./demo/book";
import { blankSwitch } from "./blank-switch";
import { EmbeddedHost } from "./embedded-host";
import { FaultNotes } from "./fault-notes";
import type { HostSurroundings } from "./host-function";
import { mountMessageStrip } from "./message-strip";
import "./page.css";
import { openWorkbook } from "./workbook";

/** The page without Excel: the grid with the demo book, and the pane beside it. */
async function open(): Promise<void> {
  const around: HostSurroundings = { faults: new FaultNotes(), blankAs: "nothing" };
  const grid = await openWorkbook("grid", around);
  const host = new EmbeddedHost(grid);
  mountMessageStrip(document.getElementById("message")!, grid, around.faults);
  mountPane(document.getElementById("pane")!, host, {
    helpUrl: "help/index.html",
    extras: blankSwitch(around, grid),
  });
  // a first block is selected, so that the pane has something to say at once
  grid.api.getActiveWorkbook()?.getActiveSheet().getRange(demoSelection).activate();
  // for whoever drives the page from outside: the browser tests and the measuring script
  Object.assign(globalThis, { comovePage: { grid, host } });
}

void open();
