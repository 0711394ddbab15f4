// placeholder while the first pieces are joined
export function answer(_call: unknown, _args: unknown): any[][] {
  return [[0]];
}
