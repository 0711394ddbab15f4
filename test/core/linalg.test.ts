import { describe, expect, it } from "vitest";
import { type Issue } from "../../src/core/issue";
import {
  cholesky,
  eigenvalues,
  factorColumns,
  inverseRoot,
  inverseSymmetric,
  logDeterminant,
  multiply,
  singularValues,
  solveColumns,
  solveSquare,
  symmetricEigen,
  transpose,
} from "../../src/core/linalg";
import { identity, type Matrix } from "../../src/core/matrix";
import { leastSquares } from "../../src/core/var/least-squares";
import type { Regressor } from "../../src/core/var/regressors";
import { blockClose, close } from "../support/close";
import { frozen } from "../support/frozen";
import { normals } from "../support/invented";

const draws = (rows: number, columns: number, seed: number): number[][] => {
  const draw = normals(seed);
  return Array.from({ length: rows }, () => Array.from({ length: columns }, () => draw()));
};
const relationOf = (x: Matrix) => {
  const found = factorColumns(x);
  return "relation" in found ? found.relation : null;
};
const factorOf = (x: Matrix) => {
  const found = factorColumns(x);
  if ("relation" in found) throw new Error("an exact relation where none is");
  return found.factor;
};

describe("a line through three points, by hand", () => {
  // 1, 3, 4 at x = 0, 1, 2: slope 3/2, height 7/6
  const x = [[1, 0], [1, 1], [1, 2]]; // prettier-ignore
  it("least squares", () => close(solveColumns(factorOf(x), [[1], [3], [4]]), [[7 / 6], [3 / 2]]));
  it("(XᵀX)⁻¹ = W·Wᵀ", () => {
    const w = inverseRoot(factorOf(x));
    close(multiply(w, transpose(w)), [[5 / 6, -1 / 2], [-1 / 2, 1 / 2]]); // prettier-ignore
  });
});

describe("exact relations among columns", () => {
  const base = draws(40, 3, 11);

  it("a sum of two columns is found, with its weights", () => {
    const relation = relationOf(base.map(([a, b, c]) => [a, b, c, a + b]))!;
    expect(relation.columns).toEqual([0, 1, 3]);
    close(
      relation.weights.map((w) => w / relation.weights.at(-1)!),
      [-1, -1, 1],
    );
  });

  it("weights are in the units of the columns, whatever their scale", () => {
    const relation = relationOf(base.map(([a, b]) => [1e9 * a, 1e-9 * b, a - b]))!;
    expect(relation.columns).toEqual([0, 1, 2]);
    close(relation.weights, [-1e-9, 1e9, 1], { rtol: 1e-8 });
  });

  it("a column of zeros is one by itself", () => {
    expect(relationOf(base.map(([a, b]) => [a, 0, b]))).toEqual({ columns: [1], weights: [1] });
  });

  it.each([1e-9, 1e-7, 1e-3])("a column that keeps %d of its own is no combination", (own) => {
    expect(relationOf(base.map(([a, b, c]) => [a, b, a + b + own * c * 10]))).toBeNull();
  });

  it.each([0, 1e-13, 1e-12])("a column that keeps %d of its own is one", (own) => {
    expect(relationOf(base.map(([a, b, c]) => [a, b, a + b + own * c]))).not.toBeNull();
  });

  it("the regression names the regressors", () => {
    const regressors: Regressor[] = [
      { kind: "constant" },
      { kind: "lag", series: 0, lag: 1 },
      { kind: "driver", driver: 0 },
    ];
    const z = base.map(([a]) => [1, a, 2 * a + 3]);
    expect(() => leastSquares({ regressors, z, y: base })).toThrow(
      expect.objectContaining({
        facts: {
          code: "exact-combination",
          columns: regressors.map((column) => ({ column, weight: expect.any(Number) as number })),
        },
      }) as Issue,
    );
  });
});

