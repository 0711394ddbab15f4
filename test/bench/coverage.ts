/**
 * How often bands of a stated coverage hold what comes: simulated series, the last rows held back.
 * `npx tsx test/bench/coverage.ts` writes test/bench/coverage.json; with a word after it, only the designs with that word in their
 * names are run again. The design and its seeds were fixed, and committed,
 * before the first run; the test is whether the designs called `promised` come out between 88 and 92 of 100.
 */
import { writeFileSync } from "node:fs";
import { forecastBands, type Bands, type BandsKind, type BandsRequest } from "../../src/core/forecast/bands";
import { forecastPath } from "../../src/core/forecast/path";
import { redrawnPaths } from "../../src/core/forecast/redraw";
import { cellLimits, jointLimits, type Limits } from "../../src/core/forecast/redrawn-bands";
import { stepSample } from "../../src/core/var/stepped";
import { innovationRoot } from "../../src/core/var/innovation-root";
import { Issue } from "../../src/core/issue";
import type { Matrix } from "../../src/core/matrix";
import { randomSource, type RandomSource } from "../../src/core/random";
import { fitModel } from "../../src/core/var/fit";
import { regressorsOf, type Regressor } from "../../src/core/var/regressors";
import type { VarModel } from "../../src/core/var/model";
import { modelWith } from "../support/models";
import recorded from "./coverage.json";
import { sampleOf, settingsOfOrder } from "../support/requests";

const SERIES = 2000;
const DRAWS = 1000;
const COVERAGE = 0.9;
const HORIZON = 8;
const BURN_IN = 300;
const FIRST_SEED = 20_261_201;

interface Design {
  readonly name: string;
  readonly promised: boolean;
  readonly rows: number;
  readonly model: VarModel;
  readonly shape: "normal" | "exponential";
  /** Kinds of bands to try: all three unless said. */
  readonly kinds?: readonly BandsKind[];
  /** Share of cells that are blanked out, at random. */
  readonly missing?: number;
}

/** Two series, two lags, a constant; largest root 0.82, innovations correlated at 0.5. */
const moderate = modelWith(
  [[[0.5, 0.2], [0.1, 0.4]], [[0.1, 0], [0.15, 0.1]]],
  [[1, 1], [1, 4]],
  { terms: [[2, 5]] },
); // prettier-ignore

/** Two series, one lag, largest root 0.97: estimates of such roots come out too small in short samples. */
const slow = modelWith([[[0.97, 0.0], [0.2, 0.5]]], [[1, 0.3], [0.3, 1]], { terms: [[0.1, 1]] }); // prettier-ignore

/** The moderate one again, fitted by likelihood. */
const byLikelihood: VarModel = { ...moderate, settings: { ...moderate.settings, fit: "likelihood" } };

/** Two series, one lag and a moving average, fitted by likelihood. */
const moving: VarModel = movingAverageModel();

/** Two series that wander and keep near each other: one long-run relation, pulled back by 0.3 and 0.1 a row. */
const related: VarModel = {
  ...modelWith([[[0.7, 0.3], [0.1, 0.9]]], [[1, 0.3], [0.3, 1]], { terms: [[0.1, 0.1]] }),
}; // prettier-ignore
const relatedFit: VarModel = { ...related, settings: { ...related.settings, longRun: 1 } };

const designs: readonly Design[] = [
  { name: "moderate memory, 150 rows, normal", promised: true, rows: 150, model: moderate, shape: "normal" },
  {
    name: "moderate memory, 150 rows, skewed",
    promised: false,
    rows: 150,
    model: moderate,
    shape: "exponential",
  },
  { name: "long memory, 60 rows, normal", promised: false, rows: 60, model: slow, shape: "normal" },
  {
    name: "moderate memory, 150 rows, normal, one cell in ten missing, by likelihood",
    promised: true,
    rows: 150,
    model: byLikelihood,
    shape: "normal",
    kinds: ["known", "fitted"],
    missing: 0.1,
  },
  {
    name: "a lag and a moving average, 150 rows, normal, by likelihood",
    promised: true,
    rows: 150,
    model: moving,
    shape: "normal",
    kinds: ["known", "fitted"],
  },
  {
    name: "one long-run relation, 150 rows, normal",
    promised: false,
    rows: 150,
    model: relatedFit,
    shape: "normal",
    kinds: ["known"],
  },
];

function movingAverageModel(): VarModel {
  const settings = settingsOfOrder(2, 1, { fit: "likelihood", movingAverage: 1 });
  return {
    ...moderate,
    settings,
    regressors: regressorsOf(settings, 2, 0),
    coefficients: [[2, 5], [0.6, 0.2], [0.1, 0.5], [0.4, 0], [-0.3, 0.3]],
  }; // prettier-ignore
}

/** Mean 0 and variance 1; the exponential one has skewness 2. */
const innovation = (random: RandomSource, shape: Design["shape"]): number =>
  shape === "normal" ? random.normal() : -Math.log(random.uniform()) - 1;

