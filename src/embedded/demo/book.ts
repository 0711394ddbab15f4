import { LocaleType, type IWorkbookData } from "@univerjs/core";
import { blemishedWeeks, coldStoreWeeks, FIRST_WEEK, SERIES, WEEKS } from "./cold-store";
import {
  DATE,
  FORECAST,
  FORMULA_HEAD,
  HEAD,
  HEAD_LEFT,
  NOTE,
  ONE_DECIMAL,
  SheetBuilder,
  TITLE,
} from "./sheet-builder";

const HORIZON = 12;
const SEASON = "cycle=52; waves=1";
const weekAt = (week: number): number => FIRST_WEEK + 7 * week;
const aheadDates = Array.from({ length: HORIZON }, (_, j) => [weekAt(WEEKS + j)]);
const RANGE = `B4:E${WEEKS + 4}`;
const DATA = `Data!${RANGE}`;

/** The block of data with the forecast beside it: what a newcomer sees first. */
function dataSheet() {
  return new SheetBuilder("data", "Data")
    .put(0, 0, "Harbour cold store: 156 weeks, and the next 12 from one formula", TITLE)
    .put(
      1,
      0,
      "Invented data. Landings and ice in tonnes, electricity in MWh, haulage trips counted. Change a number in B5:E160 and the forecast follows.",
      NOTE,
    )
    .put(3, 0, "week", HEAD_LEFT)
    .rows(3, 1, [SERIES], HEAD)
    .rows(
      4,
      0,
      Array.from({ length: WEEKS }, (_, week) => [weekAt(week)]),
      DATE,
    )
    .rows(
      4,
      1,
      coldStoreWeeks().map((row) => row.slice(0, 3)),
      ONE_DECIMAL,
    )
    .rows(
      4,
      4,
      coldStoreWeeks().map((row) => [row[3]]),
    )
    .put(3, 6, "week", HEAD_LEFT)
    .rows(4, 6, aheadDates, DATE)
    .dress(3, 7, 1, 4, FORMULA_HEAD)
    .dress(4, 7, HORIZON, 4, FORECAST)
    .put(3, 7, `=COMOVE.AHEAD(${RANGE},${HORIZON},,"${SEASON}")`, FORMULA_HEAD)
    .put(
      18,
      6,
      "The formula in H4 fills all 12 rows of all 4 series: it fits one joint model and runs it forward.",
      NOTE,
    )
    .put(19, 6, "Try your own below, for example in G23:   =COMOVE.LAGCORR(B4:E160,3)", NOTE)
    .put(
      20,
      6,
      "The sheets Leads, Model and Forecast walk through the job; Blemishes shows what a real range can hide.",
      NOTE,
    )
    .widths({ 0: 96, 5: 36, 6: 96 })
    .build(4);
}

function leadsSheet() {
  return new SheetBuilder("leads", "Leads")
    .put(0, 0, "Which series leads which, and by how many weeks?", TITLE)
    .put(
      1,
      0,
      "Each row shows a series, each column what may lead it. A large entry at lag 2 says: the column series leads the row series by 2 weeks.",
      NOTE,
    )
    .put(
      2,
      0,
      "The yearly swing is taken out first (difference to the same week a year ago); within ±bound chance alone is enough.",
      NOTE,
    )
    .dress(4, 0, 1, 7, HEAD)
    .dress(5, 2, 20, 5, { n: { pattern: "0.00" } })
    .put(4, 0, `=COMOVE.LAGCORR(COMOVE.STEPS(${DATA},"diff 52"),4)`, HEAD)
    .put(4, 8, "What to look for", HEAD_LEFT)
    .put(
      5,
      8,
      "ice moves with landings in the same week and the next: rows ice, column landings, lags 0 and 1",
      NOTE,
    )
    .put(6, 8, "electricity follows landings by 1 week: row electricity, lag 1", NOTE)
    .put(7, 8, "trips follow landings by 2 weeks: row trips, lag 2", NOTE)
    .put(8, 8, "A lead is not a cause, and one cell in twenty passes the bound by chance.", NOTE)
    .widths({ 0: 60, 1: 92, 7: 36, 8: 140 })
    .build(5);
}

