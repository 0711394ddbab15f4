import { SERIES } from "./cold-store";
import { DATA, SEASON } from "./data-sheet";
import { SheetBuilder } from "./sheet-builder";
import { decimals, HEAD, HEAD_LEFT, SECTION, TITLE } from "./styles";

const ESTIMATES_AT = 12;
const K = SERIES.length;
/** Coefficients per equation: a constant, two halves of a wave, two lags of each series. */
const PER_EQUATION = 3 + 2 * K;

/** Whose past helps to predict whom, and every coefficient with its standard error. */
export function helpsSheet() {
  return new SheetBuilder("helps", "Helps")
    .put(0, 0, "Whose past helps to predict whom?", TITLE)
    .height(0, 38)
    .note(
      1,
      0,
      8,
      2,
      "A p-value for each pair, all other series kept in: the row is the effect, the column the cause. Small says that the past of the column helps to predict the row.",
    )
    .put(2, 0, "Help, pair by pair", SECTION)
    .put(3, 0, `=COMOVE.GRANGER(${DATA},2,"${SEASON}; adjust=yes")`, HEAD_LEFT)
    .dress(3, 1, 1, K, HEAD)
    .height(3, 28)
    .dress(4, 1, K, K, decimals(4))
    .note(
      8,
      0,
      8,
      2,
      "Landings help all the others, and nothing helps landings: that is how these data were invented. Helping to predict is not causing, as a third thing may move both.",
    )
    .put(ESTIMATES_AT - 2, 0, "Every coefficient, and how sure it is", SECTION)
    .put(ESTIMATES_AT - 1, 0, `=COMOVE.ESTIMATES(${DATA},2,"${SEASON}")`, HEAD_LEFT)
    .dress(ESTIMATES_AT - 1, 1, 1, 1, HEAD_LEFT)
    .dress(ESTIMATES_AT - 1, 2, 1, 6, HEAD)
    .height(ESTIMATES_AT - 1, 28)
    .dress(ESTIMATES_AT, 2, K * PER_EQUATION, 6, decimals(4))
    .widths({ 0: 104, 1: 136, 3: 94 })
    .build(4);
}
