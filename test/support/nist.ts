import { lagCorrelations } from "../../src/core/moments/lag-covariance";
import { fitModel } from "../../src/core/var/fit";
import { designOf } from "../../src/core/var/design";
import { leastSquares } from "../../src/core/var/least-squares";
import { stepSample } from "../../src/core/var/stepped";
import { readText } from "./data";
import { sampleOf, settingsOfOrder } from "./requests";

/** The NIST Statistical Reference Datasets as they stand in test/reference/data/nist, certified values in their headers. */

export interface Certified {
  readonly name: string;
  readonly certified: readonly number[];
  readonly certifiedErrors: readonly number[];
  readonly certifiedSpread: number;
}

export interface Problem extends Certified {
  /** Response. */
  readonly y: readonly number[];
  /** Regressors beside the constant. */
  readonly x: readonly (readonly number[])[];
  readonly constant: boolean;
}

const dataLines = (text: string): number[][] => {
  const lines = text.split(/\r?\n/);
  const from = lines.findIndex((line) => /^Data:\s+y\b/i.test(line) && !/Response/.test(line));
  return lines
    .slice(from + 1)
    .filter((line) => /\d/.test(line))
    .map((line) => line.trim().split(/\s+/).map(Number));
};

/** Highest power of x in the polynomial problems. */
const POWERS: Readonly<Record<string, number>> = {
  Filip: 10,
  Wampler1: 5,
  Wampler2: 5,
  Wampler3: 5,
  Wampler4: 5,
  Wampler5: 5,
  Pontius: 2,
};

export function readProblem(name: string): Problem {
  const text = readText(`nist/${name}.dat`);
  const parameters = [...text.matchAll(/^\s+B\d+\s+(\S+)\s+(\S+)\s*$/gm)].map((m) => [
    Number(m[1]),
    Number(m[2]),
  ]);
  const spread = Number(/Standard Deviation\s+(\d\S*)\s*$/m.exec(text)![1]);
  const rows = dataLines(text);
  const powers = POWERS[name];
  const x = rows.map((row) =>
    powers === undefined ? row.slice(1) : Array.from({ length: powers }, (_, j) => row[1] ** (j + 1)),
  );
  return {
    name,
    y: rows.map((row) => row[0]),
    x,
    constant: /^\s+B0\s/m.test(text),
    certified: parameters.map(([estimate]) => estimate),
    certifiedErrors: parameters.map(([, error]) => error),
    certifiedSpread: spread,
  };
}

export interface Solution {
  readonly coefficients: readonly number[];
  readonly errors: readonly number[];
  readonly spread: number;
}

/** Solves a problem as the sheet would: one series, order 0, the regressors as drivers. */
export function solveProblem({ y, x, constant }: Problem): Solution {
  const sample = sampleOf(
    y.map((v) => [v]),
    x,
  );
  const settings = settingsOfOrder(1, 0, { terms: constant ? "constant" : "none" });
  const model = fitModel({ sample, plan: { kind: "fit", settings } });
  const { inverseRoot } = leastSquares(designOf(stepSample(sample, settings.steps), settings, 0));
  const [[variance]] = model.noiseCovariance;
  return {
    coefficients: model.coefficients.map(([v]) => v),
    errors: inverseRoot.map((row) => Math.sqrt(variance) * Math.hypot(...row)),
    spread: Math.sqrt(variance),
  };
}

export interface Univariate {
  readonly name: string;
  readonly values: readonly number[];
  readonly certified: number;
}

export function readUnivariate(name: string): Univariate {
  const text = readText(`nist/${name}.dat`);
  const lines = text.split(/\r?\n/);
  const from = lines.findIndex((line) => /^\s*-{6,}\s*$/.test(line));
  return {
    name,
    values: lines
      .slice(from + 1)
      .filter((line) => /\d/.test(line))
      .map(Number),
    certified: Number(/\(lag 1\)\s+r\(1\):\s*(\S+)/.exec(text)![1]),
  };
}

export const lagOne = ({ values }: Univariate): number =>
  lagCorrelations(
    values.map((v) => [v]),
    [1],
  )[0][0][0];

/** Correct significant digits, −log10 of the relative error, at most the 15 that are certified. */
export function digits(found: number, certified: number): number {
  const error = Math.abs(found - certified) / (certified === 0 ? 1 : Math.abs(certified));
  return error === 0 ? 15 : Math.min(15, Math.max(0, -Math.log10(error)));
}

export const fewestDigits = (found: readonly number[], certified: readonly number[]): number =>
  Math.min(...found.map((v, i) => digits(v, certified[i])));

export const UNIVARIATE = ["Lew", "Lottery", "Mavro", "Michelso", "NumAcc1", "NumAcc2", "NumAcc3", "NumAcc4"];

export const REGRESSIONS = [
  "Norris",
  "Pontius",
  "NoInt1",
  "NoInt2",
  "Filip",
  "Longley",
  "Wampler1",
  "Wampler2",
  "Wampler3",
  "Wampler4",
  "Wampler5",
];
