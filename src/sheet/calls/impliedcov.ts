import { defineCall } from "../call";
import { readBlockArgument } from "../model-plan";
import { readWhole } from "../scalars";
import { requireCells } from "../tables";
import { stackMatrices, type LagLayout } from "./lag-tables";

export const impliedcov = defineCall({
  name: "IMPLIEDCOV",
  task: "impliedCovariance",
  read: (args) => {
    const { model, names } = readBlockArgument(args["model"]);
    const last = readWhole(args["lags"], "lags", 0, null);
    requireCells((last + 1) * model.series + 1, model.series + 2);
    const lags = Array.from({ length: last + 1 }, (_, lag) => lag);
    return {
      request: { model, lags: last },
      layout: { lags, names: names.series, labelled: true, rows: model.rows },
      wording: { ...names, firstRow: 1 },
    };
  },
  write: (matrices, layout: LagLayout) => stackMatrices(matrices, layout),
});
