import { headings } from "../../texts/en";
import { defineCall } from "../call";
import { readBlockArgument } from "../model-plan";
import { readHorizon } from "../scalars";
import { requireCells } from "../tables";

export const shockshare = defineCall({
  name: "SHOCKSHARE",
  task: "shockShare",
  read: (args) => {
    const { model, names } = readBlockArgument(args["model"]);
    const horizon = readHorizon(args["horizon"]);
    requireCells(model.series * horizon + 1, model.series + 2);
    return { request: { model, horizon }, layout: names.series, wording: { ...names, firstRow: 1 } };
  },
  write: (shares, names: readonly string[]) => [
    [headings.series, headings.ahead, ...names.map(headings.dueTo)],
    ...names.flatMap((name, k) => shares.map((matrix, i) => [name, i + 1, ...matrix[k]])),
  ],
});
