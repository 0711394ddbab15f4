import { Issue } from "../issue";
import { cholesky, invertTriangle, multiply, scale, subtract, transpose } from "../linalg";
import { zeros, type Matrix, type MutableMatrix } from "../matrix";
import { likelihoodAt, type MeanPart } from "./likelihood";
import { likelihoodProblem, unmixed, type LikelihoodProblem } from "./likelihood-fit";
import type { VarModel } from "./model";
import { largestRoot } from "./roots";
import type { Sample } from "./sample";
import { stationaryMean } from "./stationary-mean";

/** Step of the differences, in standard errors: the slope is known to some twelve digits. */
const STEP = 1e-4;

/**
 * Directions (q×K each, block order) whose outer products add up to the coefficients' covariance: the inverse of minus
 * the Hessian of the log-likelihood by all coefficients and the innovation covariance, at the model's own numbers.
 * @throws Issue "unstable" | "likelihood-stuck" where the likelihood has no top near these numbers
 * Source: Lütkepohl (2005), 3.4.3 and 12.2; differences of the exact slope
 */
export function likelihoodDirections(model: VarModel, sample: Sample): Matrix[] {
  const modulus = largestRoot(model);
  if (modulus >= 1) throw new Issue({ code: "unstable", modulus });
  const problem = likelihoodProblem(sample, model.settings, model);
  const around = meanAround(model, problem);
  const { size } = problem.coordinates;
  const whole = around.size + size;
  const slopeAt = (point: Float64Array): number[] => {
    const dynamic = point.subarray(around.size);
    const mean = around.at(point.subarray(0, around.size));
    const there = likelihoodAt(problem.data, problem.coordinates.varma(dynamic), mean);
    if (there === null) throw new Issue({ code: "likelihood-stuck", reason: "flat" });
    const by = there.gradient();
    return [...around.slope(by.mean), ...problem.coordinates.slope(dynamic, by)];
  };
  const rows = Array.from({ length: whole }, (_, c) => {
    const [up, down] = [STEP, -STEP].map((step) => {
      const point = new Float64Array(whole);
      point[c] = step;
      return slopeAt(point);
    });
    return up.map((v, i) => (down[i] - v) / (2 * STEP));
  });
  const lower = cholesky(rows.map((row, i) => row.map((v, j) => (v + rows[j][i]) / 2)));
  if (lower === null) throw new Issue({ code: "likelihood-stuck", reason: "flat" });
  const unit = Array.from({ length: whole }, (_, c) => unitDirection(model, problem, around, c));
  // H⁻¹ = L⁻ᵀ·L⁻¹: each row of L⁻¹ is a combination of coordinates of length one
  return invertTriangle(lower).map((weights) =>
    weights.reduce<MutableMatrix>(
      (sum, weight, c) => {
        unit[c].forEach((row, r) => row.forEach((v, k) => (sum[r][k] += weight * v)));
        return sum;
      },
      zeros(model.coefficients.length, model.series),
    ),
  );
}

/** Coefficients of the mean as a list around the model's own, in coordinates in which the likelihood curves by about one. */
interface MeanAround {
  readonly size: number;
  at(x: Float64Array): MeanPart;
  slope(by: MeanPart): number[];
}

function meanAround(model: VarModel, { data, coordinates, mix }: LikelihoodProblem): MeanAround {
  const unmix = transpose(invertTriangle(mix));
  const ofMix = (rows: Matrix) => multiply(rows, unmix);
  const centre: MeanPart = {
    terms: ofMix(stationaryMean(model)),
    drivers: ofMix(model.coefficients.filter((_, r) => model.regressors[r].kind === "driver")),
  };
  const there = likelihoodAt(data, coordinates.varma(new Float64Array(coordinates.size)), centre);
  if (there === null) throw new Issue({ code: "likelihood-stuck", reason: "flat" });
  const meanRoot = there.meanRoot();
  const spread = meanRoot.length === 0 ? [] : cholesky(multiply(meanRoot, transpose(meanRoot)));
  if (spread === null) throw new Issue({ code: "likelihood-stuck", reason: "flat" });
  const flat = (part: MeanPart) => [...part.terms, ...part.drivers].flat();
  return {
    size: spread.length,
    at: (x) => {
      const list = flat(centre).map((v, i) => spread[i].reduce((sum, w, c) => sum + w * x[c], v));
      const rows = Array.from({ length: list.length / model.series }, (_, r) =>
        list.slice(r * model.series, (r + 1) * model.series),
      );
      return {
        terms: rows.slice(0, centre.terms.length),
        drivers: rows.slice(centre.terms.length),
      };
    },
    slope: (by) => {
      const list = flat(by);
      return spread.map((_, c) => spread.reduce((sum, row, i) => sum + row[c] * list[i], 0));
    },
  };
}

/** How the block's coefficients move along one coordinate: linear but for the terms, which are bilinear. */
function unitDirection(
  model: VarModel,
  { coordinates, mix }: LikelihoodProblem,
  around: MeanAround,
  c: number,
): Matrix {
  const at = (step: number) => {
    const mean = new Float64Array(around.size);
    const dynamic = new Float64Array(coordinates.size);
    if (c < around.size) mean[c] = step;
    else dynamic[c - around.size] = step;
    return unmixed(model.settings, coordinates.varma(dynamic), around.at(mean), mix).coefficients;
  };
  // a difference to both sides is exact for what is bilinear
  return scale(subtract(at(1), at(-1)), 0.5);
}
