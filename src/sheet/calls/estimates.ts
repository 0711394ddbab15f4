import { Issue } from "../../core/issue";
import { shapeOf } from "../../core/var/sample";
import { headings } from "../../texts/en";
import { defineCall } from "../call";
import { regressorLabel, type Names } from "../labels";
import { readModelCall } from "../model-call";
import { MODEL_KEYS } from "../model-plan";
import { requireLabels } from "../tables";

export const estimates = defineCall({
  name: "ESTIMATES",
  task: "estimates",
  read: (args) => {
    const { request, names, wording, options } = readModelCall(args, {
      call: "ESTIMATES",
      keys: [...MODEL_KEYS, "gaps", "coverage", "labels"],
      future: 0,
      use: "settings",
    });
    requireLabels(options);
    if (shapeOf(request.plan).longRun !== null)
      throw new Issue({ code: "longrun-errors", call: "ESTIMATES" });
    return { request: { ...request, coverage: options.coverage ?? 0.95 }, layout: names, wording };
  },
  write: (rows, names: Names) => [
    [...headings.estimates],
    ...rows.map(({ equation, regressor, coefficient, low, high, error, t, p }) => [
      names.series[equation],
      regressorLabel(regressor, names),
      coefficient,
      low,
      high,
      error,
      t,
      p,
    ]),
  ],
});
