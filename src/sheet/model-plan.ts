import { Issue } from "../core/issue";
import type { ModelPlan } from "../core/var/sample";
import {
  allLags,
  DEFAULT_FADE,
  DEFAULT_PULL,
  isInside,
  isSubset,
  orderOf,
  type FitMethod,
  type ModelSettings,
  type Shape,
} from "../core/var/settings";
import { requireOrder, type Extent } from "../core/var/rows-needed";
import { planLoss, type StepPlan } from "../core/prepare/steps";
import { describeCell, toCells, type Cell } from "./cell";
import type { OptionKey } from "./option-specs";
import type { Options } from "./options";
import { readModelBlock, type ModelBlock } from "./model-block";
import { isTag, settingsText } from "./model-tag";
import type { DriverBlock, SeriesBlock } from "./grid";
import { formatSteps, spreadSteps } from "./steps-text";

/** The option keys that describe a model and are kept in its block. */
export const SETTING_KEYS = [
  "fit",
  "terms",
  "cycle",
  "waves",
  "uselags",
  "steps",
  "longrun",
  "ma",
  "pull",
  "fade",
] as const satisfies readonly OptionKey[];
/** The keys that choose an order. */
export const CHOICE_KEYS = ["criterion", "maxorder"] as const satisfies readonly OptionKey[];
/** Every key that a call with a model takes. */
export const MODEL_KEYS = [...SETTING_KEYS, "start", ...CHOICE_KEYS] as const satisfies readonly OptionKey[];

/** Fits from the moments of the series alone: an outside series has no place in them. */
const MOMENT_FITS: readonly FitMethod[] = ["yule-walker", "nuttall-strand"];

/** The model argument as it was written. */
export type ModelArgument =
  | { readonly kind: "auto" }
  | { readonly kind: "order"; readonly order: number }
  | { readonly kind: "block"; readonly block: ModelBlock };

/** @throws Issue "bad-argument" | "model-block" */
export function readModelArgument(raw: unknown): ModelArgument {
  const cells = toCells(raw);
  if (cells === null) return { kind: "auto" };
  const single = cells.length === 1 && cells[0].length === 1;
  if (!single || isTag(cells[0][0])) return { kind: "block", block: readModelBlock(cells) };
  return readSingle(cells[0][0]);
}

function readSingle(cell: Cell): ModelArgument {
  if (typeof cell === "string" && cell.trim().toLowerCase() === "auto") return { kind: "auto" };
  if (typeof cell === "number" && Number.isSafeInteger(cell) && cell >= 0)
    return { kind: "order", order: cell };
  throw new Issue({
    code: "bad-argument",
    argument: "model",
    found: describeCell(cell),
    allowed: { kind: "one-of", values: ["blank", "auto", "a whole number", "a model block"] },
  });
}

/** The model argument where only a block will do. @throws Issue "missing-argument" | "block-needed" | "model-block" */
export function readBlockArgument(raw: unknown): ModelBlock {
  const cells = toCells(raw);
  if (cells === null) throw new Issue({ code: "missing-argument", argument: "model" });
  const argument = readModelArgument(raw);
  if (argument.kind !== "block") throw new Issue({ code: "block-needed", found: describeCell(cells[0][0]) });
  return argument.block;
}

/** How a call uses a block: its numbers as they stand, or its settings with the coefficients estimated anew. */
export type BlockUse = "numbers" | "settings";

/**
 * Joins the model argument, the options and the series into one plan, and refuses what contradicts.
 * @throws Issue "options-clash" | "option-needs" | "fit-without-drivers" | "option-against-block" | "block-names" | "block-drivers" | …
 */
export function planModel(
  argument: ModelArgument,
  options: Options,
  { series, drivers }: { readonly series: SeriesBlock; readonly drivers: DriverBlock },
  use: BlockUse,
): ModelPlan {
  if (argument.kind === "block") return planFromBlock(argument.block, options, series, drivers, use);
  const shape = readShape(options, series.names.length);
  if (drivers.names.length > 0 && MOMENT_FITS.includes(shape.fit))
    throw new Issue({ code: "fit-without-drivers", fit: shape.fit });
  if (argument.kind === "auto" && !options.uselags) {
    return {
      kind: "auto",
      shape,
      criterion: options.criterion ?? "aicc",
      maxOrder: options.maxorder ?? null,
    };
  }
  for (const key of CHOICE_KEYS) {
    if (options[key] !== undefined)
      throw new Issue({ code: "options-clash", key, other: options.uselags ? "uselags" : "order" });
  }
  const order = argument.kind === "order" ? argument.order : options.uselags!.at(-1)!;
  if (options.uselags && options.uselags.at(-1) !== order) {
    throw new Issue({ code: "options-clash", key: "uselags", other: "order" });
  }
  if (options.uselags && isSubset(options.uselags)) refuseSubset(shape);
  if (shape.longRun !== null && order === 0) throw new Issue({ code: "longrun-needs-lag" });
  if (options.uselags) return { kind: "fit", settings: { ...shape, lags: options.uselags } };
  requireOrder(shape, order, extentOf(shape, series, drivers));
  return { kind: "fit", settings: { ...shape, lags: allLags(order) } };
}

