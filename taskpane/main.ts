import { OfficeHost } from "./host/office-host";
import { mountPane } from "./pane";
import "./pane.css";

void Office.onReady(() => {
  mountPane(document.getElementById("pane")!, new OfficeHost(), { helpUrl: "help/index.html" });
});
