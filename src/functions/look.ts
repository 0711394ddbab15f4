import { answer } from "./answer";
import { lagcov } from "../sheet/calls/lagcov";
import { lagcorr } from "../sheet/calls/lagcorr";

/**
 * Covariance matrices of the series at each lag. A large entry says that the column series leads the row series by that many rows.
 * @customfunction LAGCOV
 * @helpurl https://localhost:3000/help/index.html#LAGCOV
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param lags A whole number L for lags 0 to L, or several cells for just those lags.
 * @param [options] Options as "key=value; key=value" or as two columns: divisor, labels.
 * @returns {any[][]} One matrix per lag, stacked downwards.
 */
export function LAGCOV(series: any[][], lags: any[][], options?: any[][]): any[][] {
  return answer(lagcov, { series, lags, options });
}

/**
 * Correlation matrices of the series at each lag. A large entry says that the column series leads the row series by that many rows.
 * @customfunction LAGCORR
 * @helpurl https://localhost:3000/help/index.html#LAGCORR
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param lags A whole number L for lags 0 to L, or several cells for just those lags.
 * @param [options] Options as "key=value; key=value" or as two columns: divisor, labels.
 * @returns {any[][]} One matrix per lag, stacked downwards, with the bound that chance alone rarely passes.
 */
export function LAGCORR(series: any[][], lags: any[][], options?: any[][]): any[][] {
  return answer(lagcorr, { series, lags, options });
}