/** The settings other than the order, from the options. @throws Issue "option-needs" | "bad-option" | "steps-count" */
export function readShape(options: Options, series: number): Shape {
  const cycle = options.cycle ?? null;
  const waves = options.waves ?? null;
  if (waves !== null && cycle === null)
    throw new Issue({ code: "option-needs", key: "waves", needs: "cycle" });
  if (waves !== null && waves > cycle! / 2) {
    const to = Math.floor(cycle! / 2);
    throw new Issue({
      code: "bad-option",
      key: "waves",
      found: String(waves),
      allowed: { kind: "whole", from: 1, to },
    });
  }
  const fit = options.fit ?? "least-squares";
  const terms = options.terms ?? "constant";
  const needs = (key: OptionKey, wanted: boolean, beside: string) => {
    if (wanted) throw new Issue({ code: "option-needs", key, needs: beside });
  };
  for (const key of ["pull", "fade"] as const)
    needs(key, options[key] !== undefined && fit !== "shrinkage", "fit=shrinkage");
  needs("ma", (options.ma ?? 0) > 0 && fit !== "likelihood", "fit=likelihood");
  const longRun = options.longrun ?? null;
  needs("longrun", longRun !== null && fit !== "least-squares", "fit=least-squares");
  needs("terms", isInside(terms) && longRun === null, "longrun");
  if (longRun !== null && longRun > series)
    throw new Issue({
      code: "bad-option",
      key: "longrun",
      found: String(longRun),
      allowed: { kind: "whole", from: 0, to: series },
    });
  return {
    fit,
    terms,
    cycle,
    waves,
    steps: readPlan(options.steps ?? [[]], series),
    longRun,
    movingAverage: options.ma ?? 0,
    pull: options.pull ?? DEFAULT_PULL,
    fade: options.fade ?? DEFAULT_FADE,
  };
}

/** @throws Issue "fit-all-lags" where lags cannot be left out */
function refuseSubset({ fit, longRun }: Shape): void {
  if (longRun !== null) throw new Issue({ code: "fit-all-lags", fit: "longrun" });
  if (fit === "nuttall-strand") throw new Issue({ code: "fit-all-lags", fit });
}

/** What is there to fit on once the steps have used up their rows. @throws Issue "steps-leave-nothing" */
export function extentOf(shape: Shape, series: SeriesBlock, drivers: DriverBlock): Extent {
  const [lost, rows] = [planLoss(shape.steps), series.rows.length];
  if (lost >= rows) throw new Issue({ code: "steps-leave-nothing", lost, rows });
  return { rows: rows - lost, series: series.names.length, drivers: drivers.names.length };
}

/** @throws Issue "steps-count" */
export function readPlan(lists: StepPlan, series: number): StepPlan {
  const plan = spreadSteps(lists, series);
  if (plan === null) throw new Issue({ code: "steps-count", have: lists.length, series });
  return plan;
}

function planFromBlock(
  { model, names }: ModelBlock,
  options: Options,
  series: SeriesBlock,
  drivers: DriverBlock,
  use: BlockUse,
): ModelPlan {
  refuseContradiction(options, model.settings, model.series);
  if (names.series.join("\n") !== series.names.join("\n")) {
    throw new Issue({ code: "block-names", block: names.series, series: series.names });
  }
  if (names.drivers.join("\n") !== drivers.names.join("\n")) {
    throw new Issue({ code: "block-drivers", block: names.drivers, drivers: drivers.names });
  }
  return use === "numbers" ? { kind: "given", model } : { kind: "fit", settings: model.settings };
}

/** A setting repeated beside a block is welcome; a different one is refused, and so is a choice of order. */
function refuseContradiction(options: Options, settings: ModelSettings, series: number): void {
  const block: Record<(typeof SETTING_KEYS)[number], string> = {
    fit: settings.fit,
    terms: settings.terms,
    cycle: String(settings.cycle ?? "none"),
    waves: String(settings.waves ?? "none"),
    uselags: settings.lags.join(" "),
    steps: formatSteps(settings.steps),
    longrun: String(settings.longRun ?? "none"),
    ma: String(settings.movingAverage),
    pull: String(settings.pull),
    fade: String(settings.fade),
  };
  for (const key of SETTING_KEYS) {
    if (options[key] === undefined) continue;
    const found = settingText(key, options, settings, series);
    if (found !== block[key])
      throw new Issue({ code: "option-against-block", key, found, block: settingsText(settings) });
  }
  for (const key of CHOICE_KEYS) {
    if (options[key] !== undefined) throw new Issue({ code: "options-clash", key, other: "block" });
  }
}

function settingText(
  key: (typeof SETTING_KEYS)[number],
  options: Options,
  settings: ModelSettings,
  series: number,
): string {
  if (key === "uselags") return (options.uselags ?? allLags(orderOf(settings))).join(" ");
  if (key === "steps") return formatSteps(readPlan(options.steps!, series));
  return String(options[key] ?? "none");
}

/** Position of the first row for trend and season: the call's own, else what the block was fitted with. */
export const startOf = (options: Options, argument: ModelArgument): number =>
  options.start ?? (argument.kind === "block" ? argument.block.model.start : 1);
