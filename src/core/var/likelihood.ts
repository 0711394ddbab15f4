import { add, factorColumns, inverseRoot, solveColumns, transpose } from "../linalg";
import { Issue } from "../issue";
import type { Matrix, MutableMatrix } from "../matrix";
import { filterGradient } from "../state-space/adjoint";
import { cellVariances, filterGains, runFilter, whitening, type FilterRow } from "../state-space/filter";
import { dotDense } from "../state-space/state-space";
import {
  varmaGradient,
  varmaSpace,
  type Varma,
  type VarmaGradient,
  type VarmaSpace,
} from "../state-space/varma-space";
import { meanTracks, throughDrivers } from "./mean-tracks";
import { combination, type Observed } from "./observed";

/** What a likelihood is computed of: observed cells, terms and drivers, row beside row. */
export interface LikelihoodData {
  readonly observed: Observed;
  /** n×m values of the terms. */
  readonly terms: Matrix;
  /** n×d. Before the sample every driver counts as its mean. */
  readonly drivers: Matrix;
}

/** Coefficients of the mean B of the terms (m×K) and of the drivers in the equations (d×K). */
export interface MeanPart {
  readonly terms: Matrix;
  readonly drivers: Matrix;
}

/** The likelihood at one point, and how it changes around it. */
export interface Likelihood {
  readonly logLikelihood: number;
  readonly mean: MeanPart;
  /** W with (XᵀX)⁻¹ = WWᵀ for the mean's coefficients, terms first, equations within. */
  meanRoot(): Matrix;
  gradient(): VarmaGradient & { readonly mean: MeanPart };
}

/**
 * Exact Gaussian log-likelihood of the observed cells: stationary start for the autoregression, unknown first levels
 * of differenced series integrated out with a flat prior.
 * @param mean the coefficients of the mean; null for those that make the likelihood largest, by generalised least squares
 * @returns null where the model is not stable, or predicts a cell without error
 * Source: Durbin and Koopman (2012), 7.2; de Jong (1991), Annals of Statistics 19, 1073–1083, for the flat prior
 */
export function likelihoodAt(data: LikelihoodData, varma: Varma, mean: MeanPart | null): Likelihood | null {
  const space = varmaSpace(varma, data.observed.undone);
  if (space === null) return null;
  const gains = filterGains(space, data.observed.seen);
  if (gains === null) return null;
  const tracks = meanTracks(data, varma);
  const parts = splitMean(data, space, gains, tracks, mean);
  if (parts === null) return null;
  const { coefficients, levels, unknownRoot, squares } = parts;
  const variances = cellVariances(gains);
  const free = variances.length - data.observed.unknown.length;
  const logLikelihood =
    -0.5 *
    (free * Math.log(2 * Math.PI) +
      variances.reduce((sum, f) => sum + Math.log(f), 0) +
      squares -
      2 * logDiagonal(unknownRoot));
  if (!Number.isFinite(logLikelihood)) return null;
  const found = meanPart(data, coefficients);
  return {
    logLikelihood,
    mean: found,
    meanRoot: () => meanRootOf(data, space, gains, tracks),
    gradient: () => {
      const values = less(
        data.observed.values,
        [...data.observed.unknown, ...tracks],
        [...levels, ...coefficients],
      );
      const run = (v: Float64Array) => runFilter(space, gains, v);
      const spread = unknownRoot.map((_, c) =>
        run(
          combination(
            data.observed.unknown,
            unknownRoot.map((row) => row[c]),
            data.observed.values.length,
          ),
        ),
      );
      const by = filterGradient(space, gains, [run(values), ...spread]);
      const direct = varmaGradient(space, by);
      const phi = throughDrivers(data, varma, found.drivers, by.values);
      return {
        ...direct,
        phi: direct.phi.map((matrix, j) => add(matrix, phi[j])),
        mean: meanPart(
          data,
          tracks.map((track) => -dotDense(by.values, track)),
        ),
      };
    },
  };
}

/** Coefficients of the mean and unknown levels, and what their whitened columns say of them. */
interface Split {
  readonly coefficients: readonly number[];
  readonly levels: readonly number[];
  /** W with (XᵀX)⁻¹ = WWᵀ for the unknown levels alone. */
  readonly unknownRoot: Matrix;
  /** Σ v²/F of what is left. */
  readonly squares: number;
}

/** Generalised least squares: the filter turns every track into independent errors of variance F. */
function splitMean(
  { observed }: LikelihoodData,
  space: VarmaSpace,
  gains: readonly FilterRow[],
  tracks: readonly Float64Array[],
  mean: MeanPart | null,
): Split | null {
  const white = whitening(space, gains);
  const unknown = observed.unknown.map(white);
  const given = mean && [...mean.terms.flat(), ...mean.drivers.flat()];
  const left = white(given ? less(observed.values, tracks, given) : observed.values);
  const found = leastOf(given ? unknown : [...unknown, ...tracks.map(white)], left);
  const unknownRoot = rootOf(unknown);
  if (found === null || unknownRoot === null) return null;
  return {
    coefficients: given ?? found.coefficients.slice(unknown.length),
    levels: found.coefficients.slice(0, unknown.length),
    unknownRoot,
    squares: found.squares,
  };
}

/** The rows of W, (XᵀX)⁻¹ = WWᵀ, that belong to the mean, unknown levels allowed for. */
function meanRootOf(
  { observed }: LikelihoodData,
  space: VarmaSpace,
  gains: readonly FilterRow[],
  tracks: readonly Float64Array[],
): Matrix {
  const root = rootOf([...observed.unknown, ...tracks].map(whitening(space, gains)));
  if (root === null) throw new Issue({ code: "singular-system" });
  return root.slice(observed.unknown.length);
}

function leastOf(
  columns: readonly (readonly number[])[],
  y: readonly number[],
): { readonly coefficients: number[]; readonly squares: number } | null {
  const squares = (rest: readonly number[]) => rest.reduce((sum, v) => sum + v * v, 0);
  if (columns.length === 0) return { coefficients: [], squares: squares(y) };
  const found = factorColumns(transpose(columns));
  if ("relation" in found) return null;
  const coefficients = solveColumns(
    found.factor,
    y.map((v) => [v]),
  ).map(([b]) => b);
  return {
    coefficients,
    squares: squares(
      y.map((v, i) => columns.reduce((rest, column, c) => rest - coefficients[c] * column[i], v)),
    ),
  };
}

function rootOf(columns: readonly (readonly number[])[]): Matrix | null {
  if (columns.length === 0) return [];
  const found = factorColumns(transpose(columns));
  return "relation" in found ? null : inverseRoot(found.factor);
}

/** ln of the product of a triangle's diagonal, sign apart. */
const logDiagonal = (triangle: Matrix): number =>
  triangle.reduce((sum, row, i) => sum + Math.log(Math.abs(row[i])), 0);

/** values − Σ weight·track. */
function less(
  values: Float64Array,
  tracks: readonly Float64Array[],
  weights: readonly number[],
): Float64Array {
  const taken = combination(tracks, weights, values.length);
  return values.map((v, i) => v - taken[i]);
}

/** A flat list, terms first and equations within, as the two parts of the mean. */
function meanPart({ observed, terms }: LikelihoodData, list: readonly number[]): MeanPart {
  const { series } = observed;
  const rows: MutableMatrix = [];
  for (let at = 0; at < list.length; at += series) rows.push(list.slice(at, at + series));
  const count = terms[0]?.length ?? 0;
  return { terms: rows.slice(0, count), drivers: rows.slice(count) };
}
