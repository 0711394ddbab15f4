import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { normalQuantile } from "../../core/distributions";

/** The invented scenario: a harbour cold store and what it counts every week. */
export const SERIES = ["landings", "ice", "electricity", "trips"] as const;
export const WEEKS = 156;
/** Monday 2 January 2023 as a spreadsheet counts days. */
export const FIRST_WEEK = 44928;

const SEED = 20230102;

/**
 * 156 invented weeks: landings (t), ice sold (t), electricity (MWh), haulage trips. Each has a yearly swing; what
 * landings do beyond it moves ice in the same week and the next, electricity one week later, trips two.
 */
export function coldStoreWeeks(): number[][] {
  const generator = xoroshiro128plus(SEED);
  const draw = () => normalQuantile(uniformFloat64(generator) * (1 - 2e-12) + 1e-12);
  const warmUp = 30;
  const beyond: number[][] = [];
  for (let t = 0; t < WEEKS + warmUp; t++) {
    const [landings1, ice1, electricity1, trips1] = beyond[t - 1] ?? [0, 0, 0, 0];
    const [landings2] = beyond[t - 2] ?? [0];
    const landings = 0.6 * landings1 + 14 * draw();
    const ice = 0.3 * ice1 + 0.3 * landings + 0.25 * landings1 + 3 * draw();
    const electricity = 0.45 * electricity1 + 0.28 * landings1 + 3 * draw();
    const trips = 0.2 * trips1 + 0.24 * landings2 + 1.8 * draw();
    beyond.push([landings, ice, electricity, trips]);
  }
  return beyond
    .slice(warmUp)
    .map(([landings, ice, electricity, trips], week) => [
      tenths(182 + 46 * swing(week, 14) + landings),
      tenths(94 + 27 * swing(week, 16) + ice),
      tenths(128 + 34 * swing(week, 20) + electricity),
      Math.round(64 + 12 * swing(week, 16) + trips),
    ]);
}

/** The year's swing, at its height `peak` + 13 weeks into the year. */
const swing = (week: number, peak: number): number => Math.sin((2 * Math.PI * (week - peak)) / 52);

const tenths = (value: number): number => Math.round(10 * value) / 10;

/** The same weeks as they come out of an office: a blank, a word, a number kept as text, an outlier, a date twice. */
export function blemishedWeeks(): { readonly dates: number[]; readonly cells: (number | string | null)[][] } {
  const cells: (number | string | null)[][] = coldStoreWeeks();
  const dates = cells.map((_, week) => FIRST_WEEK + 7 * week);
  cells[22][1] = null;
  cells[47][2] = "n/a";
  cells[80][0] = String(cells[80][0]);
  cells[101][3] = 640;
  dates[60] = dates[59];
  return { dates, cells };
}
