import { SERIES } from "./cold-store";
import { AHEAD_DATES, DATA, HORIZON } from "./data-sheet";
import { SheetBuilder } from "./sheet-builder";
import { DATE, FORECAST, FORECAST_MIDDLE, FORMULA_HEAD_WRAPPED, HEAD_LEFT, SECTION, TITLE } from "./styles";

/** The forecast with bands, computed from the block on the sheet Model. */
export function forecastSheet() {
  const sheet = new SheetBuilder("forecast", "Forecast")
    .put(0, 0, "How sure is it? The same forecast with bands", TITLE)
    .height(0, 38)
    .note(
      1,
      0,
      12,
      2,
      "B4 reads the model block on the sheet Model. Each week and series by itself, 9 of 10 outcomes fall between low and high, as long as the future behaves like the past; the coefficients' own uncertainty is included.",
    )
    .put(2, 0, "The next 12 weeks", SECTION)
    .put(3, 0, "week", HEAD_LEFT)
    .rows(4, 0, AHEAD_DATES, DATE)
    .dress(3, 1, 1, 3 * SERIES.length, FORMULA_HEAD_WRAPPED)
    .height(3, 42)
    .dress(4, 1, HORIZON, 3 * SERIES.length, FORECAST)
    .put(3, 1, `=COMOVE.BANDS(${DATA},${HORIZON},Model!A4#,"coverage=0.9")`, FORMULA_HEAD_WRAPPED)
    .note(
      17,
      0,
      12,
      2,
      "A forecast is not a guarantee. Where a decision can hurt someone (dosing, running a grid or a plant, safety stock of medicines), local codes and the licensed practitioner decide, not this sheet.",
    );
  const widths: Record<number, number> = { 0: 88 };
  SERIES.forEach((name, k) => {
    sheet.dress(4, 2 + 3 * k, HORIZON, 1, FORECAST_MIDDLE);
    for (const column of [1, 2, 3]) widths[3 * k + column] = name.length > 8 ? 78 : 64;
  });
  return sheet.widths(widths).build(4);
}
