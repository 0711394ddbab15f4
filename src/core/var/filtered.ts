import { Issue } from "../issue";
import { factorColumns, inverseRoot, solveColumns, transpose } from "../linalg";
import { zeros, type Matrix, type MutableMatrix } from "../matrix";
import { rowsLost } from "../prepare/steps";
import { filterGains, observeAll, runFilter, whitening, type FilterRow } from "../state-space/filter";
import { smoothedCells, smoothedVariances } from "../state-space/smoother";
import { timesDense } from "../state-space/state-space";
import { varmaSpace, type VarmaSpace } from "../state-space/varma-space";
import { innovationRoot } from "./innovation-root";
import { lagMatrices, movingAverageMatrices } from "./lag-matrices";
import { driverPath } from "./mean-tracks";
import type { VarModel } from "./model";
import { combination, lift, observedSample, type Observed } from "./observed";
import { largestRoot } from "./roots";
import type { Sample } from "./sample";
import { stationaryMean } from "./stationary-mean";
import { termCount, termRow } from "./terms";
import { requireFilterWork, statesOf } from "./work";

/** A model's numbers laid over the observed cells of a sample: everything that is known, taken out of them. */
interface Laid {
  readonly space: VarmaSpace;
  readonly gains: readonly FilterRow[];
  readonly observed: Observed;
  /** rows×series: what was taken out of the levels, and what was left. */
  readonly taken: Float64Array;
  readonly left: Float64Array;
  /** What one standard error of each unknown start adds. */
  readonly doubts: readonly Float64Array[];
}

/**
 * @param ahead how many of the rows lie ahead of the data
 * @throws Issue "filter-heavy" | "gaps-too-many" | "covariance-not-positive" | "covariance-asymmetric" | "too-large"
 */
function layOver(model: VarModel, sample: Sample, ahead: number): Laid {
  const observed = observedSample(sample, model.settings.steps, { levels: true });
  requireFilterWork(observed.rows, levelStates(model));
  // checked only: the filter needs the covariance itself
  innovationRoot(model);
  const varma = {
    phi: lagMatrices(model),
    theta: movingAverageMatrices(model),
    sigma: model.noiseCovariance,
  };
  const stable = largestRoot(model) < 1;
  const space = varmaSpace(varma, observed.undone, stable ? "stationary" : "unknown");
  const gains = space && filterGains(space, observed.seen);
  if (space === null || gains === null) throw new Issue({ code: "gaps-too-many" });
  const mean = lift(meanPath(model, sample, observed.rows, ahead, stable), observed);
  const rest = observed.values.map((v, i) => v - mean[i]);
  const states = stable ? [] : startTracks(space, observed);
  const { tracks, weights, root } = unknownStarts(space, gains, rest, observed.unknown, states);
  const starts = combination(tracks, weights, rest.length);
  return {
    space,
    gains,
    observed,
    taken: observed.known.map((v, i) => v + mean[i] + starts[i]),
    left: rest.map((v, i) => v - starts[i]),
    doubts: (root[0] ?? []).map((_, c) =>
      combination(
        tracks,
        root.map((row) => row[c]),
        rest.length,
      ),
    ),
  };
}

/** Numbers that a state carries when every differenced series is followed as its level. */
export const levelStates = ({ settings, series }: VarModel): number =>
  statesOf(
    settings,
    series,
    settings.steps.reduce((sum, steps) => sum + rowsLost(steps), 0),
  );

/** Where terms and drivers lead: around this the series move with mean zero. */
function meanPath(
  model: VarModel,
  sample: Sample,
  rows: number,
  ahead: number,
  stable: boolean,
): Float64Array {
  const { settings, series } = model;
  const phi = lagMatrices(model);
  const lost = sample.series.length - rows;
  const count = termCount(settings);
  const terms = Array.from({ length: rows }, (_, t) => termRow(settings, sample.start + t));
  const byDrivers = model.coefficients.filter((_, r) => model.regressors[r].kind === "driver");
  const drivers = sample.drivers.slice(lost, lost + rows);
  const out = new Float64Array(rows * series);
  const addPath = (path: Float64Array) => path.forEach((v, i) => (out[i] += v));
  if (stable) {
    const mean = stationaryMean(model);
    terms.forEach((row, t) =>
      row.forEach((v, a) => mean[a].forEach((b, k) => (out[t * series + k] += v * b))),
    );
    byDrivers.forEach((weight, d) => addPath(driverPath(drivers.map((row) => row[d]), weight, phi, rows - ahead))); // prettier-ignore
    return out;
  }
  // no mean is settled at, so the path begins at 0 and what it should have begun at is an unknown start
  for (let t = 0; t < rows; t++) {
    for (let k = 0; k < series; k++) {
      let sum = 0;
      for (let a = 0; a < count; a++) sum += terms[t][a] * model.coefficients[a][k];
      byDrivers.forEach((weight, d) => (sum += weight[k] * drivers[t][d]));
      phi.forEach((matrix, j) => {
        if (t > j) for (let i = 0; i < series; i++) sum += matrix[k][i] * out[(t - j - 1) * series + i];
      });
      out[t * series + k] = sum;
    }
  }
  return out;
}

