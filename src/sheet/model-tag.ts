import { Issue } from "../core/issue";
import type { Matrix } from "../core/matrix";
import type { VarModel } from "../core/var/model";
import {
  allLags,
  DEFAULT_FADE,
  DEFAULT_PULL,
  isInside,
  isSubset,
  orderOf,
  type ModelSettings,
} from "../core/var/settings";
import { OPTIONS } from "./option-specs";
import { formatSteps, spreadSteps } from "./steps-text";

/** What the first cell of a model block says. */
export interface Tag {
  readonly settings: ModelSettings;
  readonly series: number;
  readonly drivers: number;
  readonly rows: number;
  readonly start: number;
  /** Digest of the numbers as they were written. */
  readonly sum: string;
}

const OPENING = "comove model";

export const isTag = (cell: unknown): cell is string =>
  typeof cell === "string" && cell.trim().toLowerCase().startsWith(OPENING);

/** The canonical `key=value` list of a model's settings. */
export function settingsText(settings: ModelSettings): string {
  const parts = [`p=${orderOf(settings)}`, `fit=${settings.fit}`, `terms=${settings.terms}`];
  if (settings.cycle !== null) parts.push(`cycle=${settings.cycle}`);
  if (settings.waves !== null) parts.push(`waves=${settings.waves}`);
  if (isSubset(settings.lags)) parts.push(`uselags=${settings.lags.join(" ")}`);
  if (settings.steps.some((list) => list.length > 0)) parts.push(`steps=${formatSteps(settings.steps)}`);
  if (settings.longRun !== null) parts.push(`longrun=${settings.longRun}`);
  if (settings.movingAverage > 0) parts.push(`ma=${settings.movingAverage}`);
  if (settings.fit === "shrinkage") parts.push(`pull=${settings.pull}`, `fade=${settings.fade}`);
  return parts.join("; ");
}

/** The tag of a model: everything needed to use the block, and the digest of its numbers. */
export function formatTag(model: VarModel): string {
  const parts = [settingsText(model.settings), `series=${model.series}`];
  if (model.drivers > 0) parts.push(`drivers=${model.drivers}`);
  if (model.start !== 1) parts.push(`start=${model.start}`);
  parts.push(`n=${model.rows}`, `sum=${digest([model.coefficients, model.noiseCovariance])}`);
  return `${OPENING} ${parts.join("; ")}`;
}

/**
 * Reads a tag.
 * @throws Issue "model-block" naming the part that cannot be read
 */
export function parseTag(text: string): Tag {
  const given = new Map<string, string>();
  for (const part of text.trim().slice(OPENING.length).split(";")) {
    const [key, ...value] = part.split("=");
    given.set(key.trim().toLowerCase(), value.join("=").trim());
  }
  const bad = (part: string) => new Issue({ code: "model-block", fault: { kind: "bad-tag", part } });
  const read = <T>(key: string, parse: (value: string) => T | undefined | null, otherwise?: T): T => {
    const value = given.get(key);
    if (value === undefined && otherwise !== undefined) return otherwise;
    const parsed = value === undefined ? undefined : parse(value);
    if (parsed === undefined || parsed === null) throw bad(key);
    return parsed;
  };
  const option =
    <K extends keyof typeof OPTIONS>(key: K) =>
    (value: string) =>
      OPTIONS[key].parse(value);
  const order = read("p", OPTIONS.maxorder.parse);
  const series = read("series", (value) => columns(value) || undefined);
  const lags = given.has("uselags")
    ? (read("uselags", option("uselags")) as readonly number[])
    : allLags(order);
  if ((lags.at(-1) ?? 0) !== order) throw bad("uselags");
  const fit = read("fit", option("fit")) as ModelSettings["fit"];
  const longRun = given.has("longrun") ? read("longrun", option("longrun")) : null;
  if ((fit === "nuttall-strand" || longRun !== null) && isSubset(lags)) throw bad("uselags");
  if (longRun !== null && (fit !== "least-squares" || order === 0 || longRun > series)) throw bad("longrun");
  const movingAverage = read("ma", OPTIONS.ma.parse, 0);
  if (movingAverage > 0 && fit !== "likelihood") throw bad("ma");
  const terms = read("terms", option("terms")) as ModelSettings["terms"];
  if (isInside(terms) && longRun === null) throw bad("terms");
  const cycle = given.has("cycle") ? read("cycle", option("cycle")) : null;
  const waves = given.has("waves") ? read("waves", option("waves")) : null;
  if (waves !== null && (cycle === null || waves > cycle / 2)) throw bad("waves");
  return {
    settings: {
      fit,
      terms,
      cycle,
      waves,
      steps: read(
        "steps",
        (value) => {
          const plan = OPTIONS.steps.parse(value);
          return plan && spreadSteps(plan, series);
        },
        spreadSteps([[]], series)!,
      ),
      longRun,
      movingAverage,
      pull: read("pull", OPTIONS.pull.parse, DEFAULT_PULL),
      fade: read("fade", OPTIONS.fade.parse, DEFAULT_FADE),
      lags,
    },
    series,
    drivers: read("drivers", columns, 0),
    rows: read("n", whole),
    start: read("start", OPTIONS.start.parse, 1),
    sum: read("sum", (value) => value),
  };
}

const whole = (text: string): number | undefined => (/^\d{1,8}$/.test(text) ? Number(text) : undefined);

/** A number of columns that a sheet can have. */
const columns = (text: string): number | undefined => (/^\d{1,5}$/.test(text) ? Number(text) : undefined);

/**
 * Digest of numbers at 12 significant digits, eight hexadecimal figures: a block that was copied, even through
 * a file that keeps 15 digits where memory has 17, keeps its digest (rounded to 15 first, or a last 5 would be
 * rounded twice); an edited one does not.
 * FNV-1a, 32 bits (Fowler, Noll and Vo).
 */
export function digest(numbers: readonly Matrix[]): string {
  const text = numbers
    .flatMap((matrix) =>
      matrix.flatMap((row) => row.map((v) => (v === 0 ? "0" : Number(v.toPrecision(15)).toPrecision(12)))),
    )
    .join(" ");
  let hash = 0x811c9dc5;
  for (let i = 0; i < text.length; i++) hash = Math.imul(hash ^ text.charCodeAt(i), 0x01000193);
  return (hash >>> 0).toString(16).padStart(8, "0");
}
