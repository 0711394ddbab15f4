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

const round = (value: number): string => String(Number(value.toPrecision(value < 10 ? 2 : 3)));
