import { LocaleType, type IWorkbookData } from "@univerjs/core";
import { blemishedWeeks, coldStoreWeeks, FIRST_WEEK, SERIES, WEEKS } from "./cold-store";
import {
  DATE,
  FORECAST,
  FORMULA_HEAD,
  HEAD,
  HEAD_LEFT,
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

/** The block that is selected when the page opens. */
export const demoSelection = RANGE;

/** The block of data with the forecast beside it: what a newcomer sees first. */
function dataSheet() {
  return new SheetBuilder("data", "Data")
    .put(0, 0, "Harbour cold store: 156 weeks, and the next 12 from one formula", TITLE)
    .notes(1, 0, ["Invented data: landings and ice in tonnes, electricity in MWh, haulage trips counted."])
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
    .notes(17, 6, [
      "H4 holds one formula: a joint model, run forward.",
      "Change a number in B5:E160: the forecast follows.",
      "Try your own, for example in G24:",
      "    =COMOVE.LAGCORR(B4:E160,3)",
      "The next sheets walk through the job.",
    ])
    .widths({ 0: 96, 5: 36, 6: 96 })
    .build(4);
}

function leadsSheet() {
  return new SheetBuilder("leads", "Leads")
    .put(0, 0, "Which series leads which, and by how many weeks?", TITLE)
    .notes(1, 0, [
      "A large entry at lag 2 says: the column series leads the row series by 2 weeks.",
      "The yearly swing is taken out first; within ±bound chance alone is enough.",
    ])
    .dress(4, 0, 1, 7, HEAD)
    .dress(4, 1, 1, 1, HEAD_LEFT)
    .dress(5, 2, 20, 5, { n: { pattern: "0.00" } })
    .put(4, 0, `=COMOVE.LAGCORR(COMOVE.STEPS(${DATA},"diff 52"),4)`, HEAD)
    .put(4, 8, "What to look for", HEAD_LEFT)
    .notes(5, 8, [
      "ice moves with landings (lag 0)",
      "and follows them by 1 week",
      "electricity follows landings by 1",
      "trips follow landings by 2 weeks",
      "",
      "A lead is not a cause, and one cell",
      "in twenty passes by chance.",
    ])
    .widths({ 0: 60, 7: 30, 8: 250 })
    .build(5);
}

function modelSheet() {
  return new SheetBuilder("model", "Model")
    .put(0, 0, "The model lies in cells: every coefficient can be read, and edited in a pasted copy", TITLE)
    .notes(1, 0, [
      "Columns are equations, rows what they multiply; the last four rows: covariance of what is left over.",
    ])
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
    .widths({ 0: 215, 5: 30, 9: 112, 10: 250 })
    .build(4);
}

function forecastSheet() {
  return new SheetBuilder("forecast", "Forecast")
    .put(0, 0, "The next 12 weeks from the model block, with bands", TITLE)
    .notes(1, 0, [
      "Read from the block on the sheet Model. The bands hold 9 of 10 outcomes, if the future behaves like the past.",
    ])
    .put(3, 0, "week", HEAD_LEFT)
    .rows(4, 0, aheadDates, DATE)
    .dress(3, 1, 1, 12, FORMULA_HEAD)
    .dress(4, 1, HORIZON, 12, FORECAST)
    .put(3, 1, `=COMOVE.BANDS(${DATA},${HORIZON},Model!A4#,"coverage=0.9")`, FORMULA_HEAD)
    .notes(18, 0, [
      "A forecast is not a guarantee. Where a decision can hurt someone (dosing, running a grid or a plant,",
      "safety stock of medicines), local codes and the licensed practitioner decide, not this sheet.",
    ])
    .widths({
      0: 96,
      ...Object.fromEntries(
        Array.from({ length: 12 }, (_, k) => [k + 1, k < 3 || (k > 5 && k < 9) ? 122 : 92]),
      ),
    })
    .build(4);
}

function blemishesSheet() {
  const { dates, cells } = blemishedWeeks();
  return new SheetBuilder("blemishes", "Blemishes")
    .put(0, 0, "The same weeks as they come out of an office", TITLE)
    .notes(1, 0, [
      "A blank, a word, a number kept as text, an outlier, a date that comes twice. H4 says what to mend first.",
    ])
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
    .notes(5, 7, [
      "Select H4: its message stands in the pane.",
      "Select B4:E160: the pane lists what it found.",
    ])
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
