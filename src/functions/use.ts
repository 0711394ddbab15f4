import { answer, answerLater } from "./answer";
import { ahead } from "../sheet/calls/ahead";
import { bands } from "../sheet/calls/bands";
import { response } from "../sheet/calls/response";
import { shockpast } from "../sheet/calls/shockpast";
import { shockshare } from "../sheet/calls/shockshare";
import { simulate } from "../sheet/calls/simulate";
import { whatif } from "../sheet/calls/whatif";

/**
 * Forecasts all series together, in original units: one row per row ahead, one column per series.
 * @customfunction AHEAD
 * @helpurl https://localhost:3000/help/index.html#AHEAD
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param horizon Rows to forecast, 1 to 10,000.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose numbers to use.
 * @param [options] Options as "key=value; key=value" or as two columns: terms, cycle, waves, steps, point and more.
 * @param [drivers] Outside series beside the series, with a row for every row ahead.
 * @param {CustomFunctions.CancelableInvocation} [invocation] Told when the result is no longer wanted.
 * @returns {Promise<any[][]>} The forecast block.
 */
export function AHEAD(
  series: any[][],
  horizon: any,
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater(ahead, { series, horizon, model, options, drivers }, invocation);
}

/**
 * Forecasts all series together with a lower and an upper limit for each, in original units.
 * @customfunction BANDS
 * @helpurl https://localhost:3000/help/index.html#BANDS
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param horizon Rows to forecast, 1 to 10,000.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose numbers to use.
 * @param [options] Options as "key=value; key=value" or as two columns: coverage, bands, joint, draws, seed, point and more.
 * @param [drivers] Outside series beside the series, with a row for every row ahead.
 * @param {CustomFunctions.CancelableInvocation} [invocation] Told when the result is no longer wanted.
 * @returns {Promise<any[][]>} Per series: low, forecast, high.
 */
export function BANDS(
  series: any[][],
  horizon: any,
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater(bands, { series, horizon, model, options, drivers }, invocation);
}

/**
 * Forecasts all series together given that some future cells hold the values of a plan, in original units.
 * @customfunction WHATIF
 * @helpurl https://localhost:3000/help/index.html#WHATIF
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param plan One row per row ahead, one column per series: a number is imposed, a blank cell is free.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose numbers to use.
 * @param [options] Options as "key=value; key=value" or as two columns: terms, cycle, waves, steps, point and more.
 * @param [drivers] Outside series beside the series, with a row for every row ahead.
 * @param {CustomFunctions.CancelableInvocation} [invocation] Told when the result is no longer wanted.
 * @returns {Promise<any[][]>} The forecast block, imposed cells as imposed.
 */
export function WHATIF(
  series: any[][],
  plan: any[][],
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater(whatif, { series, plan, model, options, drivers }, invocation);
}

/**
 * How every series responds, row by row, to a shock in one of them, on the scale after the steps.
 * @customfunction RESPONSE
 * @helpurl https://localhost:3000/help/index.html#RESPONSE
 * @param model A model block, as MODEL lays it out.
 * @param horizon Rows ahead to follow the shock, 1 to 10,000.
 * @param [options] Options as "key=value; key=value" or as two columns: shock (orthogonal, unit or generalised).
 * @returns {any[][]} One row per shock and row ahead, one column per responding series.
 */
export function RESPONSE(model: any[][], horizon: any, options?: any[][]): any[][] {
  return answer(response, { model, horizon, options });
}

/**
 * Which shocks the forecast error of each series comes from: shares of its variance at every row ahead.
 * @customfunction SHOCKSHARE
 * @helpurl https://localhost:3000/help/index.html#SHOCKSHARE
 * @param model A model block, as MODEL lays it out.
 * @param horizon Rows ahead, 1 to 10,000.
 * @returns {any[][]} One row per series and row ahead, one column per shock; every row adds up to 1.
 */
export function SHOCKSHARE(model: any[][], horizon: any): any[][] {
  return answer(shockshare, { model, horizon });
}

/**
 * Takes the past of one series apart: where it would have gone by itself, and what the shocks to each series added.
 * @customfunction SHOCKPAST
 * @helpurl https://localhost:3000/help/index.html#SHOCKPAST
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param target The series to take apart: its name or its column number.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose numbers to use.
 * @param [options] Options as "key=value; key=value" or as two columns: terms, cycle, waves, steps and more.
 * @param [drivers] Outside series, one per column, beside the series.
 * @param {CustomFunctions.CancelableInvocation} [invocation] Told when the result is no longer wanted.
 * @returns {Promise<any[][]>} One row per row used: actual, baseline, then one contribution per series; they add up to the actual.
 */
export function SHOCKPAST(
  series: any[][],
  target: any,
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater(shockpast, { series, target, model, options, drivers }, invocation);
}

/**
 * Draws invented series that behave as a model says, on the scale after the steps. The same seed gives the same draw.
 * @customfunction SIMULATE
 * @helpurl https://localhost:3000/help/index.html#SIMULATE
 * @param model A model block, as MODEL lays it out.
 * @param rows Rows to draw.
 * @param [start] The rows before the first one drawn; blank for the stationary state.
 * @param [options] Options as "key=value; key=value" or as two columns: seed.
 * @returns {any[][]} One row per row drawn, one column per series.
 */
export function SIMULATE(model: any[][], rows: any, start?: any[][], options?: any[][]): any[][] {
  return answer(simulate, { model, rows, start, options });
}
