import { Issue } from "../core/issue";
import type { ModelPlan, ModelRequest } from "../core/var/sample";
import type { Wording } from "../texts/en";
import type { RawArguments } from "./call";
import { readDrivers, readSeries, type DriverBlock, type Gaps, type SeriesBlock } from "./grid";
import type { Names } from "./labels";
import { planModel, readModelArgument, startOf, type BlockUse } from "./model-plan";
import type { OptionKey } from "./option-specs";
import { readOptions, type Options } from "./options";

/** Everything the arguments `series, [model], [options], [drivers]` say. */
export interface ModelCall {
  readonly series: SeriesBlock;
  readonly drivers: DriverBlock;
  readonly names: Names;
  readonly options: Options;
  readonly request: ModelRequest;
  readonly wording: Wording;
}

/** What the words about a range of series may call by name. */
export const wordingOf = (series: SeriesBlock, drivers: readonly string[] = []): Wording => ({
  series: series.names,
  drivers,
  firstRow: series.firstRow,
});

const gapsOf = (options: Options, keys: readonly OptionKey[]): Gaps =>
  options.gaps === "allow" ? "allow" : keys.includes("gaps") ? "offer" : "refuse";

/** Only likelihood fits with gaps; a block's numbers can be used whatever they come from. @throws Issue "option-needs" */
function requireLikelihood(plan: ModelPlan): void {
  if (plan.kind === "given") return;
  const { fit } = plan.kind === "fit" ? plan.settings : plan.shape;
  if (fit !== "likelihood") throw new Issue({ code: "option-needs", key: "gaps", needs: "fit=likelihood" });
}

/**
 * Reads the arguments that every call with a model shares.
 * @param keys   the option keys of the call
 * @param future driver rows needed beyond the last row of the series
 * @param use    whether a block stands for its numbers or for its settings, if need be by the options
 */
export function readModelCall(
  args: RawArguments,
  {
    call,
    keys,
    future,
    use,
  }: {
    call: string;
    keys: readonly OptionKey[];
    future: number;
    use: BlockUse | ((options: Options) => BlockUse);
  },
): ModelCall {
  const options = readOptions(args["options"], call, keys);
  const series = readSeries(args["series"], "series", gapsOf(options, keys));
  const drivers = readDrivers(args["drivers"], series, future);
  const argument = readModelArgument(args["model"]);
  const blockUse = typeof use === "function" ? use(options) : use;
  const plan = planModel(argument, options, { series, drivers }, blockUse);
  if (options.gaps === "allow") requireLikelihood(plan);
  return {
    series,
    drivers,
    names: { series: series.names, drivers: drivers.names },
    options,
    request: {
      sample: { series: series.rows, drivers: drivers.rows, start: startOf(options, argument) },
      plan,
    },
    wording: wordingOf(series, drivers.names),
  };
}
