import { Issue } from "../../core/issue";
import { planLoss } from "../../core/prepare/steps";
import { defineCall } from "../call";
import { readSeries } from "../grid";
import { wordingOf } from "../model-call";
import { numberRows } from "../tables";
import { readStepsArgument } from "./steps";

export const unstep = defineCall({
  name: "UNSTEP",
  task: "unstep",
  read: (args) => {
    const series = readSeries(args["series"]);
    const values = readSeries(args["values"], "values");
    const need = series.names.length;
    if (values.names.length !== need) {
      throw new Issue({ code: "columns-differ", range: "values", have: values.names.length, need });
    }
    const plan = readStepsArgument(args["steps"], series);
    const lost = planLoss(plan);
    if (lost > series.rows.length)
      throw new Issue({ code: "steps-leave-nothing", lost, rows: series.rows.length });
    return {
      request: { series: series.rows, plan, values: values.rows },
      layout: series.hasHeader ? series.names : null,
      wording: wordingOf(series),
    };
  },
  write: (rows, names: readonly string[] | null) => numberRows(rows, names),
});
