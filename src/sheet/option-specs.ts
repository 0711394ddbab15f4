import type { Allowed } from "../core/issue";
import type { Divisor } from "../core/moments/lag-covariance";
import type { Point } from "../core/forecast/ahead";
import type { BandsKind } from "../core/forecast/bands";
import type { Shock } from "../core/forecast/responses";
import { LARGEST_SEED } from "../core/random";
import type { StepPlan } from "../core/prepare/steps";
import type { Criterion, FitMethod, Terms } from "../core/var/settings";
import { parseSteps } from "./steps-text";

/** What each option holds once read. `null` is the word none (or all, for the lags). */
export interface OptionValues {
  readonly fit: FitMethod;
  readonly terms: Terms;
  readonly cycle: number | null;
  readonly waves: number | null;
  readonly start: number;
  readonly uselags: readonly number[] | null;
  /** As written: one list, or one per series. */
  readonly steps: StepPlan;
  /** Long-run relations, null for an unrestricted fit. */
  readonly longrun: number | null;
  readonly ma: number;
  readonly gaps: "refuse" | "allow";
  readonly pull: number;
  readonly fade: number;
  readonly criterion: Criterion;
  readonly maxorder: number;
  readonly coverage: number;
  readonly bands: BandsKind;
  readonly joint: "no" | "yes";
  readonly point: Point;
  readonly testlags: readonly number[];
  readonly adjust: "no" | "yes";
  readonly spare: number;
  readonly draws: number;
  readonly seed: number;
  readonly shock: Shock;
  readonly divisor: Divisor;
  readonly labels: "auto" | "yes" | "no";
}

export type OptionKey = keyof OptionValues;

/** How one option is read: `parse` answers undefined for a value that is not allowed. */
interface OptionSpec<T> {
  readonly allowed: Allowed;
  parse(text: string): T | undefined;
}

/** A number with a decimal point or a decimal comma. */
export function parseNumber(text: string): number | undefined {
  if (!/^[+-]?(\d+([.,]\d*)?|[.,]\d+)(e[+-]?\d+)?$/i.test(text)) return undefined;
  const value = Number(text.replace(",", "."));
  return Number.isFinite(value) ? value : undefined;
}

const choice = <T extends string>(...values: readonly T[]): OptionSpec<T> => ({
  allowed: { kind: "one-of", values },
  parse: (text) => values.find((value) => value === text.toLowerCase()),
});

const whole = (from: number, to: number | null = null): OptionSpec<number> => ({
  allowed: { kind: "whole", from, to },
  parse: (text) => {
    const value = parseNumber(text);
    return value !== undefined && Number.isSafeInteger(value) && value >= from && (to === null || value <= to)
      ? value
      : undefined;
  },
});

const between = (above: number, below: number | null): OptionSpec<number> => ({
  allowed: { kind: "number", above, below },
  parse: (text) => {
    const value = parseNumber(text);
    return value !== undefined && value > above && (below === null || value < below) ? value : undefined;
  },
});

const from = (least: number): OptionSpec<number> => ({
  allowed: { kind: "number-from", from: least },
  parse: (text) => {
    const value = parseNumber(text);
    return value !== undefined && value >= least ? value : undefined;
  },
});

const orNone = <T>(spec: OptionSpec<T>, word = "none"): OptionSpec<T | null> => ({
  allowed: spec.allowed,
  parse: (text) => (text.toLowerCase() === word ? null : spec.parse(text)),
});

const lagList: OptionSpec<readonly number[]> = {
  allowed: { kind: "list", of: "lags" },
  parse: (text) => {
    const lags = text.split(/[\s,]+/).map((word) => (/^\d{1,6}$/.test(word) ? Number(word) : 0));
    const rising = [...new Set(lags)].sort((a, b) => a - b);
    return rising[0] >= 1 && rising.length === lags.length ? rising : undefined;
  },
};

const testLags: OptionSpec<readonly number[]> = {
  allowed: { kind: "list", of: "test lags" },
  parse: (text) => {
    const lags = text.split(/[\s,]+/).map((word) => (/^\d{1,6}$/.test(word) ? Number(word) : 0));
    return lags.length <= 3 && lags.every((lag) => lag >= 1) ? lags : undefined;
  },
};

const stepLists: OptionSpec<StepPlan> = {
  allowed: { kind: "list", of: "steps" },
  parse: (text) => parseSteps(text) ?? undefined,
};

/** Every option there is. Which of them apply is stated at each call. */
export const OPTIONS: { readonly [K in OptionKey]: OptionSpec<OptionValues[K]> } = {
  fit: choice("least-squares", "yule-walker", "nuttall-strand", "likelihood", "shrinkage"),
  terms: choice("constant", "none", "trend", "quadratic", "inside-constant", "inside-trend"),
  cycle: orNone(whole(2, 100_000)),
  waves: orNone(whole(1)),
  start: whole(1, 10_000_000),
  uselags: orNone(lagList, "all"),
  steps: stepLists,
  longrun: orNone(whole(0)),
  ma: whole(0, 1000),
  gaps: choice("refuse", "allow"),
  pull: between(0, null),
  fade: from(0),
  criterion: choice("aicc", "aic", "bic", "hq"),
  maxorder: whole(0, 10_000),
  coverage: between(0, 1),
  bands: choice("fitted", "known", "redrawn"),
  joint: choice("no", "yes"),
  point: choice("median", "mean"),
  testlags: testLags,
  adjust: choice("no", "yes"),
  spare: whole(0, 1000),
  draws: whole(20, 100_000),
  seed: whole(0, LARGEST_SEED),
  shock: choice("orthogonal", "unit", "generalised"),
  divisor: choice("n", "n-k"),
  labels: choice("auto", "yes", "no"),
};
