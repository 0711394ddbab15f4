import { WrapStrategy } from "@univerjs/core";
import { DATA, SEASON } from "./data-sheet";
import { SheetBuilder } from "./sheet-builder";
import { decimals, HEAD, HEAD_LEFT, SECTION, TITLE } from "./styles";

const G = 6;
const ROOTS = 8;
const ORDERS = 6;
const ORDER_AT = 15;
const PARTIAL_LAGS = 3;
const PARTIAL_AT = ORDER_AT + ORDERS + 4;
const IMPLIED_AT = PARTIAL_AT + 4 * PARTIAL_LAGS + 4;
const SERIES_COUNT = 4;

/** The model as a block of cells, how fast it forgets, and why this order. */
export function modelSheet() {
  return new SheetBuilder("model", "Model")
    .put(0, 0, "The model lies in cells", TITLE)
    .height(0, 38)
    .note(
      1,
      0,
      10,
      2,
      "Columns are equations, rows what they multiply: next week's trips take 0.24 of the landings two weeks before. The last four rows are the covariance of what is left over. A pasted copy may be edited and used.",
    )
    .put(2, 0, "Coefficients", SECTION)
    .put(3, 0, `=COMOVE.MODEL(${DATA},2,"${SEASON}")`, { ...HEAD_LEFT, tb: WrapStrategy.CLIP })
    .dress(3, 1, 1, 4, HEAD)
    .height(3, 28)
    .dress(4, 1, 30, 4, decimals(3))
    .put(2, G, "Roots: how fast it forgets", SECTION)
    .put(3, G, "=COMOVE.ROOTS(A4#)", HEAD)
    .dress(3, G + 1, 1, 3, HEAD)
    .dress(3, G + 4, 1, 1, HEAD_LEFT)
    .dress(4, G, ROOTS, 4, decimals(3))
    .put(ORDER_AT - 1, G, "Orders compared on the same weeks", SECTION)
    .put(ORDER_AT, G, `=COMOVE.ORDER(${DATA},${ORDERS - 1},"${SEASON}")`, HEAD)
    .dress(ORDER_AT, G + 1, 1, 8, HEAD)
    .dress(ORDER_AT, G + 9, 1, 1, HEAD_LEFT)
    .height(ORDER_AT, 28)
    .dress(ORDER_AT + 1, G + 1, ORDERS, 5, decimals(3))
    .dress(ORDER_AT + 1, G + 6, ORDERS, 1, decimals(0))
    .dress(ORDER_AT + 1, G + 7, ORDERS, 1, decimals(1))
    .dress(ORDER_AT + 1, G + 8, ORDERS, 1, decimals(4))
    .put(
      PARTIAL_AT - 2,
      G,
      "What each further lag adds, the season taken out: p below 0.05 asks for it",
      SECTION,
    )
    .put(
      PARTIAL_AT - 1,
      G,
      `=COMOVE.PARTIALLAG(COMOVE.RESIDUALS(${DATA},0,"${SEASON}"),${PARTIAL_LAGS})`,
      HEAD,
    )
    .dress(PARTIAL_AT - 1, G + 1, 1, 1, HEAD_LEFT)
    .dress(PARTIAL_AT - 1, G + 2, 1, 6, HEAD)
    .height(PARTIAL_AT - 1, 28)
    .dress(PARTIAL_AT, G + 2, SERIES_COUNT * PARTIAL_LAGS, 4, decimals(3))
    .dress(PARTIAL_AT, G + 6, SERIES_COUNT * PARTIAL_LAGS, 1, decimals(1))
    .dress(PARTIAL_AT, G + 7, SERIES_COUNT * PARTIAL_LAGS, 1, decimals(4))
    .put(
      IMPLIED_AT - 2,
      G,
      "Covariances that the block implies, the season aside: at lag 1 the column leads the row",
      SECTION,
    )
    .put(IMPLIED_AT - 1, G, "=COMOVE.IMPLIEDCOV(A4#,1)", HEAD)
    .dress(IMPLIED_AT - 1, G + 1, 1, 1, HEAD_LEFT)
    .dress(IMPLIED_AT - 1, G + 2, 1, 4, HEAD)
    .height(IMPLIED_AT - 1, 28)
    .dress(IMPLIED_AT, G + 2, 2 * SERIES_COUNT, 4, decimals(1))
    .widths({
      0: 180,
      1: 76,
      2: 76,
      3: 90,
      4: 76,
      5: 16,
      [G]: 72,
      [G + 1]: 84,
      [G + 2]: 82,
      [G + 3]: 102,
      [G + 4]: 94,
      [G + 9]: 150,
    })
    .build(4);
}
