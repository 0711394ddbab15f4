import { headings, leadReading } from "../../texts/en";
import { defineCall } from "../call";
import { readSeries } from "../grid";
import { wordingOf } from "../model-call";
import { readOptions } from "../options";
import { readWhole } from "../scalars";
import { requireLabels } from "../tables";

export const leadlag = defineCall({
  name: "LEADLAG",
  task: "leadLag",
  read: (args) => {
    const series = readSeries(args["series"]);
    requireLabels(readOptions(args["options"], "LEADLAG", ["labels"]));
    const lags = readWhole(args["lags"], "lags", 0, null);
    return { request: { series: series.rows, lags }, layout: series.names, wording: wordingOf(series) };
  },
  write: (leads, names: readonly string[]) => [
    [...headings.leadLag],
    ...leads.map((lead) => {
      const [leader, follower] = [names[lead.leader], names[lead.follower]];
      const { lag, correlation, bound, p } = lead;
      return [leader, follower, lag, correlation, bound, p, leadReading(lead, leader, follower)];
    }),
  ],
});
