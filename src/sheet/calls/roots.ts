import { headings, rootReading } from "../../texts/en";
import { defineCall } from "../call";
import { readBlockArgument } from "../model-plan";
import { orBlank } from "../tables";

export const roots = defineCall({
  name: "ROOTS",
  task: "roots",
  read: (args) => {
    const { model, names } = readBlockArgument(args["model"]);
    return { request: { model }, layout: null, wording: { ...names, firstRow: 1 } };
  },
  write: (found) => [
    [...headings.roots],
    ...found.map((root) => [
      root.modulus,
      root.real,
      root.imaginary,
      orBlank(root.period),
      rootReading(root),
    ]),
  ],
});
