import { answer } from "./answer";
import { steps as stepsCall } from "../sheet/calls/steps";
import { unstep } from "../sheet/calls/unstep";

/**
 * The series after steps such as log or differences, row beside row; rows that a step uses up are blank.
 * @customfunction STEPS
 * @helpurl https://localhost:3000/help/index.html#STEPS
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param steps What to do, left to right: log, sqrt, diff, diff 12. A bar separates one list per series.
 * @returns {any[][]} The transformed series, one row per row of the range.
 */
export function STEPS(series: any[][], steps: any[][]): any[][] {
  return answer(stepsCall, { series, steps });
}

/**
 * Takes values that continue the transformed series back to original units.
 * @customfunction UNSTEP
 * @helpurl https://localhost:3000/help/index.html#UNSTEP
 * @param series Range of series in original units, one per column, oldest row first.
 * @param steps The steps that were applied, as in STEPS.
 * @param values Rows that continue the transformed series, one column per series.
 * @returns {any[][]} The same rows in original units.
 */
export function UNSTEP(series: any[][], steps: any[][], values: any[][]): any[][] {
  return answer(unstep, { series, steps, values });
}
