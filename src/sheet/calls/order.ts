import { bestOrder, type OrderRow } from "../../core/var/order";
import type { Criterion } from "../../core/var/settings";
import { requireOrder } from "../../core/var/rows-needed";
import { headings } from "../../texts/en";
import { defineCall } from "../call";
import type { OutCell } from "../cell";
import { readDrivers, readSeries } from "../grid";
import { wordingOf } from "../model-call";
import { extentOf, readShape } from "../model-plan";
import { readOptions } from "../options";
import { readWhole } from "../scalars";
import { orBlank, requireLabels } from "../tables";

const CRITERIA: readonly (readonly [Criterion | "fpe", string])[] = [
  ["aic", "AIC"],
  ["aicc", "AICc"],
  ["bic", "BIC"],
  ["hq", "HQ"],
  ["fpe", "FPE"],
];

export const order = defineCall({
  name: "ORDER",
  task: "order",
  read: (args) => {
    const series = readSeries(args["series"]);
    const options = readOptions(args["options"], "ORDER", [
      "terms",
      "cycle",
      "waves",
      "start",
      "steps",
      "labels",
    ]);
    requireLabels(options);
    const drivers = readDrivers(args["drivers"], series, 0);
    const maxOrder = readWhole(args["maxorder"], "maxorder", 0, null);
    const shape = readShape(options, series.names.length);
    requireOrder(shape, maxOrder, extentOf(shape, series, drivers));
    return {
      request: {
        sample: { series: series.rows, drivers: drivers.rows, start: options.start ?? 1 },
        shape,
        maxOrder,
      },
      layout: null,
      wording: wordingOf(series, drivers.names),
    };
  },
  write: (rows) => [[...headings.order], ...rows.map((row) => tableRow(row, rows))],
});

function tableRow(row: OrderRow, all: readonly OrderRow[]): OutCell[] {
  const chosenBy = CRITERIA.filter(([criterion]) => bestOrder(all, criterion) === row.order).map(
    ([, name]) => name,
  );
  return [
    row.order,
    row.logDet,
    row.aic,
    orBlank(row.aicc),
    row.bic,
    row.hq,
    row.fpe,
    orBlank(row.lr),
    orBlank(row.lrP),
    chosenBy.join(", "),
  ];
}
