import type { Gap } from "../../core/diagnostics/figure";
import type { ResidualTest } from "../../core/diagnostics/residual-tests";
import type { Lead } from "../../core/moments/lead-lag";
import type { Root } from "../../core/var/roots";

/** Above this modulus half of a shock is left after more than 34 rows: hardly told from one that stays. */
const LASTING = 0.98;

/** What one root says about a model. */
export function rootReading({ modulus, period }: Root): string {
  const swing = period === null ? "" : period <= 2.0000001 ? "zigzag" : `swing of ${round(period)} rows`;
  if (modulus < 1e-8) return "gone at once";
  if (modulus > 1 + 1e-9)
    return swing === "" ? "grows: the forecast explodes" : `${swing} that grows: the forecast explodes`;
  if (modulus > LASTING) {
    const memory = modulus > 1 - 1e-9 ? "never fades" : `hardly fades: ${halfLeft(modulus)}`;
    return `${swing === "" ? "" : `${swing}, `}${memory}; differences may be needed`;
  }
  return swing === "" ? halfLeft(modulus) : `${swing}, ${halfLeft(modulus)}`;
}

function halfLeft(modulus: number): string {
  const rows = round(Math.log(0.5) / Math.log(modulus));
  return `half left after ${rows} ${rows === "1" ? "row" : "rows"}`;
}

/** What the closest lag of a pair says, the later series first, so that the direction cannot be mistaken. */
export function leadReading({ lag, correlation, p }: Lead, leader: string, follower: string): string {
  if (!(p < 0.05)) return "nothing that chance would not show";
  const opposite = correlation < 0;
  if (lag === 0)
    return `${follower} ${verb("move", follower)} ${opposite ? "against" : "with"} ${leader} in the same row`;
  const rows = `${lag} ${lag === 1 ? "row" : "rows"}`;
  return `${follower} ${verb("follow", follower)} ${leader} by ${rows}${opposite ? ", with opposite sign" : ""}`;
}

/** What each part of the report on residuals asks. */
export const residualQuestions: Readonly<Record<ResidualTest["question"], string>> = {
  predict: "anything left to predict?",
  spread: "does the spread change?",
  shape: "is the shape normal?",
  change: "did the equation change?",
  use: "fit to use?",
};

export const residualMethods: Readonly<Record<ResidualTest["method"], string>> = {
  portmanteau: "portmanteau",
  "small-sample": "portmanteau, few rows",
  lm: "Breusch–Godfrey LM",
  f: "Edgerton–Shukur F",
  "ljung-box": "Ljung–Box",
  arch: "ARCH LM",
  skewness: "skewness",
  kurtosis: "kurtosis",
  both: "skewness and kurtosis",
  chow: "largest Chow Wald",
  root: "largest root",
  rows: "rows per coefficient",
  conditioning: "conditioning",
};

const gapReadings: Readonly<Record<Gap, string>> = {
  rows: "too few rows for this test",
  lags: "no more lags than the model has: look further back",
  exact: "no figure: nothing is left, or some columns repeat others",
  heavy: "too large to work out here",
  "no-lags": "no lags, nothing that lasts",
  "no-coefficients": "no coefficients to judge",
  "moving-average": "not defined beside a moving average",
  untabulated: "more than 30 coefficients: no p-value known",
};

/** What one row of the report on residuals says; chance passes 5 % one time in twenty. */
export function residualReading(test: ResidualTest): string {
  const { figure } = test;
  if (figure.gap !== null) return gapReadings[figure.gap];
  if (test.question === "use") return useReading(test);
  const { bound } = figure;
  const found = figure.p === null ? bound?.side === "below" : figure.p < 0.05;
  const reading = found ? foundReading(test) : quietReadings[test.question];
  return bound === null ? reading : `${reading} (p ${bound.side} ${bound.p})`;
}

const quietReadings = {
  predict: "nothing left that the lags could predict",
  spread: "no sign that the spread changes",
  shape: "nothing against a normal shape",
  change: "no sign that the equation changed",
} as const;

function foundReading({ method, heavyTails }: ResidualTest): string {
  switch (method) {
    case "arch":
      return "spread changes with time: bands are too narrow at times, too wide at others";
    case "skewness":
      return "lopsided: bands may miss more on one side";
    case "kurtosis":
      return heavyTails
        ? "tails heavier than normal: bands may be too narrow"
        : "tails lighter than normal: bands may be too wide";
    case "both":
      return "not normal: bands may be off";
    case "chow":
      return "signs of a change: a shorter range, or a driver, may help";
    default:
      return "something is left: more lags, or steps, may help";
  }
}

function useReading({ method, figure, root }: ResidualTest): string {
  if (root !== null) return root.modulus > LASTING ? rootReading(root) : `shocks fade: ${rootReading(root)}`;
  const value = figure.statistic!;
  if (method === "rows") {
    if (value < 3) return "fewer than 3 rows per coefficient: too many lags";
    return value < 10 ? "rather few rows per coefficient" : "enough rows per coefficient";
  }
  if (value < 30) return "lags and terms are well apart";
  return value < 1000
    ? "lags and terms overlap: single coefficients are uncertain"
    : "lags and terms hardly apart: steps, or fewer terms, may help";
}

/** "trips follow", "price follows": names that end like a plural take the plural. */
const verb = (word: string, name: string): string => (/[^aisu]s$/i.test(name) ? word : `${word}s`);

const round = (value: number): string => String(Number(value.toPrecision(value < 10 ? 2 : 3)));
