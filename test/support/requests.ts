import type { Matrix } from "../../src/core/matrix";
import type { Sample } from "../../src/core/var/sample";
import { allLags, type ModelSettings, type Shape } from "../../src/core/var/settings";

export const plainShape = (series: number, changes: Partial<Shape> = {}): Shape => ({
  fit: "least-squares",
  terms: "constant",
  cycle: null,
  waves: null,
  steps: Array.from({ length: series }, () => []),
  longRun: null,
  movingAverage: 0,
  pull: 0.2,
  fade: 1,
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
