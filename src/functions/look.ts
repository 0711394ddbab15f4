import { answer } from "./answer";
import { lagcov } from "../sheet/calls/lagcov";
import { impliedcov } from "../sheet/calls/impliedcov";
import { partiallag } from "../sheet/calls/partiallag";
import { lagcorr } from "../sheet/calls/lagcorr";
import { leadlag } from "../sheet/calls/leadlag";

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

/**
 * What each further lag adds: the last coefficient matrix of the fit of each order, with a test that it is zero.
 * @customfunction PARTIALLAG
 * @helpurl https://localhost:3000/help/index.html#PARTIALLAG
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param lags How many lags, from 1.
 * @param [options] Options as "key=value; key=value" or as two columns: labels.
 * @returns {any[][]} One matrix per lag, stacked downwards.
 */
export function PARTIALLAG(series: any[][], lags: any[][], options?: any[][]): any[][] {
  return answer(partiallag, { series, lags, options });
}

/**
 * Lagged covariance matrices that the numbers of a model block imply.
 * @customfunction IMPLIEDCOV
 * @helpurl https://localhost:3000/help/index.html#IMPLIEDCOV
 * @param model A model block, as MODEL lays it out.
 * @param lags The largest lag, from 0.
 * @returns {any[][]} One matrix per lag, stacked downwards.
 */
export function IMPLIEDCOV(model: any[][], lags: any[][]): any[][] {
  return answer(impliedcov, { model, lags });
}

/**
 * Which series leads which and by how many rows, after the leader's own memory is taken out of both. A lead is not a cause.
 * @customfunction LEADLAG
 * @helpurl https://localhost:3000/help/index.html#LEADLAG
 * @param series Range of series, one per column, oldest row first; a header row of names is welcome.
 * @param lags Largest lag to look at; 0 is the same row.
 * @param [options] Options as "key=value; key=value" or as two columns: labels.
 * @returns {any[][]} One row per ordered pair, the clearest lead first, each with a reading in words.
 */
export function LEADLAG(series: any[][], lags: any[][], options?: any[][]): any[][] {
  return answer(leadlag, { series, lags, options });
}
