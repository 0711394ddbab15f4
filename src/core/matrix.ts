/** A rectangle of numbers, row-major; series stand in columns and time runs down the rows. */
export type Matrix = readonly (readonly number[])[];

/** The same, while it is being filled. */
export type MutableMatrix = number[][];

export const zeros = (rows: number, columns: number): MutableMatrix =>
  Array.from({ length: rows }, () => new Array<number>(columns).fill(0));

export const identity = (size: number): MutableMatrix => {
  const result = zeros(size, size);
  for (let i = 0; i < size; i++) result[i][i] = 1;
  return result;
};

export const column = (x: Matrix, j: number): number[] => x.map((row) => row[j]);

export const fromColumns = (columns: readonly ArrayLike<number>[]): MutableMatrix =>
  Array.from({ length: columns[0]?.length ?? 0 }, (_, t) => columns.map((c) => c[t]));

export const isFiniteMatrix = (x: Matrix): boolean => x.every((row) => row.every(Number.isFinite));
