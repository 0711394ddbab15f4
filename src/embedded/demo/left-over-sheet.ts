import { SERIES, WEEKS } from "./cold-store";
import { DATA } from "./data-sheet";
import { SheetBuilder } from "./sheet-builder";
import {
  ASIDE,
  DATE,
  decimals,
  FORECAST,
  FORMULA_HEAD,
  HEAD,
  HEAD_LEFT,
  INDENTED,
  RULED,
  SECTION,
  SMALL,
  TITLE,
} from "./styles";

const K = SERIES.length;
const MODEL = "Model!A4#";
/** Rows on what is left to predict, on its spread, on its shape, on change and on use; some tests are asked of each series. */
const QUESTIONS = [4 + K, 1, 3, K, 3];
const TESTS = QUESTIONS.reduce((sum, rows) => sum + rows);
/** Columns of the report after question, about and method. */
const [LAGS, STATISTIC, DF, DF2, P, READING] = [3, 4, 5, 6, 7, 8];
const BELOW = TESTS + 5;

/** The weeks stand beside the tests, so that the frozen row holds the headings of both. */
const WEEK = READING + 2;
const EXPECTED = WEEK + K + 2;
const REST = EXPECTED + K + 1;

/** What the model leaves over: asked about question by question, and shown week by week. */
export function leftOverSheet() {
  const sheet = new SheetBuilder("left-over", "Left over").height(0, 38).height(3, 28);
  questions(sheet);
  weeks(sheet);
  return sheet.build(4);
}

function questions(sheet: SheetBuilder): void {
  sheet
    .put(0, 0, "Has the model left anything over?", TITLE)
    .note(
      1,
      0,
      READING,
      2,
      "What came, less what the model expected a week before, is left over. A good model leaves nothing to predict, in a steady spread. Read the last column first.",
    )
    .put(2, 0, "Five questions, test by test", SECTION)
    .put(3, 0, `=COMOVE.RESIDTEST(${DATA},${MODEL})`, HEAD_LEFT)
    .dress(3, 1, 1, 2, HEAD_LEFT)
    .dress(3, LAGS, 1, P - LAGS + 1, HEAD)
    .dress(3, READING, 1, 1, HEAD_LEFT)
    .dress(3, 0, TESTS + 1, READING + 1, SMALL)
    .dress(4, LAGS - 1, TESTS, DF2 - LAGS + 2, ASIDE)
    .dress(4, STATISTIC, TESTS, 1, decimals(2))
    .dress(4, DF2, TESTS, 1, decimals(1))
    .dress(4, P, TESTS, 1, decimals(4))
    .dress(3, READING, TESTS + 1, 1, INDENTED)
    .block(
      BELOW,
      0,
      3,
      READING,
      "Where p is below 0.05 the reading speaks up. Chance alone does that once in twenty rows: one such row among sixteen, as for ice here, proves little. These data were invented without a change.",
    )
    .block(BELOW + 3, 0, 1, READING, "From column K on: counted, expected and left over, week by week.")
    .widths({ 0: 158, 1: 70, 2: 144, [LAGS]: 36, [STATISTIC]: 60, [DF]: 34, [DF2]: 44, [P]: 56 })
    .widths({ [READING]: 390, [READING + 1]: 16 });
  let row = 4;
  for (const rows of QUESTIONS.slice(0, -1)) sheet.dress((row += rows), 0, 1, READING + 1, RULED);
}

function weeks(sheet: SheetBuilder): void {
  sheet
    .put(0, WEEK, "Week by week", TITLE)
    .note(
      1,
      WEEK,
      EXPECTED + K - WEEK,
      2,
      "What was counted is what the model expected a week before, plus what is left over. The first two weeks stay blank, as the model looks back two weeks.",
    )
    .put(2, WEEK, "Counted", SECTION)
    .put(3, WEEK, `=Data!A4:E${WEEKS + 4}`, HEAD_LEFT)
    .dress(3, WEEK + 1, 1, K, HEAD)
    .dress(4, WEEK, WEEKS, 1, DATE)
    .dress(4, WEEK + 1, WEEKS, K - 1, decimals(1))
    .dress(4, WEEK + K, WEEKS, 1, decimals(0))
    .put(2, EXPECTED, "Expected a week before", SECTION)
    .put(3, EXPECTED, `=COMOVE.FITTED(${DATA},${MODEL})`, FORMULA_HEAD)
    .dress(3, EXPECTED + 1, 1, K - 1, FORMULA_HEAD)
    .dress(4, EXPECTED, WEEKS, K, FORECAST)
    .put(2, REST, "Left over", SECTION)
    .put(3, REST, `=COMOVE.RESIDUALS(${DATA},${MODEL})`, HEAD)
    .dress(3, REST + 1, 1, K - 1, HEAD)
    .dress(4, REST, WEEKS, K, decimals(1))
    .widths({ [WEEK]: 88 });
  for (const first of [WEEK + 1, EXPECTED, REST])
    sheet.widths({ [first]: 78, [first + 1]: 64, [first + 2]: 90, [first + 3]: 64, [first + 4]: 16 });
}
