import { defineCall } from "../call";
import { readLagCall, stackMatrices } from "./lag-tables";

export const lagcov = defineCall({
  name: "LAGCOV",
  task: "lagCovariance",
  read: (args) => readLagCall(args, "LAGCOV"),
  write: stackMatrices,
});
