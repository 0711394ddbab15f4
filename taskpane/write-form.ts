import { paneWords as words } from "../src/texts/en";
import { cellsOf } from "./address";
import { element } from "./elements";
import {
  faultyWish,
  forecastFormula,
  forecastRegion,
  isClean,
  placeOf,
  type PaneState,
  type Wishes,
} from "./state";

export interface WriteForm {
  readonly element: HTMLElement;
  show(state: PaneState): void;
}

/** The controls that write a forecast; shown for a clean block only. */
export function writeForm(
  change: (changes: { wishes?: Partial<Wishes>; place?: string }) => void,
  submit: () => void,
): WriteForm {
  const horizon = numberField("horizon", 1);
  const cycle = numberField("cycle", 2, words.cycleHint);
  const waves = numberField("waves", 1, words.wavesHint);
  const place = element("input", { type: "text", name: "place", spellcheck: false, autocomplete: "off" });
  const formula = element("output", { className: "formula" });
  const wavesLabel = element("label", {}, words.waves, waves);
  const form = element(
    "form",
    { className: "write", noValidate: true },
    element("h2", { textContent: words.writing }),
    element("label", {}, words.horizon, horizon),
    element("label", {}, words.place, place),
    element("label", {}, words.cycle, cycle),
    wavesLabel,
    element("p", { className: "hint", textContent: words.placeHint }),
    element("div", { className: "preview" }, element("span", { textContent: words.formula }), formula),
    element("button", { type: "submit", className: "main", textContent: words.write }),
  );
  horizon.addEventListener("input", () => change({ wishes: { horizon: horizon.valueAsNumber } }));
  cycle.addEventListener("input", () => change({ wishes: { cycle: numberOrNull(cycle) } }));
  waves.addEventListener("input", () => change({ wishes: { waves: numberOrNull(waves) } }));
  place.addEventListener("input", () => change({ place: place.value }));
  form.addEventListener("submit", (event) => {
    event.preventDefault();
    submit();
  });
  const show = (state: PaneState) => {
    form.hidden = state.block === null || !isClean(state.block);
    if (form.hidden) return;
    // what the user is typing is left alone
    if (document.activeElement !== horizon) horizon.value = asText(state.wishes.horizon);
    if (document.activeElement !== cycle) cycle.value = asText(state.wishes.cycle);
    if (document.activeElement !== waves) waves.value = asText(state.wishes.waves);
    if (document.activeElement !== place) place.value = placeText(state);
    wavesLabel.hidden = state.wishes.cycle === null;
    formula.textContent =
      faultyWish(state.wishes) === null && forecastRegion(state) ? forecastFormula(state) : "…";
  };
  return { element: form, show };
}

const numberField = (name: keyof Wishes, min: number, placeholder = ""): HTMLInputElement =>
  element("input", { type: "number", inputMode: "numeric", name, min: String(min), step: "1", placeholder });

const numberOrNull = (field: HTMLInputElement): number | null =>
  field.value === "" ? null : field.valueAsNumber;

const asText = (value: number | null): string => (value === null || Number.isNaN(value) ? "" : String(value));

/** The place as proposed or chosen; its sheet is only named where it is another than the block's. */
function placeText(state: PaneState): string {
  const place = placeOf(state);
  const sheetOf = (address: string) => address.slice(0, address.lastIndexOf("!") + 1);
  return state.block && sheetOf(place) === sheetOf(state.block.address) ? cellsOf(place) : place;
}
