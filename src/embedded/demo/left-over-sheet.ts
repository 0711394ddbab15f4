import type { IStyleData } from "@univerjs/core";
import { SERIES } from "./cold-store";
import { DATA, WEEK_DATES } from "./data-sheet";
import { SheetBuilder } from "./sheet-builder";
import { DATE, decimals, HEAD, HEAD_LEFT, SECTION, TITLE } from "./styles";

const K = SERIES.length;
/** Five questions: two forms of two tests, one per series twice, one of the spread, three of the shape, three of use. */
const TESTS = 4 + K + 1 + 3 + K + 3;
/** Room between p-value and reading, so that a number and a sentence do not run together. */
const READING: IStyleData = { pd: { l: 12 } };
const WEEK = 10;
const RESIDUALS = WEEK + 1;
const FITTED = RESIDUALS + K;

/** What the model leaves over: questions with answers, and the weeks themselves. */
export function leftOverSheet() {
  const sheet = new SheetBuilder("left-over", "Left over")
    .put(0, 0, "What does the model leave over?", TITLE)
    .height(0, 38)
    .note(
      1,
      0,
      8,
      2,
      "Read the last column. A reading speaks up where p is below 0.05, and chance alone does that in one row of twenty: here the equation for ice, though these data were invented without any change.",
    )
    .put(2, 0, "Five questions to the block on the sheet Model", SECTION)
    .put(3, 0, `=COMOVE.RESIDTEST(${DATA},Model!A4#)`, HEAD_LEFT)
    .dress(3, 1, 1, 2, HEAD_LEFT)
    .dress(3, 3, 1, 5, HEAD)
    .dress(3, 8, 1, 1, { ...HEAD_LEFT, ...READING })
    .height(3, 28)
    .dress(4, 4, TESTS, 1, decimals(2))
    .dress(4, 5, TESTS, 1, decimals(0))
    .dress(4, 6, TESTS, 1, decimals(0))
    .dress(4, 7, TESTS, 1, decimals(3))
    .dress(4, 8, TESTS, 1, READING)
    .put(2, WEEK, "Left over, week by week: counted less expected", SECTION)
    .put(3, WEEK, "week", HEAD_LEFT)
    .rows(4, WEEK, WEEK_DATES, DATE)
    .put(3, RESIDUALS, `=COMOVE.RESIDUALS(${DATA},Model!A4#)`, HEAD)
    .put(2, FITTED, "Expected one week ahead", SECTION)
    .put(3, FITTED, `=COMOVE.FITTED(${DATA},Model!A4#)`, HEAD);
  for (const first of [RESIDUALS, FITTED]) {
    sheet.dress(3, first, 1, K, HEAD).dress(4, first, WEEK_DATES.length, K, decimals(1));
  }
  return sheet.widths({ 0: 178, 1: 82, 2: 172, 3: 44, 4: 72, 5: 48, 6: 52, 7: 66, 8: 430, 9: 16 }).build(4);
}
