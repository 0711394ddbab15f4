import { fUpper } from "../distributions";
import { multiply, solveSquare, transpose } from "../linalg";
import { Issue } from "../issue";
import type { Matrix } from "../matrix";
import { designOf } from "../var/design";
import { refuseExactSeries, refuseNoiseless } from "../var/exact";
import { leastSquares, residualCovariance } from "../var/least-squares";
import { requireRows } from "../var/rows-needed";
import type { Sample } from "../var/sample";
import { allLags, orderOf, type ModelSettings } from "../var/settings";
import { stepSample } from "../var/stepped";

/**
 * P-values that the past of one series does not help to predict another, all others kept in: F test of its lag
 * coefficients in the one equation, least squares, T − q denominator degrees of freedom.
 * @param spare lags fitted beyond the order and left out of the test, for integrated series
 * @returns K×K, row = effect, column = cause, NaN on the diagonal
 * @throws Issue "needs-two-series" | "no-lags" | "too-few-rows" | "constant-series" | "exact-combination" |
 *   "nothing-left-over"
 * Source: Lütkepohl (2005), 3.6.1; Toda and Yamamoto (1995) for the spare lags
 */
export function grangerPValues(sample: Sample, settings: ModelSettings, spare: number): Matrix {
  if (sample.series[0].length < 2) throw new Issue({ code: "needs-two-series" });
  if (settings.lags.length === 0) throw new Issue({ code: "no-lags" });
  const tested = settings.lags;
  const order = orderOf(settings);
  const fitted: ModelSettings = {
    ...settings,
    lags: [...tested, ...allLags(spare).map((lag) => order + lag)],
  };
  const stepped = stepSample(sample, settings.steps);
  const series = stepped.y[0].length;
  requireRows(fitted, { rows: stepped.y.length, series, drivers: stepped.drivers[0]?.length ?? 0 });
  refuseExactSeries(stepped.y, fitted, stepped.start);
  const design = designOf(stepped, fitted, orderOf(fitted));
  const { coefficients, residuals, inverseRoot } = leastSquares(design);
  const freedom = residuals.length - design.regressors.length;
  const noise = residualCovariance(residuals, freedom);
  refuseNoiseless(noise, stepped.y);
  return noise.map((_, effect) =>
    noise.map((_, cause) => {
      if (cause === effect) return NaN;
      const rows = design.regressors.flatMap((regressor, r) =>
        regressor.kind === "lag" && regressor.series === cause && tested.includes(regressor.lag) ? [r] : [],
      );
      const wald = quadratic(
        rows.map((r) => coefficients[r][effect]),
        rows.map((r) => inverseRoot[r]),
      );
      return fUpper(wald / noise[effect][effect] / rows.length, rows.length, freedom);
    }),
  );
}

/** bᵀ(W·Wᵀ)⁻¹b for the rows W of an inverse root. */
function quadratic(b: readonly number[], w: Matrix): number {
  const solved = solveSquare(
    multiply(w, transpose(w)),
    b.map((v) => [v]),
  );
  return b.reduce((sum, v, i) => sum + v * solved[i][0], 0);
}

/**
 * Holm's correction over all entries that are numbers: sorted rising, p(i)·(m − i + 1), never falling, at most 1.
 * Source: Holm (1979)
 */
export function holm(p: Matrix): Matrix {
  const width = p[0].length;
  const entries = p.flat().flatMap((value, at) => (Number.isNaN(value) ? [] : [{ value, at }]));
  entries.sort((a, b) => a.value - b.value);
  const out = p.map((row) => [...row]);
  let least = 0;
  entries.forEach(({ value, at }, i) => {
    least = Math.min(1, Math.max(least, value * (entries.length - i)));
    out[Math.floor(at / width)][at % width] = least;
  });
  return out;
}