function invented({ model, rows, shape }: Design, seed: number): number[][] {
  const random = randomSource(seed);
  const root = innovationRoot(model);
  const { series, coefficients, regressors } = model;
  const y: number[][] = [[], []].map(() => new Array<number>(series).fill(0));
  const innovations: number[][] = y.map((row) => [...row]);
  while (y.length < BURN_IN + rows + HORIZON) {
    const shocks = root.map(() => innovation(random, shape));
    const u = root.map((line) => line.reduce((sum, v, j) => sum + v * shocks[j], 0));
    const value = (r: Regressor) =>
      r.kind === "lag"
        ? y[y.length - r.lag][r.series]
        : r.kind === "innovation"
          ? innovations[y.length - r.lag][r.series]
          : 1;
    y.push(u.map((v, k) => regressors.reduce((sum, r, i) => sum + coefficients[i][k] * value(r), v)));
    innovations.push(u);
  }
  return y.slice(BURN_IN);
}

/** Limits cell by cell and joint ones; redrawn, both from the same paths, as they are for the same seed. */
function limitsOf(request: BandsRequest): readonly [Limits, Limits] {
  if (request.bands !== "redrawn") {
    const at = (joint: boolean) => forecastBands({ ...request, joint }) as Bands;
    return [at(false), at(true)];
  }
  const model = fitModel(request);
  const stepped = stepSample(request.sample, model.settings.steps);
  const paths = [...redrawnPaths(model, stepped, request)];
  const level = forecastPath(model, stepped, HORIZON).forecast;
  return [cellLimits(paths, COVERAGE), jointLimits(paths, level, COVERAGE)];
}

/** Cells taken away at random, from a source of their own. */
function blanked(x: Matrix, share: number, seed: number): Matrix {
  if (share === 0) return x;
  const random = randomSource(seed);
  return x.map((row) => row.map((v) => (random.uniform() < share ? NaN : v)));
}

const holds = ({ low, high }: Limits, came: Matrix) =>
  came.map((row, j) => row.map((v, k) => v >= low[j][k] && v <= high[j][k]));

function limitsOrNone(request: BandsRequest): readonly [Limits, Limits] | null {
  try {
    return limitsOf(request);
  } catch (thrown) {
    if (thrown instanceof Issue) return null;
    throw thrown;
  }
}

interface Count {
  readonly inside: number[];
  whole: number;
  /** Series for which the fit was refused; the figures are those of the others. */
  refused: number;
}

function count(design: Design, bands: BandsKind, at: number): Count {
  const total: Count = { inside: new Array<number>(HORIZON).fill(0), whole: 0, refused: 0 };
  for (let i = 0; i < SERIES; i++) {
    const whole = invented(design, FIRST_SEED + at * SERIES + i);
    const sample = sampleOf(blanked(whole.slice(0, design.rows), design.missing ?? 0, i));
    const request: BandsRequest = {
      sample,
      plan: { kind: "fit", settings: design.model.settings },
      horizon: HORIZON,
      point: "median",
      coverage: COVERAGE,
      joint: false,
      bands,
      draws: DRAWS,
      seed: 1 + i,
    };
    const came = whole.slice(design.rows);
    const limits = limitsOrNone(request);
    if (limits === null) {
      total.refused++;
      continue;
    }
    const [single, joint] = limits;
    holds(single, came).forEach((row, j) => (total.inside[j] += row.filter(Boolean).length));
    if (holds(joint, came).every((row) => row.every(Boolean))) total.whole++;
  }
  return total;
}

const per100 = (share: number): number => Math.round(share * 10_000) / 100;
const only = process.argv[2] ?? "";
const results = designs.flatMap((design, at) => {
  const before = recorded.results.filter((result) => result.design === design.name);
  return design.name.includes(only) ? run(design, at) : before;
});

function run(design: Design, at: number) {
  return (design.kinds ?? (["known", "fitted", "redrawn"] as const)).map((bands) => {
    const { inside, whole, refused } = count(design, bands, at);
    const counted = SERIES - refused;
    const each = inside.map((v) => v / (counted * design.model.series));
    const result = {
      design: design.name,
      promised: design.promised,
      bands,
      "inside, rows 1 to 8 ahead": each.map(per100),
      "inside, all rows": per100(each.reduce((sum, v) => sum + v, 0) / HORIZON),
      "whole path inside joint bands": per100(whole / counted),
      refused,
    };
    console.log(JSON.stringify(result));
    return result;
  });
}
writeFileSync(
  new URL("coverage.json", import.meta.url),
  `${JSON.stringify(
    {
      provenance: { kind: "simulation", script: "test/bench/coverage.ts", seed: FIRST_SEED },
      series: SERIES,
      draws: DRAWS,
      nominal: 100 * COVERAGE,
      results,
    },
    null,
    2,
  )}\n`,
);
