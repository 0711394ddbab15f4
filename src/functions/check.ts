import { answer, answerLater } from "./answer";
import { residtest } from "../sheet/calls/residtest";
import { granger } from "../sheet/calls/granger";

/**
 * P-values that the past of the column series does not help to predict the row series, all others kept in. A small value says that it helps; it is not a proof of cause.
 * @customfunction GRANGER
 * @helpurl https://localhost:3000/help/index.html#GRANGER
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose settings to use.
 * @param [options] Options as "key=value; key=value" or as two columns: adjust, spare, terms, cycle, waves, steps and more.
 * @param [drivers] Outside series, one per column, beside the series.
 * @returns {any[][]} One row per effect, one column per cause.
 */
export function GRANGER(series: any[][], model?: any[][], options?: any[][], drivers?: any[][]): any[][] {
  return answer(granger, { series, model, options, drivers });
}

/**
 * What the model leaves over, question by question: anything left to predict, changing spread, shape, a change in the equations, fit to use. Each row has a reading in words.
 * @customfunction RESIDTEST
 * @helpurl https://localhost:3000/help/index.html#RESIDTEST
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param [model] Blank or auto for an automatic order, a whole number for the order, or a model block whose numbers to use.
 * @param [options] Options as "key=value; key=value" or as two columns: testlags, fit, terms, cycle, waves, steps and more.
 * @param [drivers] Outside series, one per column, beside the series.
 * @param {CustomFunctions.CancelableInvocation} [invocation] Told when the result is no longer wanted.
 * @returns {Promise<any[][]>} One row per test.
 */
export function RESIDTEST(
  series: any[][],
  model?: any[][],
  options?: any[][],
  drivers?: any[][],
  invocation?: CustomFunctions.CancelableInvocation,
): Promise<any[][]> {
  return answerLater(residtest, { series, model, options, drivers }, invocation);
}
