import { headings, residualMethods, residualQuestions, residualReading } from "../../texts/en";
import { defineCall } from "../call";
import { readModelCall } from "../model-call";
import { MODEL_KEYS } from "../model-plan";
import { orBlank, requireLabels } from "../tables";

export const residtest = defineCall({
  name: "RESIDTEST",
  task: "residualTests",
  read: (args) => {
    const { request, series, options, wording } = readModelCall(args, {
      call: "RESIDTEST",
      keys: [...MODEL_KEYS, "testlags", "labels"],
      future: 0,
      use: "numbers",
    });
    requireLabels(options);
    return { request: { ...request, testLags: options.testlags ?? [] }, layout: series.names, wording };
  },
  write: (tests, names: readonly string[]) => [
    [...headings.residTest],
    ...tests.map((test) => {
      const { lags, statistic, df, df2, p } = test.figure;
      return [
        residualQuestions[test.question],
        test.about === null ? headings.allSeries : names[test.about],
        residualMethods[test.method],
        orBlank(lags),
        orBlank(statistic),
        orBlank(df),
        orBlank(df2),
        orBlank(p),
        residualReading(test),
      ];
    }),
  ],
});
