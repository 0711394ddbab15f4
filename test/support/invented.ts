import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { normalQuantile } from "../../src/core/distributions";

/** Seeded standard normal draws. */
export function normals(seed: number): () => number {
  const generator = xoroshiro128plus(seed);
  return () => normalQuantile(Math.min(1 - 1e-16, Math.max(1e-16, uniformFloat64(generator))));
}

/**
 * Invented, stable and asymmetric: series k follows series k − 1 by one row, each with its own memory,
 * scale and mean, so that swapped rows, columns or directions cannot pass unnoticed.
 */
export function inventedSeries(rows: number, series: number, seed = 7): number[][] {
  const draw = normals(seed);
  const deviations: number[][] = [];
  for (let t = 0; t < rows + 50; t++) {
    const before = deviations[t - 1] ?? new Array<number>(series).fill(0);
    deviations.push(
      before.map((v, k) => (0.55 - 0.1 * k) * v + (k > 0 ? (0.4 + 0.05 * k) * before[k - 1] : 0) + draw()),
    );
  }
  return deviations.slice(50).map((row) => row.map((v, k) => 10 * (k + 1) + (1 + k) * v));
}
