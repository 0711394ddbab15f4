import { LocaleType, type IWorkbookData } from "@univerjs/core";
import { blemishesSheet } from "./blemishes-sheet";
import { dataSheet } from "./data-sheet";
import { forecastSheet } from "./forecast-sheet";
import { helpsSheet } from "./helps-sheet";
import { leadsSheet } from "./leads-sheet";
import { leftOverSheet } from "./left-over-sheet";
import { modelSheet } from "./model-sheet";

/** The demo workbook: the sheets walk through the job. */
export function demoBook(): Partial<IWorkbookData> {
  const sheets = [
    dataSheet(),
    leadsSheet(),
    modelSheet(),
    helpsSheet(),
    leftOverSheet(),
    forecastSheet(),
    blemishesSheet(),
  ];
  return {
    id: "cold-store",
    name: "Harbour cold store",
    locale: LocaleType.EN_US,
    sheetOrder: sheets.map(({ id }) => id!),
    sheets: Object.fromEntries(sheets.map((sheet) => [sheet.id!, sheet])),
  };
}
