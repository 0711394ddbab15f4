import type { Matrix } from "../../src/core/matrix";
import type { Sample } from "../../src/core/var/sample";
import {
  allLags,
  plainShape as leastSquaresShape,
  type ModelSettings,
  type Shape,
} from "../../src/core/var/settings";

export const plainShape = (series: number, changes: Partial<Shape> = {}): Shape => ({
  ...leastSquaresShape(series),
  ...changes,
});

export const settingsOfOrder = (
  series: number,
  order: number,
  changes: Partial<ModelSettings> = {},
): ModelSettings => ({
  ...plainShape(series),
  lags: allLags(order),
  ...changes,
});

export const sampleOf = (series: Matrix, drivers: Matrix = [], start = 1): Sample => ({
  series,
  drivers,
  start,
});
