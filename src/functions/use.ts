import { answer } from "./answer";
import { ahead } from "../sheet/calls/ahead";
import { bands } from "../sheet/calls/bands";

/**
 * Forecasts all series together, in original units: one row per row ahead, one column per series.
 * @customfunction AHEAD
 * @helpurl https://localhost:3000/help/index.html#AHEAD
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param horizon Rows to forecast, 1 to 10,000.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose numbers to use.
 * @param [options] Options as "key=value; key=value" or as two columns: terms, cycle, waves, steps, point and more.
 * @param [drivers] Outside series beside the series, with a row for every row ahead.
 * @returns {any[][]} The forecast block.
 */
export function AHEAD(
  series: any[][],
  horizon: any,
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
): any[][] {
  return answer(ahead, { series, horizon, model, options, drivers });
}

/**
 * Forecasts all series together with a lower and an upper limit for each, in original units.
 * @customfunction BANDS
 * @helpurl https://localhost:3000/help/index.html#BANDS
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param horizon Rows to forecast, 1 to 10,000.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose numbers to use.
 * @param [options] Options as "key=value; key=value" or as two columns: coverage, bands, joint, point and more.
 * @param [drivers] Outside series beside the series, with a row for every row ahead.
 * @returns {any[][]} Per series: low, forecast, high.
 */
export function BANDS(
  series: any[][],
  horizon: any,
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
): any[][] {
  return answer(bands, { series, horizon, model, options, drivers });
}
