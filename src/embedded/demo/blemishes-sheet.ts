import { blemishedWeeks, SERIES } from "./cold-store";
import { HORIZON, RANGE, SEASON } from "./data-sheet";
import { SheetBuilder } from "./sheet-builder";
import { DATE, decimals, HEAD, HEAD_LEFT, SECTION, TITLE } from "./styles";

const G = 6;

/** The same weeks with what a real range can hide. */
export function blemishesSheet() {
  const { dates, cells } = blemishedWeeks();
  const steps = [
    "Select G4. Nothing is guessed: the message says which cell to mend, and stands beside the sheet.",
    "Select B4:E160. The pane names all that no function would take: a blank, a word, a number kept as text. Each leads to its cell.",
    "The pane's small picture of trips shows the outlier. A number is a number to a function, so look before you fit.",
    "The week in A65 comes twice. A model counts rows, not dates: a repeated week shifts every lag behind it.",
  ];
  const sheet = new SheetBuilder("blemishes", "Blemishes")
    .put(0, 0, "The same weeks, as they come out of an office", TITLE)
    .height(0, 38)
    .note(1, 0, 11, 1, "A blank, a word, a number kept as text, an outlier, and a week that comes twice.")
    .put(2, G, "The forecast, refused", SECTION)
    .put(3, 0, "week", HEAD_LEFT)
    .rows(3, 1, [SERIES], HEAD)
    .height(3, 28)
    .rows(
      4,
      0,
      dates.map((date) => [date]),
      DATE,
    )
    .rows(
      4,
      1,
      cells.map((row) => row.slice(0, 3)),
      decimals(1),
    )
    .rows(
      4,
      4,
      cells.map((row) => row.slice(3)),
      decimals(0),
    )
    .put(3, G, `=COMOVE.AHEAD(${RANGE},${HORIZON},,"${SEASON}")`, { vt: 2 });
  steps.forEach((text, i) => sheet.block(5 + 3 * i, G, 3, 5, text));
  return sheet.widths({ 0: 96, 3: 94, 5: 20, [G]: 92 }).build(4);
}
