import type { RawArguments, Reading } from "../call";
import type { OutTable } from "../cell";
import { readModelCall } from "../model-call";
import { MODEL_KEYS } from "../model-plan";
import { defineCall } from "../call";
import { numberRows, requireCells, wantsLabels } from "../tables";
import type { Matrix } from "../../core/matrix";

type Names = readonly string[] | null;

/** Reads a call whose result has one row per row of the series; a block's numbers are used as they stand. */
function readRowByRow(args: RawArguments, call: string): Reading<"fitted" | "residuals", Names> {
  const { request, series, options, wording } = readModelCall(args, {
    call,
    keys: [...MODEL_KEYS, "gaps", "labels"],
    future: 0,
    use: "numbers",
  });
  requireCells(series.rows.length + 1, series.names.length);
  return { request, layout: wantsLabels(options, series) ? series.names : null, wording };
}

const write = (rows: Matrix, names: Names): OutTable => numberRows(rows, names);

export const fitted = defineCall({
  name: "FITTED",
  task: "fitted",
  read: (args) => readRowByRow(args, "FITTED"),
  write,
});
export const residuals = defineCall({
  name: "RESIDUALS",
  task: "residuals",
  read: (args) => readRowByRow(args, "RESIDUALS"),
  write,
});
