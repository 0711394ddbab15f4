import { Issue } from "../issue";
import { multiply, transpose } from "../linalg";
import type { Matrix, MutableMatrix } from "../matrix";
import { randomSource } from "../random";
import { regressorRow } from "../var/design";
import { innovationRoot } from "../var/innovation-root";
import type { VarModel } from "../var/model";
import { predictRow } from "../var/residuals";
import { largestRoot } from "../var/roots";
import { orderOf } from "../var/settings";
import { stationaryMean } from "../var/stationary-mean";
import { termRow } from "../var/terms";
import { requireFinite } from "./finite";

export interface SimulateRequest {
  readonly model: VarModel;
  readonly rows: number;
  /** Rows before the first one drawn, at least p of them; null for the stationary state. */
  readonly start: Matrix | null;
  readonly seed: number;
}

/** Rows drawn and thrown away, so that what is kept no longer remembers how it began. */
export const BURN_IN = 200;

/**
 * One draw of the model on the stepped scale: normal innovations R·z, z from the seed, t = 1 at the first row kept.
 * Without rows to start from it begins at the mean that the terms imply and throws the first 200 rows away.
 * @returns rows×K
 * @throws Issue "start-needed" for an unstable model | "block-needs-rows" | "drivers-not-here" | "too-large"
 */
export function simulate({ model, rows, start, seed }: SimulateRequest): Matrix {
  if (model.drivers > 0) throw new Issue({ code: "drivers-not-here", call: "SIMULATE" });
  const order = orderOf(model.settings);
  const root = innovationRoot(model);
  const mixing = transpose(root);
  const burnIn = start === null ? BURN_IN : 0;
  const history: MutableMatrix = (start === null ? settled(model, order) : lastRows(start, order)).map(
    (row) => [...row],
  );
  const { normal } = randomSource(seed);
  const innovations: Matrix[number][] = history.map((row) => row.map(() => 0));
  for (let at = order; at < order + burnIn + rows; at++) {
    const z = regressorRow(model.regressors, {
      history,
      drivers: [],
      start: 1 - order - burnIn,
      cycle: model.settings.cycle,
      at,
      innovations,
    });
    const [shock] = multiply([root.map(() => normal())], mixing);
    innovations.push(shock);
    history.push(predictRow(model.coefficients, z, model.series).map((v, k) => v + shock[k]));
  }
  return requireFinite(history.slice(order + burnIn));
}

function lastRows(start: Matrix, order: number): Matrix {
  if (start.length < order) throw new Issue({ code: "block-needs-rows", order, rows: start.length });
  return order === 0 ? [] : start.slice(-order);
}

/** The p rows of the mean just before the burn-in. */
function settled(model: VarModel, order: number): Matrix {
  const modulus = largestRoot(model);
  if (modulus > 1 - 1e-9) throw new Issue({ code: "start-needed", modulus });
  const mean = stationaryMean(model);
  return Array.from({ length: order }, (_, i) => {
    const terms = termRow(model.settings, 1 - BURN_IN - order + i);
    return mean.length === 0 ? new Array<number>(model.series).fill(0) : multiply([terms], mean)[0];
  });
}
