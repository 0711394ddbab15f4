import { defineCall } from "../call";
import type { Names } from "../labels";
import { writeModelBlock } from "../model-block";
import { readModelCall } from "../model-call";
import { MODEL_KEYS } from "../model-plan";
import { requireLabels } from "../tables";

export const model = defineCall({
  name: "MODEL",
  task: "fit",
  read: (args) => {
    const { request, names, wording, options } = readModelCall(args, {
      call: "MODEL",
      keys: [...MODEL_KEYS, "gaps", "labels"],
      future: 0,
      use: "settings",
    });
    requireLabels(options);
    return { request, layout: names, wording };
  },
  write: (fitted, names: Names) => writeModelBlock(fitted, names),
});
