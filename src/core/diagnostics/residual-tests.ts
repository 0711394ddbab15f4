import { Issue } from "../issue";
import { column, isFiniteMatrix, type Matrix } from "../matrix";
import { designOf } from "../var/design";
import type { VarModel } from "../var/model";
import { oneStep } from "../var/residuals";
import type { Root } from "../var/roots";
import { requireRows } from "../var/rows-needed";
import type { ModelRequest, Sample } from "../var/sample";
import { orderOf, type ModelSettings } from "../var/settings";
import { stepSample } from "../var/stepped";
import { archLags, archTest } from "./arch";
import { breuschGodfrey } from "./breusch-godfrey";
import { changeTests } from "./change";
import { missing, type Figure } from "./figure";
import { ljungBox } from "./ljung-box";
import { normality } from "./normality";
import { portmanteau } from "./portmanteau";
import { fitToUse } from "./use";

/** What a row of the report asks, and by which method. */
export type Method =
  | {
      readonly question: "predict";
      readonly method: "portmanteau" | "small-sample" | "lm" | "f" | "ljung-box";
    }
  | { readonly question: "spread"; readonly method: "arch" }
  | { readonly question: "shape"; readonly method: "skewness" | "kurtosis" | "both" }
  | { readonly question: "change"; readonly method: "chow" }
  | { readonly question: "use"; readonly method: "root" | "rows" | "conditioning" };

/** One row of the report. */
export type ResidualTest = Method & {
  /** The series it is about, or null for all together. */
  readonly about: number | null;
  readonly figure: Figure;
  /** What a reading needs beside the figure: the root behind it, or which way the tails differ. */
  readonly root: Root | null;
  readonly heavyTails: boolean;
};

export interface ResidualTestsRequest extends ModelRequest {
  /** One to three numbers: lags of portmanteau, LM and ARCH; those not given follow the rule. */
  readonly testLags: readonly number[];
}

/**
 * What a model's residuals say of it, question by question. Residuals are those of the model's own numbers on the
 * sample; regressors are taken from the sample.
 * @throws Issue "too-few-rows" | "too-heavy" | "too-large"
 */
export function residualTests(model: VarModel, sample: Sample, testLags: readonly number[]): ResidualTest[] {
  const { settings, series, drivers } = model;
  const stepped = stepSample(sample, settings.steps);
  const rows = stepped.y.length;
  requireRows(settings, { rows, series, drivers });
  const residuals = oneStep(model, stepped).residuals;
  if (!isFiniteMatrix(residuals)) throw new Issue({ code: "too-large" });
  const u = ofLikeSize(residuals);
  const { z } = designOf(stepped, settings, orderOf(settings));
  const order = orderOf(settings);
  const lags = {
    portmanteau: testLags[0] ?? Math.min(Math.max(10, order + 5), Math.floor(rows / 4)),
    lm: testLags[1] ?? Math.min(order + 1, 4),
    arch: testLags[2] ?? archLags(u.length, series),
  };
  const row = (method: Method, figure: Figure, about: number | null = null): ResidualTest => ({
    ...method,
    about,
    figure,
    root: null,
    heavyTails: false,
  });
  const each = Array.from({ length: series }, (_, k) => k);
  const together = portmanteau(u, lags.portmanteau, fittedFreedom(settings, series));
  const moving = settings.movingAverage > 0 ? missing("moving-average") : null;
  const past = moving ? { lm: moving, f: moving } : breuschGodfrey(u, z, lags.lm);
  const shape = normality(u, z[0].length);
  const change = moving ? each.map(() => moving) : changeTests(u, z);
  const use = fitToUse(model, z);
  return [
    row({ question: "predict", method: "portmanteau" }, together.plain),
    row({ question: "predict", method: "small-sample" }, together.smallSample),
    row({ question: "predict", method: "lm" }, past.lm),
    row({ question: "predict", method: "f" }, past.f),
    ...each.map((k) => {
      const own = ljungBox(column(u, k), lags.portmanteau, settings.lags.length);
      return row({ question: "predict", method: "ljung-box" }, own, k);
    }),
    row({ question: "spread", method: "arch" }, archTest(u, lags.arch)),
    row({ question: "shape", method: "skewness" }, shape.skewness),
    { ...row({ question: "shape", method: "kurtosis" }, shape.kurtosis), heavyTails: shape.heavyTails },
    row({ question: "shape", method: "both" }, shape.both),
    ...each.map((k) => row({ question: "change", method: "chow" }, change[k], k)),
    { ...row({ question: "use", method: "root" }, use.root), root: use.largest },
    row({ question: "use", method: "rows" }, use.rowsPerCoefficient),
    row({ question: "use", method: "conditioning" }, use.conditioning),
  ];
}

/** Degrees of freedom that the lags use up: K²|L| + K²q_ma; K²(p − 1) + K·r + K²q_ma with r long-run relations. */
function fittedFreedom(settings: ModelSettings, series: number): number {
  const { lags, longRun, movingAverage } = settings;
  const free =
    longRun === null ? series * lags.length : series * Math.max(0, orderOf(settings) - 1) + longRun;
  return series * (free + series * movingAverage);
}

/** Every column divided by its own largest entry: no test minds, and no product runs out of range. */
function ofLikeSize(u: Matrix): Matrix {
  const tops = u[0].map((_, k) => u.reduce((top, row) => Math.max(top, Math.abs(row[k])), 0) || 1);
  return u.map((row) => row.map((v, k) => v / tops[k]));
}
