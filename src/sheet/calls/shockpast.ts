import { headings } from "../../texts/en";
import { defineCall } from "../call";
import { readModelCall } from "../model-call";
import { MODEL_KEYS } from "../model-plan";
import { readTarget } from "../scalars";
import { numberRows, requireCells, wantsLabels } from "../tables";

export const shockpast = defineCall({
  name: "SHOCKPAST",
  task: "shockPast",
  read: (args) => {
    const { request, series, options, wording } = readModelCall(args, {
      call: "SHOCKPAST",
      keys: [...MODEL_KEYS, "labels"],
      future: 0,
      use: "numbers",
    });
    requireCells(series.rows.length + 1, series.names.length + 2);
    return {
      request: { ...request, target: readTarget(args["target"], series.names) },
      layout: wantsLabels(options, series) ? series.names : null,
      wording,
    };
  },
  write: ({ actual, baseline, contributions }, names: readonly string[] | null) =>
    numberRows(
      actual.map((v, t) => [v, baseline[t], ...contributions[t]]),
      names && [headings.actual, headings.baseline, ...names.map(headings.dueTo)],
    ),
});
