import { answer, answerLater } from "./answer";
import { order } from "../sheet/calls/order";
import { model as modelCall } from "../sheet/calls/model";
import { estimates } from "../sheet/calls/estimates";
import { fitted, residuals } from "../sheet/calls/one-step";
import { roots } from "../sheet/calls/roots";

/**
 * Compares the orders 0 to maxorder on the same rows by several criteria.
 * @customfunction ORDER
 * @helpurl https://localhost:3000/help/index.html#ORDER
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param maxorder Largest order to compare.
 * @param [options] Options as "key=value; key=value" or as two columns: terms, cycle, waves, start, steps.
 * @param [drivers] Outside series, one per column, beside the series.
 * @returns {any[][]} One row per order; the last column names the criteria that choose it.
 */
export function ORDER(series: any[][], maxorder: any[][], options?: any[][], drivers?: any[][]): any[][] {
  return answer(order, { series, maxorder, options, drivers });
}

/**
 * Fits one joint model to the series and lays it out in cells: coefficients, then the innovation covariance.
 * @customfunction MODEL
 * @helpurl https://localhost:3000/help/index.html#MODEL
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose settings to use.
 * @param [options] Options as "key=value; key=value" or as two columns: fit, terms, cycle, waves, steps and more.
 * @param [drivers] Outside series, one per column, beside the series.
 * @param {CustomFunctions.CancelableInvocation} [invocation] Told when the result is no longer wanted.
 * @returns {Promise<any[][]>} The model block: one column per equation, one row per regressor.
 */
export function MODEL(
  series: any[][],
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater(modelCall, { series, model, options, drivers }, invocation);
}

/**
 * How fast a model forgets: the eigenvalues of its companion matrix, largest first, each with a reading in words.
 * @customfunction ROOTS
 * @helpurl https://localhost:3000/help/index.html#ROOTS
 * @param model A model block, as MODEL lays it out.
 * @returns {any[][]} One row per eigenvalue.
 */
export function ROOTS(model: any[][]): any[][] {
  return answer(roots, { model });
}

/**
 * Every coefficient of the model with its standard error, limits and p-value, equation by equation.
 * @customfunction ESTIMATES
 * @helpurl https://localhost:3000/help/index.html#ESTIMATES
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose settings to use.
 * @param [options] Options as "key=value; key=value" or as two columns: coverage, fit, terms, cycle, waves, steps and more.
 * @param [drivers] Outside series, one per column, beside the series.
 * @param {CustomFunctions.CancelableInvocation} [invocation] Told when the result is no longer wanted.
 * @returns {Promise<any[][]>} One row per coefficient.
 */
export function ESTIMATES(
  series: any[][],
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater(estimates, { series, model, options, drivers }, invocation);
}

/**
 * What the model forecasts one row ahead for every row of the series, in original units.
 * @customfunction FITTED
 * @helpurl https://localhost:3000/help/index.html#FITTED
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose numbers to use.
 * @param [options] Options as "key=value; key=value" or as two columns: fit, terms, cycle, waves, steps and more.
 * @param [drivers] Outside series, one per column, beside the series.
 * @param {CustomFunctions.CancelableInvocation} [invocation] Told when the result is no longer wanted.
 * @returns {Promise<any[][]>} One row per row of the series; the first rows are blank.
 */
export function FITTED(
  series: any[][],
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater(fitted, { series, model, options, drivers }, invocation);
}

/**
 * What the model leaves over in every row, on the scale of its steps.
 * @customfunction RESIDUALS
 * @helpurl https://localhost:3000/help/index.html#RESIDUALS
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose numbers to use.
 * @param [options] Options as "key=value; key=value" or as two columns: fit, terms, cycle, waves, steps and more.
 * @param [drivers] Outside series, one per column, beside the series.
 * @param {CustomFunctions.CancelableInvocation} [invocation] Told when the result is no longer wanted.
 * @returns {Promise<any[][]>} One row per row of the series; the first rows are blank.
 */
export function RESIDUALS(
  series: any[][],
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater(residuals, { series, model, options, drivers }, invocation);
}
