import { Issue } from "../../core/issue";
import type { Matrix } from "../../core/matrix";
import { defineCall } from "../call";
import { toCells } from "../cell";
import { readSeries } from "../grid";
import { readBlockArgument } from "../model-plan";
import { readOptions } from "../options";
import { readWhole } from "../scalars";
import { CELL_LIMIT, numberRows, requireCells, requireLabels } from "../tables";

export const simulate = defineCall({
  name: "SIMULATE",
  task: "simulate",
  read: (args) => {
    const { model, names } = readBlockArgument(args["model"]);
    const rows = readWhole(args["rows"], "rows", 1, CELL_LIMIT);
    const options = readOptions(args["options"], "SIMULATE", ["seed", "labels"]);
    requireLabels(options);
    requireCells(rows + 1, model.series);
    return {
      request: { model, rows, start: readStart(args["start"], names.series), seed: options.seed ?? 1 },
      layout: names.series,
      wording: { ...names, firstRow: 1 },
    };
  },
  write: (draw, names: readonly string[]) => numberRows(draw, names),
});

/** The rows to start from, if any. @throws Issue "columns-differ" | "block-names" | … */
function readStart(raw: unknown, names: readonly string[]): Matrix | null {
  if (toCells(raw) === null) return null;
  const start = readSeries(raw, "start");
  const [have, need] = [start.names.length, names.length];
  if (have !== need) throw new Issue({ code: "columns-differ", range: "start", have, need });
  if (start.hasHeader && start.names.join("\n") !== names.join("\n"))
    throw new Issue({ code: "block-names", block: names, series: start.names });
  return start.rows;
}