function modelSheet() {
  return new SheetBuilder("model", "Model")
    .put(0, 0, "The model lies in cells: every coefficient can be read, and edited in a pasted copy", TITLE)
    .put(
      1,
      0,
      "Columns are equations, rows what they multiply. The last four rows are the covariance of what is left over each week.",
      NOTE,
    )
    .dress(3, 1, 1, 4, HEAD)
    .dress(4, 1, 30, 4, { n: { pattern: "0.0000" } })
    .put(3, 0, `=COMOVE.MODEL(${DATA},2,"${SEASON}")`, HEAD_LEFT)
    .put(2, 6, "How fast it forgets, root by root", HEAD_LEFT)
    .dress(3, 6, 1, 5, HEAD)
    .dress(4, 6, 12, 4, { n: { pattern: "0.000" } })
    .put(3, 6, "=COMOVE.ROOTS(A4#)", HEAD)
    .put(14, 6, "Orders compared on the same weeks", HEAD_LEFT)
    .dress(15, 6, 1, 10, HEAD)
    .dress(16, 7, 8, 8, { n: { pattern: "0.000" } })
    .dress(16, 12, 8, 1, { n: { pattern: "0" } })
    .put(15, 6, `=COMOVE.ORDER(${DATA},5,"${SEASON}")`, HEAD)
    .widths({ 0: 190, 5: 36, 10: 190 })
    .build(4);
}

function forecastSheet() {
  return new SheetBuilder("forecast", "Forecast")
    .put(0, 0, "The next 12 weeks from the model block, with bands", TITLE)
    .put(
      1,
      0,
      "The forecast reads the block on the sheet Model. The bands hold 9 of 10 outcomes, row by row, as long as the future behaves like the past.",
      NOTE,
    )
    .put(3, 0, "week", HEAD_LEFT)
    .rows(4, 0, aheadDates, DATE)
    .dress(3, 1, 1, 12, FORMULA_HEAD)
    .dress(4, 1, HORIZON, 12, FORECAST)
    .put(3, 1, `=COMOVE.BANDS(${DATA},${HORIZON},Model!A4#,"coverage=0.9")`, FORMULA_HEAD)
    .put(
      18,
      0,
      "A forecast is not a guarantee. Where a decision can hurt someone (dosing, running a grid or a plant, safety stock of medicines),",
      NOTE,
    )
    .put(19, 0, "local codes and the licensed practitioner decide, not this sheet.", NOTE)
    .widths({ 0: 96 })
    .build(4);
}

function blemishesSheet() {
  const { dates, cells } = blemishedWeeks();
  return new SheetBuilder("blemishes", "Blemishes")
    .put(0, 0, "The same weeks as they come out of an office", TITLE)
    .put(
      1,
      0,
      "A blank, a word, a number kept as text, an outlier and a date that comes twice. The formula in H4 says what to mend first.",
      NOTE,
    )
    .put(3, 0, "week", HEAD_LEFT)
    .rows(3, 1, [SERIES], HEAD)
    .rows(
      4,
      0,
      dates.map((date) => [date]),
      DATE,
    )
    .rows(4, 1, cells)
    .put(3, 7, `=COMOVE.AHEAD(${RANGE},${HORIZON},,"${SEASON}")`)
    .put(
      4,
      7,
      "Select H4: the message stands in the pane. Select B4:E160: the pane lists everything it found.",
      NOTE,
    )
    .widths({ 0: 96, 5: 36, 6: 36 })
    .build(4);
}

/** The demo workbook. */
export function demoBook(): Partial<IWorkbookData> {
  const sheets = [dataSheet(), leadsSheet(), modelSheet(), forecastSheet(), blemishesSheet()];
  return {
    id: "cold-store",
    name: "Harbour cold store",
    locale: LocaleType.EN_US,
    sheetOrder: sheets.map(({ id }) => id!),
    sheets: Object.fromEntries(sheets.map((sheet) => [sheet.id!, sheet])),
  };
}