describe("square systems", () => {
  const a = draws(5, 5, 12);
  const b = draws(5, 2, 13);

  it("A·X = B", () => blockClose(multiply(a, solveSquare(a, b)), b, 1e-12));
  it("rows in very different units", () => {
    const units = [1, 1e12, 1e-12, 1e6, 1e-6];
    const scaled = (m: Matrix) => m.map((row, i) => row.map((v) => v * units[i]));
    blockClose(solveSquare(scaled(a), scaled(b)), solveSquare(a, b), 1e-11);
  });
  it.each([
    ["a repeated row", [[1, 2], [1, 2]]],
    ["a row of zeros", [[0, 0], [1, 2]]],
    ["rows that are multiples", [[1, 3], [1 / 3, 1]]],
  ])("%s is refused", (_, singular) => {
    expect(() => solveSquare(singular, [[1], [1]])).toThrow(
      expect.objectContaining({ facts: { code: "singular-system" } }) as Issue,
    );
  }); // prettier-ignore
  it.each([Infinity, NaN])("numbers out of range are told as such: %d", (v) => {
    expect(() => solveSquare([[v, 1], [1, 2]], [[1], [1]])).toThrow(
      expect.objectContaining({ facts: { code: "too-large" } }) as Issue,
    );
  }); // prettier-ignore
});

describe("symmetric positive definite matrices", () => {
  const root = draws(4, 4, 14);
  const a = multiply(root, transpose(root));
  const units = [1, 1e8, 1e-8, 1e3];
  const scaled = a.map((row, i) => row.map((v, j) => v * units[i] * units[j]));

  it("L·Lᵀ = A, in any units", () => {
    for (const m of [a, scaled]) {
      const lower = cholesky(m)!;
      multiply(lower, transpose(lower)).forEach((row, i) =>
        row.forEach((v, j) =>
          expect(Math.abs(v - m[i][j])).toBeLessThan(1e-13 * Math.sqrt(m[i][i] * m[j][j])),
        ),
      );
      lower.forEach((row, i) => expect(row.slice(i + 1).every((v) => v === 0)).toBe(true));
    }
  });

  it("ln|A| shifts by the units", () => {
    const shift = 2 * units.reduce((sum, u) => sum + Math.log(u), 0);
    close(logDeterminant(scaled)!, logDeterminant(a)! + shift, { rtol: 1e-12 });
  });

  it("A⁻¹·A = I", () => blockClose(multiply(inverseSymmetric(a)!, a), identity(4), 1e-11));

  it.each([
    ["negative variance", [[-1, 0], [0, 1]]],
    ["zero variance", [[0, 0], [0, 1]]],
    ["correlation beyond 1", [[1, 1.1], [1.1, 1]]],
    ["correlation of exactly 1", [[4, 2], [2, 1]]],
    ["numbers that are none", [[NaN, 0], [0, 1]]],
  ])("%s has no factor", (_, bad) => {
    expect(cholesky(bad)).toBeNull();
    expect(logDeterminant(bad)).toBeNull();
    expect(inverseSymmetric(bad)).toBeNull();
  }); // prettier-ignore

  it("A·V = V·D with orthonormal V, largest first", () => {
    const { values, vectors } = symmetricEigen(a);
    const scaledVectors = vectors.map((row) => row.map((v, j) => v * values[j]));
    blockClose(multiply(a, vectors), scaledVectors, 1e-12);
    blockClose(multiply(transpose(vectors), vectors), identity(4), 1e-12);
    expect([...values].sort((p, q) => q - p)).toEqual(values);
    close(
      singularValues(root).map((s) => s * s),
      values,
      { rtol: 1e-10 },
    );
  });
});

describe("eigenvalues", () => {
  it("a turn by a right angle has ±i", () => {
    const found = eigenvalues([[0, -1], [1, 0]]); // prettier-ignore
    close(
      found.map(({ real }) => real),
      [0, 0],
      { atol: 1e-15 },
    ); // both are zero
    close(
      found.map(({ imaginary }) => imaginary).sort((p, q) => p - q),
      [-1, 1],
    );
  });
  it("of a matrix with more cells than one call takes arguments", () => {
    const found = eigenvalues(identity(400).map((row, i) => row.map((v) => v * (i + 1))));
    expect(found.map(({ real }) => real).sort((p, q) => p - q)).toEqual(found.map((_, i) => i + 1));
  });
  it("none of an empty matrix", () => expect(eigenvalues([])).toEqual([]));
});

it("inputs are left as they were", () => {
  const a = frozen(draws(4, 4, 15));
  const symmetric = frozen(multiply(a, transpose(a)));
  factorColumns(a);
  solveSquare(a, frozen(draws(4, 1, 16)));
  cholesky(symmetric);
  symmetricEigen(symmetric);
  eigenvalues(a);
  singularValues(a);
});
