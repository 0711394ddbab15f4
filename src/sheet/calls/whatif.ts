import { defineCall } from "../call";
import { readSeries } from "../grid";
import { readModelCall } from "../model-call";
import { MODEL_KEYS } from "../model-plan";
import { readPlanRange } from "../plan-range";
import { numberRows, requireCells, wantsLabels } from "../tables";

export const whatif = defineCall({
  name: "WHATIF",
  task: "whatIf",
  read: (args) => {
    const imposed = readPlanRange(args["plan"], readSeries(args["series"], "series", "allow"));
    const { request, series, options, wording } = readModelCall(args, {
      call: "WHATIF",
      keys: [...MODEL_KEYS, "gaps", "point", "labels"],
      future: imposed.length,
      use: "numbers",
    });
    requireCells(imposed.length + 1, series.names.length);
    return {
      request: { ...request, imposed, point: options.point ?? "median" },
      layout: wantsLabels(options, series) ? series.names : null,
      wording,
    };
  },
  write: (path, names: readonly string[] | null) => numberRows(path, names),
});
