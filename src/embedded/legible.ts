/** Figures shown where a cell has no number format of its own; the value itself keeps all of its digits. */
const FIGURES = 6;

/** A number at a legible length: fractions are cut to the figures, whole parts are never touched. */
export function legible(value: number): number {
  if (Number.isInteger(value) || !Number.isFinite(value)) return value;
  return Math.abs(value) >= 10 ** FIGURES ? Math.round(value) : Number(value.toPrecision(FIGURES));
}
