import { Issue } from "../../core/issue";
import { shapeOf } from "../../core/var/sample";
import { headings } from "../../texts/en";
import { defineCall } from "../call";
import { readModelCall } from "../model-call";
import { MODEL_KEYS } from "../model-plan";
import { readHorizon } from "../scalars";
import { numberRows, requireCells, wantsLabels } from "../tables";

export const bands = defineCall({
  name: "BANDS",
  task: "bands",
  read: (args) => {
    const horizon = readHorizon(args["horizon"]);
    const { request, series, options, wording } = readModelCall(args, {
      call: "BANDS",
      keys: [...MODEL_KEYS, "gaps", "coverage", "bands", "joint", "point", "draws", "seed", "labels"],
      future: horizon,
      // what is redrawn is fitted anew, so a block's numbers cannot stand
      use: ({ bands }) => (bands === "redrawn" ? "settings" : "numbers"),
    });
    for (const key of ["draws", "seed"] as const) {
      if (options[key] !== undefined && options.bands !== "redrawn")
        throw new Issue({ code: "option-needs", key, needs: "bands=redrawn" });
    }
    const longRun = shapeOf(request.plan).longRun !== null;
    if (longRun && options.bands === "fitted") throw new Issue({ code: "longrun-errors", call: "BANDS" });
    requireCells(horizon + 1, 3 * series.names.length);
    return {
      request: {
        ...request,
        horizon,
        point: options.point ?? "median",
        coverage: options.coverage ?? 0.95,
        joint: options.joint === "yes",
        bands: options.bands ?? (longRun ? "known" : "fitted"),
        draws: options.draws ?? 1000,
        seed: options.seed ?? 1,
      },
      layout: wantsLabels(options, series) ? series.names : null,
      wording,
    };
  },
  write: ({ low, point, high }, names: readonly string[] | null) =>
    numberRows(
      point.map((row, j) => row.flatMap((v, k) => [low[j][k], v, high[j][k]])),
      names && names.flatMap((name) => [`${name} ${headings.low}`, name, `${name} ${headings.high}`]),
    ),
});
