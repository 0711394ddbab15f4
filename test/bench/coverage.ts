/**
 * How often bands of a stated coverage hold what comes: simulated series, the last rows held back.
 * `npx tsx test/bench/coverage.ts` writes test/bench/coverage.json. The design and its seeds were fixed, and committed,
 * before the first run; the test is whether the designs called `promised` come out between 88 and 92 of 100.
 */
import { writeFileSync } from "node:fs";
import { forecastBands, type Bands, type BandsKind, type BandsRequest } from "../../src/core/forecast/bands";
import { forecastPath } from "../../src/core/forecast/path";
import { redrawnPaths } from "../../src/core/forecast/redraw";
import { cellLimits, jointLimits, type Limits } from "../../src/core/forecast/redrawn-bands";
import { stepSample } from "../../src/core/var/stepped";
import { innovationRoot } from "../../src/core/var/innovation-root";
import type { Matrix } from "../../src/core/matrix";
import { randomSource, type RandomSource } from "../../src/core/random";
import { fitModel } from "../../src/core/var/fit";
import type { VarModel } from "../../src/core/var/model";
import { modelWith } from "../support/models";
import { sampleOf } from "../support/requests";

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
}

/** Two series, two lags, a constant; largest root 0.82, innovations correlated at 0.5. */
const moderate = modelWith(
  [[[0.5, 0.2], [0.1, 0.4]], [[0.1, 0], [0.15, 0.1]]],
  [[1, 1], [1, 4]],
  { terms: [[2, 5]] },
); // prettier-ignore

/** Two series, one lag, largest root 0.97: estimates of such roots come out too small in short samples. */
const slow = modelWith([[[0.97, 0.0], [0.2, 0.5]]], [[1, 0.3], [0.3, 1]], { terms: [[0.1, 1]] }); // prettier-ignore

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
];

/** Mean 0 and variance 1; the exponential one has skewness 2. */
const innovation = (random: RandomSource, shape: Design["shape"]): number =>
  shape === "normal" ? random.normal() : -Math.log(random.uniform()) - 1;

function invented({ model, rows, shape }: Design, seed: number): number[][] {
  const random = randomSource(seed);
  const root = innovationRoot(model);
  const { series, coefficients, regressors } = model;
  const y: number[][] = [[], []].map(() => new Array<number>(series).fill(0));
  while (y.length < BURN_IN + rows + HORIZON) {
    const shocks = root.map(() => innovation(random, shape));
    y.push(
      root.map((line, k) =>
        regressors.reduce(
          (sum, r, i) => sum + coefficients[i][k] * (r.kind === "lag" ? y[y.length - r.lag][r.series] : 1),
          line.reduce((sum, v, j) => sum + v * shocks[j], 0),
        ),
      ),
    );
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

const holds = ({ low, high }: Limits, came: Matrix) =>
  came.map((row, j) => row.map((v, k) => v >= low[j][k] && v <= high[j][k]));

interface Count {
  readonly inside: number[];
  whole: number;
}

function count(design: Design, bands: BandsKind, at: number): Count {
  const total: Count = { inside: new Array<number>(HORIZON).fill(0), whole: 0 };
  for (let i = 0; i < SERIES; i++) {
    const whole = invented(design, FIRST_SEED + at * SERIES + i);
    const sample = sampleOf(whole.slice(0, design.rows));
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
    const [single, joint] = limitsOf(request);
    holds(single, came).forEach((row, j) => (total.inside[j] += row.filter(Boolean).length));
    if (holds(joint, came).every((row) => row.every(Boolean))) total.whole++;
  }
  return total;
}

const per100 = (share: number): number => Math.round(share * 10_000) / 100;
const results = designs.flatMap((design, at) =>
  (["known", "fitted", "redrawn"] as const).map((bands) => {
    const { inside, whole } = count(design, bands, at);
    const each = inside.map((v) => v / (SERIES * design.model.series));
    const result = {
      design: design.name,
      promised: design.promised,
      bands,
      "inside, rows 1 to 8 ahead": each.map(per100),
      "inside, all rows": per100(each.reduce((sum, v) => sum + v, 0) / HORIZON),
      "whole path inside joint bands": per100(whole / SERIES),
    };
    console.log(JSON.stringify(result));
    return result;
  }),
);
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
