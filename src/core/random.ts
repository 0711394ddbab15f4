import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { normalQuantile } from "./distributions";

/** Seeded numbers that look random: the same seed gives the same numbers on every machine. */
export interface RandomSource {
  /** Uniform in (0, 1), both ends left out. */
  uniform(): number;
  /** A whole number 0 … count − 1, each as likely. */
  below(count: number): number;
  /** Standard normal, by the quantile function of a uniform number. */
  normal(): number;
}

/** Seeds are told apart up to this one. */
export const LARGEST_SEED = 2 ** 32 - 1;

/** @param seed whole, 0 … LARGEST_SEED */
export function randomSource(seed: number): RandomSource {
  const generator = xoroshiro128plus(scattered(seed));
  // the generator's state is mostly zeros and ones at first, and its first numbers show it
  for (let i = 0; i < WARM_UP; i++) generator.next();
  // multiples of 2⁻⁵³ moved by half a step, so that neither 0 nor 1 occurs, where the quantile is infinite
  const uniform = () => uniformFloat64(generator) + 2 ** -54;
  return {
    uniform,
    below: (count) => Math.floor(uniform() * count),
    normal: () => normalQuantile(uniform()),
  };
}

const WARM_UP = 64;

/**
 * A seed far from those of its neighbours, one for one (the finalizer of MurmurHash3, 32 bits): seeds 1, 2, 3 would
 * otherwise begin states that differ in one bit, and their numbers would be alike.
 */
function scattered(seed: number): number {
  let bits = seed >>> 0;
  bits = Math.imul(bits ^ (bits >>> 16), 0x85ebca6b);
  bits = Math.imul(bits ^ (bits >>> 13), 0xc2b2ae35);
  return (bits ^ (bits >>> 16)) >>> 0;
}
