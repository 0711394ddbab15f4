import { describe, it } from "vitest";
import { responsesTo, shockShares } from "../../src/core/forecast/responses";
import { fitModel } from "../../src/core/var/fit";
import type values from "../reference/statsmodels-responses.json";
import { blockClose } from "./close";
import { readCsv } from "./data";
import { sampleOf, settingsOfOrder } from "./requests";

export type ResponseValues = typeof values;

const germany = "e1_west_german_inv_inc_cons_1960Q1_1982Q4.csv";
const denmark = "danish_johansen_juselius_1990.csv";
/** Levels, and whether the reference program was given their differences of logs. */
const DATA: Readonly<Record<string, { levels: () => number[][]; diff: boolean }>> = {
  german: { levels: () => readCsv(germany, ["invest", "income", "cons"]).slice(0, 76), diff: true },
  macro: { levels: () => readCsv("macrodata.csv", ["realgdp", "realcons", "realinv"]), diff: true },
  danish: { levels: () => readCsv(denmark, ["lrm", "lry", "ibo", "ide"]), diff: false },
};

/** Responses and shares of models fitted here, compared with what statsmodels makes of the same data. */
export function responseSuite({ cases }: ResponseValues): void {
  describe.each(cases)("$name: responses against statsmodels", (expected) => {
    const levels = DATA[expected.name].levels();
    const steps = levels[0].map(() =>
      DATA[expected.name].diff ? [{ kind: "log" } as const, { kind: "diff", span: 1 } as const] : [],
    );
    const settings = settingsOfOrder(levels[0].length, expected.order, { steps });
    const model = fitModel({ sample: sampleOf(levels), plan: { kind: "fit", settings } });
    const { horizon } = expected;

    it.each(["unit", "orthogonal"] as const)("%s responses", (shock) =>
      responsesTo({ model, horizon, shock }).forEach((matrix, j) =>
        blockClose(matrix, expected[shock][j], 1e-9),
      ),
    );
    it("variance shares", () =>
      shockShares({ model, horizon }).forEach((matrix, j) => blockClose(matrix, expected.shares[j], 1e-9)));
  });
}
