import { paneWords as words } from "../src/texts/en";
import { element } from "./elements";
import type { PaneState } from "./state";

/** Problems shown before the rest is only counted. */
const SHOWN = 8;

/** What was found in the selected block, as elements. */
export function readingView({ address, reading }: PaneState): HTMLElement[] {
  if (reading === null || reading.rows === 0) return [element("p", { textContent: words.nothing })];
  const line = (text: string, className = "") => element("p", { className, textContent: text });
  return [
    line(address, "address"),
    line(words.seriesFound(reading.names)),
    line(words.rowsFound(reading.rows)),
    ...(reading.hasHeader ? [] : [line(words.noHeader, "caution")]),
    ...(reading.problems.length === 0 && reading.rows < 50 ? [line(words.fewRows, "caution")] : []),
    ...(reading.problems.length === 0 ? [line(words.clean, "clean")] : problemList(reading.problems)),
  ];
}

function problemList(problems: readonly string[]): HTMLElement[] {
  const items = problems.slice(0, SHOWN).map((text) => element("li", { textContent: text }));
  if (problems.length > SHOWN)
    items.push(element("li", { textContent: words.more(problems.length - SHOWN) }));
  return [
    element("p", { className: "problems", textContent: words.problems(problems.length) }),
    element("ul", {}, ...items),
  ];
}
