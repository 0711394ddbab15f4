import type { HeatRegion } from "../heat";
import { DATA } from "./data-sheet";
import { SheetBuilder } from "./sheet-builder";
import { CENTERED, decimals, HEAD, HEAD_CENTER, HEAD_LEFT, INDENTED, NOTE, SECTION, TITLE } from "./styles";

const LAGS = 4;
const ROWS = 4 * (LAGS + 1);
/** Sentences beside the correlations, and the readings below them. */
const WORDS = 7;
/** Every ordered pair of four series. */
const PAIRS = 12;
const PAIRS_AT = 4 + ROWS + 3;

/** Where the correlations stand, for the tint. */
export const LEADS_HEAT: HeatRegion = {
  sheet: "leads",
  startRow: 4,
  endRow: 3 + ROWS,
  startColumn: 2,
  endColumn: 5,
  boundColumn: 6,
};

/** Which series leads which, and by how long. */
export function leadsSheet() {
  const seen = [
    "Ice moves with landings in the same week and the week after: row ice, column landings, lags 0 and 1.",
    "Electricity follows landings by 1 week: row electricity, column landings, lag 1.",
    "Trips follow landings by 2 weeks: row trips, column landings, lag 2. It is the deepest tint of that lag.",
    "The other way round there is little: row landings, column trips.",
    "Entries within the bound stay white. One in twenty passes it by chance, and a lead is not a cause.",
  ];
  const sheet = new SheetBuilder("leads", "Leads")
    .put(0, 0, "Which series leads which, and by how many weeks?", TITLE)
    .height(0, 38)
    .note(
      1,
      0,
      8,
      2,
      "A large entry at lag 2 says: the column series leads the row series by 2 weeks. The yearly swing is taken out first, by the difference to the same week a year before.",
    )
    .put(3, WORDS, "What to see", { ...SECTION, ...INDENTED })
    .dress(3, 0, 1, 1, HEAD_CENTER)
    .dress(3, 1, 1, 1, HEAD_LEFT)
    .dress(3, 2, 1, 5, HEAD)
    .height(3, 28)
    .dress(4, 0, ROWS, 1, CENTERED)
    .dress(4, 2, ROWS, 4, decimals(2))
    .dress(4, 6, ROWS, 1, { ...decimals(2), cl: { rgb: "#6b8087" } })
    .put(3, 0, `=COMOVE.LAGCORR(COMOVE.STEPS(${DATA},"diff 52"),${LAGS})`, HEAD_CENTER);
  sheet
    .put(PAIRS_AT - 2, 1, "Every pair in words, each leader's own memory taken out first", SECTION)
    .put(PAIRS_AT - 1, 1, `=COMOVE.LEADLAG(COMOVE.STEPS(${DATA},"diff 52"),${LAGS})`, HEAD_LEFT)
    .dress(PAIRS_AT - 1, 2, 1, 1, HEAD_LEFT)
    .dress(PAIRS_AT - 1, 3, 1, 4, HEAD)
    .dress(PAIRS_AT - 1, WORDS, 1, 1, HEAD_LEFT)
    .height(PAIRS_AT - 1, 28)
    .dress(PAIRS_AT, 4, PAIRS, 2, decimals(2))
    .dress(PAIRS_AT, 6, PAIRS, 1, decimals(4))
    .dress(PAIRS_AT - 1, WORDS, PAIRS + 1, 1, INDENTED);
  // a sentence takes three rows, so that the table beside it keeps its rhythm
  seen.forEach((text, i) => sheet.block(4 + 3 * i, WORDS, 3, 1, text, { ...NOTE, ...INDENTED }));
  return sheet.widths({ 0: 52, 1: 104, 4: 98, 6: 72, [WORDS]: 340 }).build(4);
}
