import { paneWords } from "../src/texts/en";
import { OfficeHost } from "./host/office-host";
import { mountPane } from "./pane";
import "./pane.css";

void Office.onReady(({ host }) => {
  const pane = document.getElementById("pane")!;
  if (host === Office.HostType.Excel) mountPane(pane, new OfficeHost(), { helpUrl: "help/index.html" });
  else pane.textContent = paneWords.outside;
});
