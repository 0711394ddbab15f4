import { Issue } from "../issue";
import {
  factorColumns,
  inverseRoot,
  multiply,
  solveColumns,
  subtract,
  transpose,
  type ExactRelation,
} from "../linalg";
import type { Matrix } from "../matrix";
import type { Design } from "./design";
import type { Regressor } from "./regressors";

/** A regression solved for all equations at once. */
export interface Regression {
  /** q×K. */
  readonly coefficients: Matrix;
  /** T×K residuals U. */
  readonly residuals: Matrix;
  /** W, q×q, with (ZᵀZ)⁻¹ = W·Wᵀ. */
  readonly inverseRoot: Matrix;
}

/**
 * Ordinary least squares of every column of y on Z by Householder QR of unit-length columns, with one step
 * of refinement on the residuals.
 * @throws Issue "exact-combination" naming the regressors whose columns are an exact combination
 * Source: Lütkepohl (2005), 3.2.1; Higham (2002), ch. 20 (refinement)
 */
export function leastSquares({ regressors, z, y }: Design): Regression {
  if (regressors.length === 0) return { coefficients: [], residuals: y, inverseRoot: [] };
  const found = factorColumns(z);
  if ("relation" in found)
    throw new Issue({ code: "exact-combination", columns: nameColumns(found.relation, regressors) });
  const first = solveColumns(found.factor, y);
  const correction = solveColumns(found.factor, subtract(y, multiply(z, first)));
  const coefficients = first.map((row, i) => row.map((v, j) => v + correction[i][j]));
  return {
    coefficients,
    residuals: subtract(y, multiply(z, coefficients)),
    inverseRoot: inverseRoot(found.factor),
  };
}

/** An exact relation among columns, told by the regressors they hold. */
export const nameColumns = ({ columns, weights }: ExactRelation, regressors: readonly Regressor[]) =>
  columns.map((c, i) => ({ column: regressors[c], weight: weights[i] }));

/** UᵀU / divisor. */
export const residualCovariance = (residuals: Matrix, divisor: number): Matrix =>
  multiply(transpose(residuals), residuals).map((row) => row.map((v) => v / divisor));
