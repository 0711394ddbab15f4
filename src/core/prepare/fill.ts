import type { Matrix } from "../matrix";

/** A series with its gaps bridged by straight lines, the nearest value beyond either end: good to start from, no more. */
export function bridged(x: readonly number[]): number[] {
  const known = x.flatMap((v, t) => (Number.isNaN(v) ? [] : [t]));
  return x.map((v, t) => {
    if (!Number.isNaN(v)) return v;
    const after = known.find((at) => at > t);
    const before = known.findLast((at) => at < t);
    if (after === undefined || before === undefined) return x[after ?? before!];
    return x[before] + ((x[after] - x[before]) * (t - before)) / (after - before);
  });
}

/** The same for every column. */
export function bridgedColumns(x: Matrix): Matrix {
  if (x.every((row) => row.every((v) => !Number.isNaN(v)))) return x;
  const columns = x[0].map((_, k) => bridged(x.map((row) => row[k])));
  return x.map((_, t) => columns.map((column) => column[t]));
}
