import { Issue } from "../core/issue";
import { describeCell, isBlank, toCells, type Cell } from "./cell";
import { OPTIONS, type OptionKey, type OptionValues } from "./option-specs";

/** The options of a call, each either given or absent; defaults are filled in where they are used. */
export type Options = Partial<OptionValues>;

/**
 * Reads the options argument: text `key=value; key=value`, the same in several cells of one column, or a
 * two-column range of keys and values.
 * @param call    the function's name, for messages
 * @param allowed the keys that apply to it
 * @throws Issue "unknown-option" | "option-not-here" | "option-twice" | "option-without-value" | "bad-option"
 */
export function readOptions(raw: unknown, call: string, allowed: readonly OptionKey[]): Options {
  const given = new Map<OptionKey, unknown>();
  for (const [word, value] of pairs(raw)) {
    const key = Object.keys(OPTIONS).find((known) => known === word) as OptionKey | undefined;
    if (key === undefined) throw new Issue({ code: "unknown-option", key: word, allowed });
    if (!allowed.includes(key)) throw new Issue({ code: "option-not-here", key, call, allowed });
    if (given.has(key)) throw new Issue({ code: "option-twice", key });
    given.set(key, readValue(key, value));
  }
  return Object.fromEntries(given) as Options;
}

function readValue(key: OptionKey, cell: Cell): unknown {
  const spec = OPTIONS[key];
  const text = typeof cell === "boolean" ? (cell ? "yes" : "no") : String(cell);
  const value = typeof cell === "object" ? undefined : spec.parse(text.trim());
  if (value === undefined)
    throw new Issue({ code: "bad-option", key, found: describeCell(cell), allowed: spec.allowed });
  return value;
}

/** Keys in lower case with their values, in the order written. */
function pairs(raw: unknown): [string, Cell][] {
  const cells = toCells(raw);
  if (cells === null) return [];
  const width = cells[0].length;
  if (width > 2) throw new Issue({ code: "bad-range-options", columns: width });
  if (width === 2) return cells.filter((row) => !row.every(isBlank)).map(rowPair);
  return cells.flat().flatMap((cell) => (isBlank(cell) ? [] : textPairs(cell)));
}

function rowPair([key, value]: readonly Cell[]): [string, Cell] {
  if (isBlank(value) || typeof key !== "string")
    throw new Issue({ code: "option-without-value", text: describeCell(key) });
  return [key.trim().toLowerCase(), value];
}

function textPairs(cell: Cell): [string, Cell][] {
  if (typeof cell !== "string") throw new Issue({ code: "option-without-value", text: describeCell(cell) });
  return cell
    .split(/[;\n]/)
    .filter((part) => part.trim() !== "")
    .map((part) => {
      const at = part.indexOf("=");
      const value = part.slice(at + 1).trim();
      if (at < 0 || value === "")
        throw new Issue({ code: "option-without-value", text: describeCell(part.trim()) });
      return [part.slice(0, at).trim().toLowerCase(), value];
    });
}
