import type { Matrix } from "../matrix";
import { designOf, regressorRow } from "./design";
import { leastSquares, type Regression } from "./least-squares";
import { regressorsOf } from "./regressors";
import { allLags, orderOf, type ModelSettings } from "./settings";
import type { SteppedSample } from "./stepped";

/** Order of the long autoregression that stands in for unknown innovations: grows slowly, leaves half of the rows. */
function longOrder({ y, drivers }: SteppedSample, settings: ModelSettings, terms: number): number {
  const series = y[0].length;
  const wanted = Math.max(orderOf(settings), settings.movingAverage) + Math.ceil(Math.log(y.length));
  const room = Math.floor((y.length / 2 - terms - (drivers[0]?.length ?? 0)) / (series + 1));
  return Math.max(1, Math.min(wanted, room));
}

/**
 * Coefficients to start a likelihood from: innovations are the residuals of a long autoregression, and the model is
 * then a regression on terms, lags, drivers and those.
 * @param sample without gaps
 * @returns regression in block order, its last rows those of the moving average
 * @throws Issue "exact-combination"
 * Source: Hannan and Rissanen (1982), Biometrika 69, 81–94; Lütkepohl (2005), 12.3.4
 */
export function hannanRissanen(sample: SteppedSample, settings: ModelSettings): Regression {
  if (settings.movingAverage === 0) return leastSquares(designOf(sample, settings, orderOf(settings)));
  const { y, drivers, start } = sample;
  const regressors = regressorsOf(settings, y[0].length, drivers[0]?.length ?? 0);
  const terms = regressors.findIndex(
    ({ kind }) => kind === "lag" || kind === "driver" || kind === "innovation",
  );
  const long = longOrder(sample, settings, terms);
  const lags = { ...settings, movingAverage: 0, lags: allLags(long) };
  const first: Matrix = y.slice(0, long).map((row) => row.map(() => 0));
  const innovations = [...first, ...leastSquares(designOf(sample, lags, long)).residuals];
  const from = Math.max(orderOf(settings), long + settings.movingAverage);
  const z = y.slice(from).map((_, i) =>
    regressorRow(regressors, {
      history: y,
      drivers,
      start,
      cycle: settings.cycle,
      at: from + i,
      innovations,
    }),
  );
  return leastSquares({ regressors, z, y: y.slice(from) });
}
