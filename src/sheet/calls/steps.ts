import type { StepPlan } from "../../core/prepare/steps";
import { Issue } from "../../core/issue";
import { defineCall } from "../call";
import { describeCell, toCells } from "../cell";
import { readSeries, type SeriesBlock } from "../grid";
import { readPlan } from "../model-plan";
import { wordingOf } from "../model-call";
import { OPTIONS } from "../option-specs";
import { numberRows } from "../tables";
import { readCell } from "../scalars";

export const steps = defineCall({
  name: "STEPS",
  task: "steps",
  read: (args) => {
    const series = readSeries(args["series"], "series", "allow");
    return {
      request: { series: series.rows, plan: readStepsArgument(args["steps"], series) },
      layout: series.hasHeader ? series.names : null,
      wording: wordingOf(series),
    };
  },
  write: (rows, names: readonly string[] | null) => {
    // a row that any series loses is blank throughout, so that rows stay together
    const whole = rows.map((row) => (row.some(Number.isNaN) ? row.map(() => NaN) : row));
    return numberRows(whole, names);
  },
});

/** The steps argument of STEPS and UNSTEP: text, or one cell per series. */
export function readStepsArgument(raw: unknown, series: SeriesBlock): StepPlan {
  const allowed = OPTIONS.steps.allowed;
  const cells = toCells(raw);
  const single = cells === null || (cells.length === 1 && cells[0].length === 1);
  const cell = single
    ? readCell(raw, "steps", allowed)
    : cells
        .flat()
        .map((c) => c ?? "none")
        .join("|");
  const plan = typeof cell === "string" ? OPTIONS.steps.parse(cell) : undefined;
  if (plan === undefined)
    throw new Issue({ code: "bad-argument", argument: "steps", found: describeCell(cell), allowed });
  return readPlan(plan, series.names.length);
}
