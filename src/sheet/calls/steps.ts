import { planLoss, type StepPlan } from "../../core/prepare/steps";
import { Issue } from "../../core/issue";
import { defineCall } from "../call";
import { describeCell, isBlank, toCells, type Cell } from "../cell";
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
    const plan = readStepsArgument(args["steps"], series);
    const [lost, rows] = [planLoss(plan), series.rows.length];
    if (lost >= rows) throw new Issue({ code: "steps-leave-nothing", lost, rows });
    return {
      request: { series: series.rows, plan },
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
  const refused = (cell: Cell) =>
    new Issue({ code: "bad-argument", argument: "steps", found: describeCell(cell), allowed });
  const cells = (toCells(raw) ?? [[readCell(raw, "steps", allowed)]]).flat();
  const words = cells.map((cell) => {
    if (isBlank(cell)) return "none";
    if (typeof cell !== "string") throw refused(cell);
    return cell;
  });
  const text = words.join("|");
  const plan = OPTIONS.steps.parse(text);
  if (plan === undefined) throw refused(text);
  return readPlan(plan, series.names.length);
}
