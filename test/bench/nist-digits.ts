/**
 * Correct digits on the NIST reference problems, as a markdown table; written between the markers of DEVELOPERS.md
 * where they stand. Run with `npx tsx test/bench/nist-digits.ts`.
 */
import { format } from "prettier";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
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

const shown = (value: number): string => (Math.floor(value * 10) / 10).toFixed(1);

const univariate = UNIVARIATE.map((name) => {
  const problem = readUnivariate(name);
  return `| ${name} | ${problem.values.length} | ${shown(digits(lagOne(problem), problem.certified))} |`;
});

const regressions = REGRESSIONS.map((name) => {
  const problem = readProblem(name);
  const { coefficients, errors, spread } = solveProblem(problem);
  return `| ${name} | ${problem.y.length} | ${coefficients.length} | ${shown(fewestDigits(coefficients, problem.certified))} | ${shown(fewestDigits(errors, problem.certifiedErrors))} | ${shown(digits(spread, problem.certifiedSpread))} |`;
});

const table = [
  "Correct significant digits (−log10 of the relative error, of a set the fewest, at most the 15 certified).",
  "",
  "| least squares | rows | coefficients | digits of coefficients | of standard errors | of residual st dev |",
  "| --- | --- | --- | --- | --- | --- |",
  ...regressions,
  "",
  "| lag-1 autocorrelation | rows | digits |",
  "| --- | --- | --- |",
  ...univariate,
].join("\n");

console.log(table);

const OPEN = "<!-- nist-digits -->";
const CLOSE = "<!-- /nist-digits -->";
const guide = new URL("../../DEVELOPERS.md", import.meta.url);
if (existsSync(guide)) {
  const text = readFileSync(guide, "utf8");
  const from = text.indexOf(OPEN);
  const to = text.indexOf(CLOSE);
  if (from >= 0 && to > from) {
    const written = `${text.slice(0, from + OPEN.length)}\n\n${table}\n\n${text.slice(to)}`;
    writeFileSync(guide, await format(written, { parser: "markdown", printWidth: 110 }));
  } else console.error(`DEVELOPERS.md has no ${OPEN} … ${CLOSE} to write between.`);
}
