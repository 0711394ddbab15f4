import { dotDense, type StateSpace } from "./state-space";

/** N with one more cell seen: z zᵀ/F + LᵀNL, L = I − gain·zᵀ. */
export function seeCell(
  n: Float64Array,
  { size, observed }: StateSpace,
  {
    series,
    variance,
    gain,
  }: { readonly series: number; readonly variance: number; readonly gain: Float64Array },
): void {
  const at = observed.at[series];
  const value = observed.value[series];
  const reach = new Float64Array(size);
  for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) reach[i] += n[i * size + j] * gain[j];
  const own = dotDense(gain, reach) + 1 / variance;
  for (let e = 0; e < at.length; e++) {
    for (let i = 0; i < size; i++) {
      n[at[e] * size + i] -= value[e] * reach[i];
      n[i * size + at[e]] -= value[e] * reach[i];
    }
  }
  for (let e = 0; e < at.length; e++)
    for (let f = 0; f < at.length; f++) n[at[e] * size + at[f]] += value[e] * value[f] * own;
}

/** r with one more cell seen: z·pull added. */
export function pullBy(to: Float64Array, { observed }: StateSpace, series: number, pull: number): void {
  const at = observed.at[series];
  for (let e = 0; e < at.length; e++) to[at[e]] += observed.value[series][e] * pull;
}
