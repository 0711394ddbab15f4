import { Issue } from "../issue";
import type { ModelSettings } from "./settings";
import { termCount } from "./terms";

/**
 * Multiplications of orthogonal factors that one call may ask for: about two seconds of a page that must stay
 * responsive, as the program restarts an add-in that does not answer for five.
 */
const WORK_LIMIT = 1.4e8;

/** Whether something worked out beside a fit would hold the page up too: several such may come together. */
export const exceedsWork = (products: number): boolean => products > WORK_LIMIT / 5;

/**
 * Refuses a state so long that its eigenvalues and covariance would hold the page up; both cost about its cube.
 * @throws Issue "too-many-states"
 */
export function requireStates(states: number): void {
  const limit = Math.floor(Math.cbrt(WORK_LIMIT / 10));
  if (states > limit) throw new Issue({ code: "too-many-states", states, limit });
}

/** Numbers that a state space carries from row to row. @param levels past levels among them */
export const statesOf = (
  { lags, movingAverage }: Pick<ModelSettings, "lags" | "movingAverage">,
  series: number,
  levels: number,
): number => series * Math.max(lags.at(-1) ?? 0, movingAverage + 1) + levels;

/** Entries of state variances, row after row, that one pass of the filter may keep: some 160 MB, and under two seconds. */
const FILTER_LIMIT = 1e7;

/** Entries that many passes may go through beside the page: about a minute. */
const PASSES_LIMIT = 7e8;

/**
 * Refuses to look past gaps over so many rows, or so often, that memory or patience would run out.
 * @throws Issue "filter-heavy"
 */
export function requireFilterWork(rows: number, states: number, passes = 1): void {
  const entries = rows * states * states;
  if (entries > FILTER_LIMIT || passes * entries > PASSES_LIMIT)
    throw new Issue({ code: "filter-heavy", rows, states });
}

/** Multiplications that a fit by likelihood may take beside the page: about a minute. */
const LIKELIHOOD_LIMIT = 2e10;

/** How often a likelihood is usually computed until its top is found, slope included. */
const LIKELIHOOD_TRIES = 50;

/**
 * Refuses a fit by likelihood that would take minutes: a pass of the filter and its slope cost about six products of
 * the state's variance with its few-celled transition per row.
 * @throws Issue "too-heavy"
 */
export function requireLikelihoodWork(
  {
    rows,
    series,
    undone,
  }: { readonly rows: number; readonly series: number; readonly undone: readonly (readonly number[])[] },
  settings: ModelSettings,
): void {
  const { lags, movingAverage } = settings;
  const states = statesOf(
    settings,
    series,
    undone.reduce((sum, { length }) => sum + length, 0),
  );
  const each = rows * 6 * states * states * (series + 1) + 60 * states ** 3;
  const coefficients = termCount(settings) + series * (lags.length + movingAverage);
  if (LIKELIHOOD_TRIES * each > LIKELIHOOD_LIMIT) throw new Issue({ code: "too-heavy", rows, coefficients });
}

/**
 * Refuses a fit that would hold the page up: the factor of T rows and q columns with K right-hand sides costs
 * about T·q·(q + K).
 * @param fits how many such fits the call asks for
 * @throws Issue "too-heavy"
 */
export function requireWork(
  {
    rows,
    coefficients,
    series,
  }: { readonly rows: number; readonly coefficients: number; readonly series: number },
  fits = 1,
): void {
  if (fits * rows * coefficients * (coefficients + series) > WORK_LIMIT) {
    throw new Issue({ code: "too-heavy", rows, coefficients });
  }
}
