/**
 * How long a thousand redrawn samples take, 156 rows of 4 series, 2 lags, 12 rows ahead: `npx tsx test/bench/redraw.ts`.
 * Seeded; three rounds to warm up, the median of seven after. Least squares is laid out flat for this (var/recursion.ts,
 * var/flat-least-squares.ts); through the careful fit, one record per row, it took nine times as long.
 */
import { redrawnBands } from "../../src/core/forecast/redrawn-bands";
import { fitModel } from "../../src/core/var/fit";
import { atOnce } from "../../src/engine/slices";
import { inventedSeries } from "../support/invented";
import { sampleOf, settingsOfOrder } from "../support/requests";

const sample = sampleOf(inventedSeries(156, 4));
for (const fit of ["least-squares", "yule-walker", "nuttall-strand", "shrinkage"] as const) {
  const plan = { kind: "fit", settings: settingsOfOrder(4, 2, { fit }) } as const;
  const request = {
    sample,
    plan,
    horizon: 12,
    point: "median",
    coverage: 0.9,
    joint: false,
    bands: "redrawn",
    draws: 1000,
    seed: 1,
  } as const;
  const model = fitModel(request);
  let check = 0;
  const times = Array.from({ length: 10 }, () => {
    const begun = performance.now();
    check += atOnce(redrawnBands(model, request)).high[11][3];
    return performance.now() - begun;
  }).slice(3);
  times.sort((a, b) => a - b);
  console.log(`${fit}: ${times[3].toFixed(0)} ms (check ${(check / 10).toFixed(6)})`);
}
