/** Sheet names hold at most this many characters. */
const LONGEST = 31;

/** A name for a new sheet that no other has, without the signs that sheet names must not hold. */
export function freeSheetName(wanted: string, taken: readonly string[]): string {
  const used = new Set(taken.map((name) => name.toLowerCase()));
  const clean =
    wanted
      .replace(/[\\/?*:[\]]/g, " ")
      .replace(/^'+|'+$/g, "")
      .trim() || "Sheet";
  const numbered = (n: number) => {
    const ending = n === 1 ? "" : ` ${n}`;
    return clean.slice(0, LONGEST - ending.length).trimEnd() + ending;
  };
  let n = 1;
  while (used.has(numbered(n).toLowerCase())) n++;
  return numbered(n);
}
