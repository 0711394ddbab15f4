import { headings } from "../../texts/en";
import { defineCall } from "../call";
import { readSeries } from "../grid";
import { wordingOf } from "../model-call";
import { readOptions } from "../options";
import { readWhole } from "../scalars";
import { requireCells, wantsLabels } from "../tables";

export const partiallag = defineCall({
  name: "PARTIALLAG",
  task: "partialLag",
  read: (args) => {
    const series = readSeries(args["series"]);
    const options = readOptions(args["options"], "PARTIALLAG", ["labels"]);
    const lags = readWhole(args["lags"], "lags", 1, null);
    requireCells(lags * series.names.length + 1, series.names.length + 4);
    return {
      request: { series: series.rows, lags },
      layout: wantsLabels(options, series) ? series.names : null,
      wording: wordingOf(series),
    };
  },
  write: (found, names: readonly string[] | null) => {
    if (names === null) return found.flatMap(({ matrix }) => matrix.map((row) => [...row]));
    const rows = found.flatMap(({ lag, matrix, statistic, p }) =>
      // the test is of the whole matrix, so it stands once, beside its first row
      matrix.map((row, k) => [lag, names[k], ...row, k === 0 ? statistic : "", k === 0 ? p : ""]),
    );
    return [[headings.lag, headings.series, ...names, headings.statistic, headings.pValue], ...rows];
  },
});
