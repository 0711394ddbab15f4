import { paneWords as words } from "../src/texts/en";
import { formatAddress, parseAddress } from "./address";
import { element } from "./elements";
import type { SheetHost } from "./host/sheet-host";
import { readSelection } from "./reading";
import { readingView } from "./reading-view";
import { forecastFormula, forecastRegion, initialState, isClean, placeOf, type PaneState } from "./state";

export interface PaneOptions {
  readonly helpUrl?: string;
  /** More controls at the foot, such as those of the embedded page. */
  readonly extras?: HTMLElement;
}

/** Builds the pane inside an element and keeps it in step with the selection. */
export function mountPane(root: HTMLElement, host: SheetHost, { helpUrl, extras }: PaneOptions = {}): void {
  let state: PaneState = initialState;
  const block = element("div", { className: "block" });
  block.setAttribute("aria-live", "polite");
  const form = writeForm(
    (changes) => update(changes),
    () => void write(),
  );
  const notice = element("p", { className: "notice", hidden: true });
  notice.setAttribute("role", "status");
  root.classList.add("comove-pane");
  root.replaceChildren(
    element(
      "header",
      {},
      element("h1", { textContent: words.title }),
      element("p", { textContent: words.lead }),
    ),
    element("section", {}, element("h2", { textContent: words.station }), block, form.element, notice),
    cautions(),
    ...(helpUrl
      ? [
          element(
            "p",
            {},
            element("a", { href: helpUrl, target: "_blank", rel: "noopener", textContent: words.help }),
          ),
        ]
      : []),
    ...(extras ? [extras] : []),
  );

  function update(changes: Partial<PaneState>): void {
    state = { ...state, ...changes };
    block.replaceChildren(...readingView(state));
    form.show(state);
    notice.hidden = state.notice === null;
    notice.textContent = state.notice?.text ?? "";
    notice.dataset["kind"] = state.notice?.kind ?? "";
  }

  async function look(): Promise<void> {
    const address = await host.selectedAddress();
    const reading = readSelection(await host.readBlock(address));
    // a new block gets a new proposal; the notice of the last write stays until something else is selected
    update(address === state.address ? { reading } : { address, reading, place: null, notice: null });
  }

  async function write(): Promise<void> {
    update({ notice: await writeForecast(host, state) });
  }

  host.onSelectionChanged(() => void look());
  update({});
  void look();
}

/** Writes the forecast formula, unless something is in its way. */
async function writeForecast(host: SheetHost, state: PaneState): Promise<PaneState["notice"]> {
  const refused = (text: string) => ({ kind: "refused", text }) as const;
  if (!Number.isInteger(state.horizon) || state.horizon < 1 || state.horizon > 10_000)
    return refused(words.badHorizon);
  const region = forecastRegion(state);
  if (!region) return refused(words.badPlace(placeOf(state)));
  try {
    const { filled, first } = await host.contents(formatAddress(region));
    if (first !== null) return refused(words.occupied(filled, first));
    const corner = formatAddress({ ...region, rows: 1, columns: 1 });
    const formula = forecastFormula(state);
    await host.oneUndoStep(() => host.writeFormulas(corner, [[formula]]));
    return { kind: "done", text: words.written(formula, corner) };
  } catch {
    return refused(words.failed);
  }
}

/** The controls that write a forecast; shown for a clean block only. */
function writeForm(change: (changes: Partial<PaneState>) => void, submit: () => void) {
  const horizon = element("input", { type: "number", min: "1", max: "10000", step: "1", name: "horizon" });
  const place = element("input", { type: "text", name: "place", spellcheck: false, autocomplete: "off" });
  const form = element(
    "form",
    { className: "write", noValidate: true },
    element("label", {}, words.horizon, horizon),
    element("label", {}, words.place, place),
    element("button", { type: "submit", textContent: words.write }),
  );
  horizon.addEventListener("input", () => change({ horizon: horizon.valueAsNumber }));
  place.addEventListener("input", () => change({ place: place.value }));
  form.addEventListener("submit", (event) => {
    event.preventDefault();
    submit();
  });
  const show = (state: PaneState) => {
    form.hidden = !isClean(state) || parseAddress(state.address) === null;
    if (document.activeElement !== horizon) horizon.value = String(state.horizon);
    if (document.activeElement !== place) place.value = placeOf(state);
  };
  return { element: form, show };
}

const cautions = (): HTMLElement =>
  element(
    "details",
    { className: "cautions" },
    element("summary", { textContent: words.cautionsTitle }),
    ...words.cautions.map((text) => element("p", { textContent: text })),
  );
