import { describe, expect, it } from "vitest";
import {
  digits,
  fewestDigits,
  lagOne,
  readProblem,
  readUnivariate,
  REGRESSIONS,
  solveProblem,
  UNIVARIATE,
} from "../support/nist";

/**
 * NIST Statistical Reference Datasets, certified to 15 digits. The floors are what double precision leaves of a
 * problem: NumAcc3, NumAcc4 lose the digits that their offset of 10⁶, 10⁷ takes; Filip and the Wamplers lose their
 * condition number.
 */
const LAG_FLOORS: Readonly<Record<string, number>> = { NumAcc3: 10, NumAcc4: 9 };
const COEFFICIENT_FLOORS: Readonly<Record<string, number>> = {
  Filip: 7,
  Longley: 11,
  Wampler1: 9,
  Wampler2: 12,
  Wampler3: 9,
  Wampler4: 8,
  Wampler5: 6,
  Pontius: 12,
};

describe("NIST lag-1 autocorrelations", () => {
  it.each(UNIVARIATE)("%s", (name) => {
    const problem = readUnivariate(name);
    expect(problem.values.length).toBeGreaterThanOrEqual(3);
    expect(digits(lagOne(problem), problem.certified)).toBeGreaterThanOrEqual(LAG_FLOORS[name] ?? 13);
  });

  it("reads the certified values of Lew", () => {
    const { values, certified } = readUnivariate("Lew");
    expect(values.length).toBe(200);
    expect(certified).toBe(-0.307304800605679);
  });
});

describe("NIST least squares at order 0 with drivers", () => {
  it.each(REGRESSIONS)("%s coefficients", (name) => {
    const problem = readProblem(name);
    const { coefficients } = solveProblem(problem);
    expect(coefficients.length).toBe(problem.certified.length);
    expect(fewestDigits(coefficients, problem.certified)).toBeGreaterThanOrEqual(
      COEFFICIENT_FLOORS[name] ?? 13,
    );
  });

  it.each(REGRESSIONS)("%s standard errors and residual standard deviation", (name) => {
    const problem = readProblem(name);
    const { errors, spread } = solveProblem(problem);
    const floor = name === "Filip" ? 7 : name === "Wampler1" ? 9 : 12;
    expect(fewestDigits(errors, problem.certifiedErrors)).toBeGreaterThanOrEqual(floor);
    expect(digits(spread, problem.certifiedSpread)).toBeGreaterThanOrEqual(floor);
  });

  it("reads the certified values of Filip", () => {
    const { y, certified } = readProblem("Filip");
    expect(y.length).toBe(82);
    expect(certified[0]).toBe(-1467.4896142298);
    expect(certified.at(-1)).toBe(-0.402962525080404e-4);
  });
});
