/** A function's value and gradient at a point. */
export interface Slope {
  readonly value: number;
  readonly gradient: Float64Array;
}

export interface Minimum extends Slope {
  readonly point: Float64Array;
  /** gᵀHg at the end: twice what the value would still fall by if the function were the parabola it looks like. */
  readonly decrement: number;
  readonly steps: number;
}

/** Enough: on a scale of likelihoods the point is known to 1e-7 of its standard error. */
const SETTLED = 1e-14;
const MOST_STEPS = 300;
/** Points looked at before the search is given up: a function that has a lowest point needs little more than its steps. */
const MOST_POINTS = 600;
const MOST_HALVINGS = 25;
/** A step must bring this share of what the slope promises. */
const SHARE = 1e-4;

/**
 * Minimises a smooth function by the quasi-Newton method of Broyden, Fletcher, Goldfarb and Shanno, deterministic. The
 * coordinates should be such that the curvature at the start is near one in every direction.
 * @param at the function, or null outside its domain; its value and slope at the start exist
 * Source: Nocedal and Wright (2006), 6.1; backtracking 3.5
 */
export function minimise(at: (point: Float64Array) => Slope | null, start: Float64Array): Minimum {
  const size = start.length;
  let here = { point: start, ...at(start)! };
  let inverse = unit(size);
  let steps = 0;
  let points = 0;
  const counted = (point: Float64Array) => {
    points++;
    return at(point);
  };
  for (let fresh = true; ;) {
    const direction = times(inverse, here.gradient).map((v) => -v);
    const decrement = -dot(direction, here.gradient);
    if (decrement <= SETTLED || steps >= MOST_STEPS || points >= MOST_POINTS)
      return { ...here, decrement, steps };
    const next = search(counted, here, direction, decrement);
    if (next === null) {
      // the curvature gathered so far may mislead: once more from the bare slope, then this is as far as it goes
      if (fresh) return { ...here, decrement, steps };
      inverse = unit(size);
      fresh = true;
      continue;
    }
    fresh = false;
    learn(
      inverse,
      next.point.map((v, i) => v - here.point[i]),
      next.gradient.map((v, i) => v - here.gradient[i]),
    );
    here = next;
    steps++;
  }
}

/** The first of the points at full, half, … step that is low enough; null when rounding hides any fall. */
function search(
  at: (point: Float64Array) => Slope | null,
  here: Slope & { readonly point: Float64Array },
  direction: Float64Array,
  decrement: number,
): (Slope & { readonly point: Float64Array }) | null {
  // differences of the value smaller than this are rounding; there the slope alone decides
  const rounding = 1e-13 * Math.abs(here.value);
  let length = 1;
  for (let halving = 0; halving < MOST_HALVINGS; halving++) {
    const point = here.point.map((v, i) => v + length * direction[i]);
    const there = at(point);
    if (there !== null) {
      if (there.value <= here.value - SHARE * length * decrement) return { point, ...there };
      if (
        length * decrement < rounding &&
        Math.abs(dot(there.gradient, direction)) < decrement / 2 &&
        there.value <= here.value + rounding
      )
        return { point, ...there };
    }
    length *= there === null ? 0.25 : shorter(here.value, decrement, length, there.value);
  }
  return null;
}

/** The share of a step at which the parabola through both values and the slope is lowest, within bounds. */
function shorter(value: number, decrement: number, length: number, there: number): number {
  const best = (decrement * length) / (2 * (there - value + decrement * length));
  return best > 0.1 && best < 0.5 ? best : 0.3;
}

/** The update of the inverse curvature; none when the slope did not rise along the step. */
function learn(inverse: Float64Array, step: Float64Array, change: Float64Array): void {
  const size = step.length;
  const rise = dot(step, change);
  if (!(rise > 1e-12 * Math.sqrt(dot(step, step) * dot(change, change)))) return;
  const moved = times(inverse, change);
  const factor = (1 + dot(change, moved) / rise) / rise;
  for (let i = 0; i < size; i++)
    for (let j = 0; j < size; j++)
      inverse[i * size + j] += factor * step[i] * step[j] - (moved[i] * step[j] + step[i] * moved[j]) / rise;
}

function unit(size: number): Float64Array {
  const out = new Float64Array(size * size);
  for (let i = 0; i < size; i++) out[i * size + i] = 1;
  return out;
}

function times(matrix: Float64Array, x: Float64Array): Float64Array {
  const size = x.length;
  const out = new Float64Array(size);
  for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) out[i] += matrix[i * size + j] * x[j];
  return out;
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}
