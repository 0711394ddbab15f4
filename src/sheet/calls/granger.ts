import { Issue } from "../../core/issue";
import { shapeOf } from "../../core/var/sample";
import { headings } from "../../texts/en";
import { defineCall } from "../call";
import type { OutCell } from "../cell";
import { readModelCall } from "../model-call";
import { MODEL_KEYS } from "../model-plan";
import { wantsLabels } from "../tables";

export const granger = defineCall({
  name: "GRANGER",
  task: "granger",
  read: (args) => {
    const { request, series, options, wording } = readModelCall(args, {
      call: "GRANGER",
      keys: [...MODEL_KEYS, "adjust", "spare", "labels"],
      future: 0,
      use: "settings",
    });
    if (shapeOf(request.plan).movingAverage > 0) throw new Issue({ code: "ma-not-here", call: "GRANGER" });
    return {
      request: { ...request, spare: options.spare ?? 0, adjust: options.adjust === "yes" },
      layout: wantsLabels(options, series) ? series.names : null,
      wording,
    };
  },
  write: (p, names: readonly string[] | null) => {
    const body = p.map((row) => row.map((v): OutCell => (Number.isNaN(v) ? "" : v)));
    return names === null ? body : [[headings.effect, ...names], ...body.map((row, k) => [names[k], ...row])];
  },
});