/** What a unit in each state of the autoregression just before the sample would add to the levels. */
function startTracks(space: VarmaSpace, observed: Observed): Float64Array[] {
  return Array.from({ length: space.moving }, (_, i) => {
    const states = new Float64Array(observed.rows * space.size);
    let state: Float64Array = new Float64Array(space.size);
    state[i] = 1;
    for (let t = 0; t < observed.rows; t++) {
      state = timesDense(space.transition, state, 1);
      states.set(state, t * space.size);
    }
    return observeAll(space, states);
  });
}

/** Unknown starts by generalised least squares. */
interface Starts {
  /** Those that can be told apart. */
  readonly tracks: readonly Float64Array[];
  readonly weights: readonly number[];
  /** W, (XᵀX)⁻¹ = WWᵀ. */
  readonly root: Matrix;
}

/**
 * @param levels each of which must be told by the observed cells
 * @param states those that repeat others say nothing new, and are left out
 * @throws Issue "gaps-too-many"
 */
function unknownStarts(
  space: VarmaSpace,
  gains: readonly FilterRow[],
  values: Float64Array,
  levels: readonly Float64Array[],
  states: readonly Float64Array[],
): Starts {
  const white = whitening(space, gains);
  const tracks = [...levels, ...states];
  while (tracks.length > 0) {
    const columns = transpose(tracks.map(white));
    if (columns.length < tracks.length) throw new Issue({ code: "gaps-too-many" });
    const found = factorColumns(columns);
    if ("factor" in found) {
      const weights = solveColumns(
        found.factor,
        white(values).map((v) => [v]),
      );
      return { tracks, weights: weights.map(([b]) => b), root: inverseRoot(found.factor) };
    }
    const repeated = found.relation.columns.at(-1)!;
    if (repeated < levels.length) throw new Issue({ code: "gaps-too-many" });
    tracks.splice(repeated, 1);
  }
  return { tracks, weights: [], root: [] };
}

/** Levels on the scale before log or square root are undone, rows kept by the steps and rows ahead. */
export interface Levels {
  readonly expected: Matrix;
  readonly deviations: Matrix;
}

/**
 * What every cell is expected to be given all observed cells, with its standard deviation: the forecast in rows ahead,
 * the mended value in gaps.
 * @param imposed h×K in original units, taken as observed in the rows ahead; NaN where nothing is
 * Source: Kohn and Ansley (1986), Journal of the American Statistical Association 81, 751–761
 */
export function expectedLevels(model: VarModel, sample: Sample, imposed: Matrix): Levels {
  const whole = { ...sample, series: [...sample.series, ...imposed] };
  const { space, gains, taken, left, doubts } = layOver(model, whole, imposed.length);
  const expected = smoothedCells(space, gains, left);
  const variances = smoothedVariances(space, gains);
  for (const doubt of doubts) {
    const explained = smoothedCells(space, gains, doubt);
    doubt.forEach((v, i) => (variances[i] += (v - explained[i]) ** 2));
  }
  return {
    expected: rowsOf(expected.map((v, i) => v + taken[i]), model.series), // prettier-ignore
    deviations: rowsOf(variances.map(Math.sqrt), model.series),
  };
}

/** Rows of what each row is expected to be given the observed cells of the rows before, on the scale of the levels. */
export function oneStepLevels(model: VarModel, sample: Sample): Matrix {
  const { space, gains, taken, left } = layOver(model, sample, 0);
  const expected = observeAll(space, runFilter(space, gains, left).before);
  return rowsOf(
    expected.map((v, i) => v + taken[i]),
    model.series,
  );
}

function rowsOf(flat: Float64Array, series: number): MutableMatrix {
  const out = zeros(flat.length / series, series);
  flat.forEach((v, i) => (out[Math.floor(i / series)][i % series] = v));
  return out;
}
