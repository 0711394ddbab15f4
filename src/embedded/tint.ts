const TEAL = [22, 138, 145] as const;
const RUST = [193, 98, 51] as const;

/** The tint of a correlation: none within the bound, deeper the larger it is; null for no tint. */
export function tint(correlation: number, bound: number): string | null {
  const size = Math.min(1, Math.abs(correlation));
  if (!(size > bound)) return null;
  const depth = 0.12 + (0.43 * (size - bound)) / (1 - bound);
  const channels = (correlation > 0 ? TEAL : RUST).map((full) => Math.round(255 - (255 - full) * depth));
  return `rgb(${channels.join(",")})`;
}
