import { Issue } from "../issue";

/**
 * Multiplications of orthogonal factors that one call may ask for: about two seconds of a page that must stay
 * responsive, as the program restarts an add-in that does not answer for five.
 */
const WORK_LIMIT = 1.4e8;

/** Whether something worked out beside a fit would hold the page up too: several such may come together. */
export const exceedsWork = (products: number): boolean => products > WORK_LIMIT / 5;

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
