import { coldStoreWeeks, FIRST_WEEK, SERIES, WEEKS } from "./cold-store";
import { SheetBuilder } from "./sheet-builder";
import {
  DATE,
  decimals,
  FORECAST,
  FORECAST_COUNT,
  FORMULA_HEAD,
  HEAD,
  HEAD_LEFT,
  SECTION,
  TITLE,
} from "./styles";

export const HORIZON = 12;
export const SEASON = "cycle=52; waves=1";
/** Where the series stand: names in row 4, weeks below. */
export const RANGE = `B4:E${WEEKS + 4}`;
export const DATA = `Data!${RANGE}`;

const weekAt = (week: number): number => FIRST_WEEK + 7 * week;
export const WEEK_DATES = Array.from({ length: WEEKS }, (_, week) => [weekAt(week)]);
export const AHEAD_DATES = Array.from({ length: HORIZON }, (_, week) => [weekAt(WEEKS + week)]);

const G = 6;
const H = 7;

/** The block of data with the forecast beside it: what a newcomer sees first. */
export function dataSheet() {
  const weeks = coldStoreWeeks();
  return new SheetBuilder("data", "Data")
    .put(0, 0, "A harbour cold store: four series, forecast together", TITLE)
    .height(0, 38)
    .note(
      1,
      0,
      11,
      2,
      "Invented data: landings and ice sold in tonnes, electricity in MWh, haulage trips counted. Change any number in B5:E160, and the forecast beside it follows.",
    )
    .put(2, 0, `Counted so far: ${WEEKS} weeks`, SECTION)
    .put(3, 0, "week", HEAD_LEFT)
    .rows(3, 1, [SERIES], HEAD)
    .height(3, 28)
    .rows(4, 0, WEEK_DATES, DATE)
    .rows(
      4,
      1,
      weeks.map((row) => row.slice(0, 3)),
      decimals(1),
    )
    .rows(
      4,
      4,
      weeks.map((row) => row.slice(3)),
      decimals(0),
    )
    .put(2, G, `The next ${HORIZON} weeks: one formula, in H4`, SECTION)
    .put(3, G, "week", HEAD_LEFT)
    .rows(4, G, AHEAD_DATES, DATE)
    .dress(3, H, 1, 4, FORMULA_HEAD)
    .dress(4, H, HORIZON, 3, FORECAST)
    .dress(4, H + 3, HORIZON, 1, FORECAST_COUNT)
    .put(3, H, `=COMOVE.AHEAD(${RANGE},${HORIZON},,"${SEASON}")`, FORMULA_HEAD)
    .block(
      17,
      G,
      3,
      5,
      "H4 fits one joint model to all four series, with a yearly season, and runs it forward: what each series owes to the others is in it.",
    )
    .put(20, G, "Your turn", SECTION)
    .block(21, G, 1, 5, "Type in G24, for the leads up to 3 weeks:")
    .sample(22, G, 5, `=COMOVE.LAGCORR(${RANGE},3)`)
    .widths({
      0: 88,
      1: 78,
      2: 78,
      3: 90,
      4: 62,
      5: 16,
      [G]: 88,
      [H]: 78,
      [H + 1]: 78,
      [H + 2]: 90,
      [H + 3]: 62,
    })
    .build(4);
}
