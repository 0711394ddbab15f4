import { wrappers } from "./wrappers";

/** A cell as the host hands it over. */
type Cell = number | string | boolean | null;
type Value = Cell | Cell[][];

/** The cells that formulas point at. */
export interface FormulaSheet {
  /** Cells of a block such as B4:E160. */
  range(address: string): Cell[][];
  /** The formula in the corner of a spill such as G2#. */
  spilling(corner: string): string;
}

const TOKEN =
  /\s*(?:COMOVE\.([A-Z]+)\(|"((?:[^"]|"")*)"|([A-Z]+\d+:[A-Z]+\d+)|([A-Z]+\d+)#|(-?\d+(?:\.\d+)?)|(.))/y;

/**
 * Computes a formula of the help or the documents with the wrappers themselves: sheet functions, texts, numbers,
 * blocks, spills, rows of constants, and arguments left out.
 */
export async function computeFormula(formula: string, sheet: FormulaSheet): Promise<Value> {
  let at = 1;
  if (!formula.startsWith("=")) throw new Error(`${formula} does not start with =`);
  const value = await expression();
  if (formula.slice(at).trim() !== "")
    throw new Error(`${formula} goes on after its end: ${formula.slice(at)}`);
  return value;

  function peek(): string {
    return formula.slice(at).trimStart()[0] ?? "";
  }

  async function expression(): Promise<Value> {
    if (peek() === "," || peek() === ")") return null;
    TOKEN.lastIndex = at;
    const [, call, text, block, spill, number, other] = TOKEN.exec(formula) ?? [];
    at = TOKEN.lastIndex;
    if (call !== undefined) return callOf(call, await list(")"));
    if (text !== undefined) return text.replaceAll('""', '"');
    if (block !== undefined) return sheet.range(block);
    if (spill !== undefined) return computeFormula(sheet.spilling(spill), sheet);
    if (number !== undefined) return Number(number);
    if (other === "{") return [(await list("}")) as Cell[]];
    throw new Error(`${formula} cannot be read at '${other}'`);
  }

  async function list(close: string): Promise<Value[]> {
    const values = [await expression()];
    while (peek() === ",") {
      at = formula.indexOf(",", at) + 1;
      values.push(await expression());
    }
    if (peek() !== close) throw new Error(`${formula} misses a ${close}`);
    at = formula.indexOf(close, at) + 1;
    return values;
  }

  async function callOf(id: string, args: readonly Value[]): Promise<Value> {
    const wrapper = wrappers.get(id);
    if (wrapper === undefined) throw new Error(`There is no function ${id}`);
    const missing = Array.from({ length: Math.max(0, wrapper.length - args.length) }, () => null);
    return (await wrapper(...args, ...missing)) as Value;
  }
}
