import { defineCall } from "../call";
import { readModelCall } from "../model-call";
import { MODEL_KEYS } from "../model-plan";
import { readHorizon } from "../scalars";
import { numberRows, requireCells, wantsLabels } from "../tables";

export const ahead = defineCall({
  name: "AHEAD",
  task: "ahead",
  read: (args) => {
    const horizon = readHorizon(args["horizon"]);
    const { request, series, options, wording } = readModelCall(args, {
      call: "AHEAD",
      keys: [...MODEL_KEYS, "gaps", "point", "labels"],
      future: horizon,
      use: "numbers",
    });
    requireCells(horizon + 1, series.names.length);
    return {
      request: { ...request, horizon, point: options.point ?? "median" },
      layout: wantsLabels(options, series) ? series.names : null,
      wording,
    };
  },
  write: (path, names: readonly string[] | null) => numberRows(path, names),
});
