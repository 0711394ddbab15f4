import type { Lead } from "../../core/moments/lead-lag";
import type { Root } from "../../core/var/roots";

/** What one root says about a model. */
export function rootReading({ modulus, period }: Root): string {
  const swing = period === null ? "" : period <= 2.0000001 ? "zigzag" : `swing of ${round(period)} rows`;
  if (modulus < 1e-8) return "gone at once";
  if (modulus > 1 + 1e-9)
    return swing === "" ? "grows: the forecast explodes" : `${swing} that grows: the forecast explodes`;
  if (modulus > 0.98) {
    const memory =
      modulus > 1 - 1e-9
        ? "never fades"
        : `hardly fades: half left after ${round(Math.log(0.5) / Math.log(modulus))} rows`;
    return `${swing === "" ? "" : `${swing}, `}${memory}; differences may be needed`;
  }
  const half = `half left after ${round(Math.log(0.5) / Math.log(modulus))} rows`;
  return swing === "" ? half : `${swing}, ${half}`;
}

/** What the closest lag of a pair says, the later series first, so that the direction cannot be mistaken. */
export function leadReading({ lag, correlation, p }: Lead, leader: string, follower: string): string {
  if (!(p < 0.05)) return "nothing that chance would not show";
  const opposite = correlation < 0;
  if (lag === 0)
    return `${follower} ${verb("move", follower)} ${opposite ? "against" : "with"} ${leader} in the same row`;
  const rows = `${lag} ${lag === 1 ? "row" : "rows"}`;
  return `${follower} ${verb("follow", follower)} ${leader} by ${rows}${opposite ? ", with opposite sign" : ""}`;
}

/** "trips follow", "price follows": names that end like a plural take the plural. */
const verb = (word: string, name: string): string => (/[^aisu]s$/i.test(name) ? word : `${word}s`);

const round = (value: number): string => String(Number(value.toPrecision(value < 10 ? 2 : 3)));
