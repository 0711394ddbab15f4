/**
 * Seconds of fits by likelihood beside those of statsmodels in the same run: `npx tsx test/bench/likelihood-speed.ts`.
 * Median of seven after three to warm up; statsmodels once, as its compiled filter needs no warming.
 */
import { execFileSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { likelihoodAt } from "../../src/core/var/likelihood";
import { likelihoodProblem } from "../../src/core/var/likelihood-fit";
import type { Matrix } from "../../src/core/matrix";
import { fitModel } from "../../src/core/var/fit";
import { readCsv } from "../support/data";
import { sampleOf, settingsOfOrder } from "../support/requests";

const at = (file: string) => fileURLToPath(new URL(file, import.meta.url));
const theirs = JSON.parse(
  execFileSync("/usr/bin/python3", [at("likelihood-speed.py"), at("../reference/data")], {
    encoding: "utf8",
  }),
) as Record<string, { seconds: number; logLikelihood: number }>;

const levels = readCsv("macrodata.csv", ["realgdp", "realcons", "realinv"]).map((row) => row.map(Math.log));
const growth = levels.slice(1).map((row, t) => row.map((v, k) => 100 * (v - levels[t][k])));
const fits: readonly (readonly [string, Matrix, number, number])[] = [
  ["one series, a lag and a moving average", readCsv("LakeHuron.csv", ["LakeHuron"]), 1, 1],
  ["three series, two lags", growth, 2, 0],
];

for (const [name, y, order, movingAverage] of fits) {
  const sample = sampleOf(y);
  const settings = settingsOfOrder(y[0].length, order, { fit: "likelihood", movingAverage });
  const times = Array.from({ length: 10 }, () => {
    const begun = performance.now();
    fitModel({ sample, plan: { kind: "fit", settings } });
    return (performance.now() - begun) / 1000;
  }).slice(3);
  const ours = times.sort((a, b) => a - b)[3];
  const model = fitModel({ sample, plan: { kind: "fit", settings } });
  const { data, coordinates, mix } = likelihoodProblem(sample, settings, model);
  const varma = coordinates.varma(new Float64Array(coordinates.size));
  // the likelihood of mixed series is that of the series times the determinant of the mix
  const scale = mix.reduce((sum, row, k) => sum + Math.log(row[k]), 0) * y.length;
  const reached = likelihoodAt(data, varma, null)!.logLikelihood - scale;
  const { seconds, logLikelihood } = theirs[name];
  console.log(
    `${name}: ${ours.toFixed(3)} s against ${seconds.toFixed(3)} s, ratio ${(ours / seconds).toFixed(3)}; ` +
      `log-likelihood ${reached.toFixed(6)} against ${logLikelihood.toFixed(6)}`,
  );
}
