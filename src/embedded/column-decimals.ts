/** Figures that the largest number of a column is shown with. */
const FIGURES = 6;

/** Figures that the smallest is not to fall below, as far as the most decimals allow. */
const LEAST_FIGURES = 3;
const MOST_DECIMALS = 6;

/** Decimals at which the numbers of a column stand below each other and can be read; whole numbers take none. */
export function columnDecimals(values: readonly number[]): number {
  const sizes = values.filter((value) => value !== 0 && Number.isFinite(value)).map(Math.abs);
  if (sizes.length === 0 || values.every(Number.isInteger)) return 0;
  const digits = (size: number) => Math.floor(Math.log10(size)) + 1;
  const largest = sizes.reduce((a, b) => Math.max(a, b));
  const smallest = sizes.reduce((a, b) => Math.min(a, b));
  const wanted = Math.max(FIGURES - Math.max(1, digits(largest)), LEAST_FIGURES - digits(smallest));
  return Math.min(MOST_DECIMALS, Math.max(0, wanted));
}

/** A number at so many decimals; one that would show as nothing but zeros is written with a power of ten. */
export function atDecimals(value: number, decimals: number): string {
  const fixed = value.toFixed(decimals);
  return value !== 0 && Number(fixed) === 0 ? value.toExponential(LEAST_FIGURES - 1) : fixed;
}
