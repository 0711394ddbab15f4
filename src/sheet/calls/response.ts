import { headings } from "../../texts/en";
import { defineCall } from "../call";
import { readBlockArgument } from "../model-plan";
import { readOptions } from "../options";
import { readHorizon } from "../scalars";
import { requireCells, requireLabels } from "../tables";

export const response = defineCall({
  name: "RESPONSE",
  task: "response",
  read: (args) => {
    const { model, names } = readBlockArgument(args["model"]);
    const horizon = readHorizon(args["horizon"]);
    const options = readOptions(args["options"], "RESPONSE", ["shock", "labels"]);
    requireLabels(options);
    requireCells(model.series * (horizon + 1) + 1, model.series + 2);
    return {
      request: { model, horizon, shock: options.shock ?? "orthogonal" },
      layout: names.series,
      wording: { ...names, firstRow: 1 },
    };
  },
  write: (responses, names: readonly string[]) => [
    [headings.shockTo, headings.ahead, ...names],
    ...names.flatMap((name, struck) =>
      responses.map((matrix, ahead) => [name, ahead, ...matrix.map((row) => row[struck])]),
    ),
  ],
});
