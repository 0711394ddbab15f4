import { execFileSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import {
  distributionSuite,
  momentSuite,
  varSuite,
  type DistributionValues,
  type MomentValues,
  type VarValues,
} from "../support/references";
import {
  arimaSuite,
  likelihoodSuite,
  vecmSuite,
  type ArimaValues,
  type LikelihoodValues,
  type VecmValues,
} from "../support/likelihood-references";
import { responseSuite, type ResponseValues } from "../support/response-references";

/**
 * Runs R and statsmodels where they are installed and compares live. Where they are missing this says so, and with
 * COMOVE_CI=1 it fails: the committed values alone are not a live comparison.
 */
const folder = fileURLToPath(new URL("../reference/", import.meta.url));

function output(program: string, args: readonly string[]): string | null {
  try {
    return execFileSync(program, [...args], {
      encoding: "utf8",
      maxBuffer: 1e8,
      stdio: ["ignore", "pipe", "pipe"],
    });
  } catch {
    return null;
  }
}

const hasR = output("Rscript", ["--version"]) !== null;
const python = ["/usr/bin/python3", "python3"].find(
  (program) => output(program, ["-c", "import statsmodels, pandas"]) !== null,
);

function required(present: boolean, name: string): void {
  it(`${name} is at hand, or its absence is told`, () => {
    if (!present)
      console.warn(`The live comparison with ${name} did not run: ${name} is not installed here.`);
    expect(present || process.env["COMOVE_CI"] !== "1").toBe(true);
  });
}

const run = <T>(program: string, args: readonly string[]): T => JSON.parse(output(program, args)!) as T;

describe("live: R", () => {
  required(hasR, "R");
  if (!hasR) return;
  momentSuite(run<MomentValues>("Rscript", ["--vanilla", `${folder}scripts/moments.R`, `${folder}data`]));
  distributionSuite(run<DistributionValues>("Rscript", ["--vanilla", `${folder}scripts/distributions.R`]));
  arimaSuite(run<ArimaValues>("Rscript", ["--vanilla", `${folder}scripts/arima.R`, `${folder}data`]));
});

describe("live: statsmodels", () => {
  required(python !== undefined, "statsmodels");
  if (python === undefined) return;
  varSuite(run<VarValues>(python, [`${folder}scripts/var.py`, `${folder}data`]));
  responseSuite(run<ResponseValues>(python, [`${folder}scripts/responses.py`, `${folder}data`]));
  likelihoodSuite(run<LikelihoodValues>(python, [`${folder}scripts/likelihood.py`, `${folder}data`]));
  vecmSuite(run<VecmValues>(python, [`${folder}scripts/vecm.py`, `${folder}data`]));
});
