import { paneWords as words } from "../src/texts/en";
import { cellsOf } from "./address";
import { element } from "./elements";
import { sparkline } from "./plots/sparkline";
import type { Problem, Reading, SeriesFound } from "./reading";
import type { Block } from "./state";

/** Problems and series shown before the rest is only counted. */
const SHOWN = 8;

/** Rows below which a joint model is a gamble: a fact of practice. */
const FEW_ROWS = 50;

/** What was found in the block in hand, as elements. */
export function readingView({ address, reading }: Block, goTo: (cell: string) => void): HTMLElement[] {
  const head = element(
    "p",
    { className: "found" },
    element("span", { className: "address", textContent: address }),
    ...(reading.series.length === 0 ? [] : [words.found(reading.series.length, reading.rows)]),
  );
  return [head, ...seriesList(reading.series), ...cautions(reading), ...verdict(reading.problems, goTo)];
}

function seriesList(series: readonly SeriesFound[]): HTMLElement[] {
  if (series.length === 0) return [];
  const items = series
    .slice(0, SHOWN)
    .map(({ name, values }) =>
      element(
        "li",
        {},
        element("span", { className: "name", textContent: name, title: name }),
        sparkline(values),
        element("span", { className: "range", textContent: rangeWords(values) }),
      ),
    );
  if (series.length > SHOWN) items.push(element("li", { textContent: words.more(series.length - SHOWN) }));
  return [element("ul", { className: "series" }, ...items)];
}

/** Lowest to highest value, short. */
function rangeWords(values: readonly number[]): string {
  const numbers = values.filter(Number.isFinite);
  if (numbers.length === 0) return "";
  const short = (value: number) => value.toLocaleString("en-US", { maximumSignificantDigits: 4 });
  const low = numbers.reduce((a, b) => Math.min(a, b));
  const high = numbers.reduce((a, b) => Math.max(a, b));
  return `${short(low)} to ${short(high)}`;
}

function cautions({ hasHeader, series, rows, gaps, problems }: Reading): HTMLElement[] {
  const said = [
    ...(!hasHeader && series.length > 0 ? [words.noHeader] : []),
    ...(problems.length === 0 && rows < FEW_ROWS ? [words.fewRows] : []),
    ...(gaps > 0 ? [words.blanksAsZero] : []),
  ];
  return said.map((text) => element("p", { className: "caution", textContent: text }));
}

function verdict(problems: readonly Problem[], goTo: (cell: string) => void): HTMLElement[] {
  if (problems.length === 0) return [element("p", { className: "clean", textContent: words.clean })];
  const items = problems.slice(0, SHOWN).map((problem) => problemItem(problem, goTo));
  if (problems.length > SHOWN)
    items.push(element("li", { textContent: words.more(problems.length - SHOWN) }));
  return [
    element("p", { className: "mend", textContent: words.problems(problems.length) }),
    element("ul", { className: "problems" }, ...items),
  ];
}

function problemItem({ text, cell }: Problem, goTo: (cell: string) => void): HTMLElement {
  if (cell === null) return element("li", { textContent: text });
  const jump = element("button", { type: "button", className: "jump", textContent: cellsOf(cell) });
  jump.setAttribute("aria-label", words.goTo(cellsOf(cell)));
  jump.addEventListener("click", () => goTo(cell));
  return element("li", {}, jump, element("span", { textContent: text }));
}
