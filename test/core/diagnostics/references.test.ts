import { describe, expect, it } from "vitest";
import { archTest } from "../../../src/core/diagnostics/arch";
import { breuschGodfrey } from "../../../src/core/diagnostics/breusch-godfrey";
import { changeTests } from "../../../src/core/diagnostics/change";
import { ljungBox } from "../../../src/core/diagnostics/ljung-box";
import { normality } from "../../../src/core/diagnostics/normality";
import { portmanteau } from "../../../src/core/diagnostics/portmanteau";
import { residualTests } from "../../../src/core/diagnostics/residual-tests";
import { fitToUse } from "../../../src/core/diagnostics/use";
import { column, type Matrix } from "../../../src/core/matrix";
import type { Step } from "../../../src/core/prepare/steps";
import { designOf } from "../../../src/core/var/design";
import { fitModel } from "../../../src/core/var/fit";
import { oneStep } from "../../../src/core/var/residuals";
import { stepSample } from "../../../src/core/var/stepped";
import expected from "../../reference/statsmodels-residuals.json";
import { close } from "../../support/close";
import { readCsv } from "../../support/data";
import { sampleOf, settingsOfOrder } from "../../support/requests";

const LOG: Step = { kind: "log" };
const DIFF: Step = { kind: "diff", span: 1 };

function dataSet(name: string): { levels: Matrix; list: readonly Step[] } {
  const german = () => readCsv("e1_west_german_inv_inc_cons_1960Q1_1982Q4.csv", ["invest", "income", "cons"]);
  if (name === "german") return { levels: german().slice(0, 76), list: [LOG, DIFF] };
  if (name === "macro")
    return { levels: readCsv("macrodata.csv", ["realgdp", "realcons", "realinv"]), list: [LOG, DIFF] };
  return { levels: readCsv("lynx.csv", ["lynx"]), list: [LOG] };
}

function fitted(name: string, order: number) {
  const { levels, list } = dataSet(name);
  const series = levels[0].length;
  const settings = settingsOfOrder(series, order, { steps: levels[0].map(() => list) });
  const sample = sampleOf(levels);
  const model = fitModel({ sample, plan: { kind: "fit", settings } });
  const stepped = stepSample(sample, settings.steps);
  return {
    sample,
    model,
    u: oneStep(model, stepped).residuals,
    z: designOf(stepped, settings, order).z,
  };
}

describe("Lütkepohl's example, 4.4 and 4.5", () => {
  const { sample, model } = fitted("german", 2);
  const tests = residualTests(model, sample, [12]);
  const statistic = (method: string) => tests.find((test) => test.method === method)!.figure;

  it("portmanteau at 12 lags, as printed", () => {
    expect(statistic("portmanteau").statistic!.toFixed(2)).toBe("73.52");
    expect(statistic("small-sample").statistic!.toFixed(2)).toBe("81.93");
    expect(statistic("portmanteau").df).toBe(90);
  });

  it("third and fourth moments, as printed", () => {
    expect(statistic("skewness").statistic!.toFixed(2)).toBe("3.15");
    expect(statistic("kurtosis").statistic!.toFixed(2)).toBe("4.69");
    expect(statistic("both").statistic!.toFixed(2)).toBe("7.84");
    expect([statistic("skewness").df, statistic("both").df]).toEqual([3, 6]);
  });
});

describe.each(expected.systems)("$name against statsmodels", (theirs) => {
  const { model, u, z } = fitted(theirs.name, theirs.order);
  const { order, lags } = theirs;

  it("portmanteau, both forms", () => {
    const { plain, smallSample } = portmanteau(u, lags, 9 * order);
    close([plain.statistic!, plain.df!, plain.p!], theirs.whiteness, { rtol: 1e-8 });
    close([smallSample.statistic!, smallSample.df!, smallSample.p!], theirs.adjusted, { rtol: 1e-8 });
  });

  it("Ljung–Box of every series", () => {
    const ours = u[0].map((_, k) => ljungBox(column(u, k), lags, order));
    close(
      ours.map(({ statistic, p }) => [statistic!, p!]),
      theirs.ljungBox,
      { rtol: 1e-8 },
    );
  });

  it("normality, whose whitening divides by T there", () => {
    const { both } = normality(u, 0);
    close([both.statistic!, both.df!, both.p!], theirs.normality, { rtol: 1e-8 });
  });

  it("LM, ARCH, the largest Chow statistic and the conditioning by plain regressions", () => {
    close(breuschGodfrey(u, z, 3).lm.statistic!, theirs.lm, { rtol: 1e-8 });
    close(archTest(u, 2).statistic!, theirs.arch, { rtol: 1e-8 });
    close(
      changeTests(u, z).map(({ statistic }) => statistic!),
      theirs.chow,
      { rtol: 1e-8 },
    );
    close(fitToUse(model, z).conditioning.statistic!, theirs.condition, { rtol: 1e-8 });
  });
});

describe.each(expected.singles)("one series, order $order, $lags lags, against statsmodels", (theirs) => {
  const { u, z } = fitted(theirs.name, theirs.order);

  it("Breusch–Godfrey, and its F is the exact one", () => {
    const { lm, f } = breuschGodfrey(u, z, theirs.lags);
    close([lm.statistic!, lm.p!, f.statistic!, f.p!], theirs.breuschGodfrey, { rtol: 1e-7 });
    expect(f.df2).toBeCloseTo(u.length - z[0].length - theirs.lags, 9);
  });

  it("ARCH", () => {
    const { statistic, p } = archTest(u, theirs.lags);
    close([statistic!, p!], theirs.arch, { rtol: 1e-8 });
  });
});
