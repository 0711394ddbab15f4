import type { Matrix } from "../../core/matrix";
import type { LagRequest } from "../../core/tasks";
import { headings } from "../../texts/en";
import type { RawArguments, Reading } from "../call";
import type { OutTable } from "../cell";
import { readSeries } from "../grid";
import { wordingOf } from "../model-call";
import { readOptions } from "../options";
import { readLags } from "../scalars";
import { requireCells, wantsLabels } from "../tables";

/** How matrices at several lags are laid out. */
export interface LagLayout {
  readonly lags: readonly number[];
  readonly names: readonly string[];
  readonly labelled: boolean;
  /** Rows of the series, for the bound that chance alone rarely passes. */
  readonly rows: number;
}

/** Reads `series, lags, [options]`. */
export function readLagCall(
  args: RawArguments,
  call: string,
): Reading<"lagCovariance" | "lagCorrelation", LagLayout> & { readonly request: LagRequest } {
  const series = readSeries(args["series"]);
  const options = readOptions(args["options"], call, ["divisor", "labels"]);
  const lags = readLags(args["lags"], series.rows.length);
  const names = series.names;
  requireCells(lags.length * names.length + 1, names.length + 3);
  return {
    request: { series: series.rows, lags, divisor: options.divisor ?? "n" },
    layout: { lags, names, labelled: wantsLabels(options, series), rows: series.rows.length },
    wording: wordingOf(series),
  };
}

/** Matrices stacked downwards, K rows each; with labels: lag, series, the names, and any further columns. */
export function stackMatrices(
  matrices: readonly Matrix[],
  { lags, names, labelled }: LagLayout,
  extra: { readonly heading: string; readonly value: number } | null = null,
): OutTable {
  const rows = matrices.flatMap((matrix, i) =>
    matrix.map((row, k) =>
      labelled ? [lags[i], names[k], ...row, ...(extra ? [extra.value] : [])] : [...row],
    ),
  );
  return labelled
    ? [[headings.lag, headings.series, ...names, ...(extra ? [extra.heading] : [])], ...rows]
    : rows;
}
