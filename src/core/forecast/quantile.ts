/**
 * The value below which the share p of sorted numbers lies, by linear interpolation between the two at (N − 1)p.
 * @param sorted rising, at least one
 * @param p      0 … 1
 * Source: Hyndman and Fan (1996), The American Statistician 50, 361–365, definition 7
 */
export function quantileOf(sorted: ArrayLike<number>, p: number): number {
  const at = (sorted.length - 1) * p;
  const below = Math.floor(at);
  const share = at - below;
  return share === 0 ? sorted[below] : sorted[below] + share * (sorted[below + 1] - sorted[below]);
}
