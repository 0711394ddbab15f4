import { headings } from "../../texts/en";
import { defineCall } from "../call";
import { readLagCall, stackMatrices } from "./lag-tables";

export const lagcorr = defineCall({
  name: "LAGCORR",
  task: "lagCorrelation",
  read: (args) => readLagCall(args, "LAGCORR"),
  // ±1.96/√n holds when at least one of the pair is white noise (common practice)
  write: (matrices, layout) =>
    stackMatrices(matrices, layout, { heading: headings.bound, value: 1.96 / Math.sqrt(layout.rows) }),
});
