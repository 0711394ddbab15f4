import { paneWords as words } from "../src/texts/en";
import { element } from "./elements";
import { freePlace } from "./free-place";
import type { SheetHost } from "./host/sheet-host";
import { readSelection } from "./reading";
import { readingView } from "./reading-view";
import { forecastSize, initialState, isClean, meaningOf, placeOf, type Block, type PaneState } from "./state";
import { writeForecast } from "./write-forecast";
import { writeForm } from "./write-form";

export interface PaneOptions {
  readonly helpUrl: string;
  /** A block to begin with, before anything is selected. */
  readonly firstBlock?: string;
  /** More controls at the foot, such as those of the embedded page. */
  readonly extras?: HTMLElement;
}

/** Builds the pane inside an element and keeps it in step with the selection. */
export function mountPane(
  root: HTMLElement,
  host: SheetHost,
  { helpUrl, firstBlock, extras }: PaneOptions,
): void {
  let state: PaneState = initialState;
  let shown: Block | null | undefined;
  let looks = 0;
  let writing = false;

  const block = element("div", { className: "block" });
  block.setAttribute("aria-live", "polite");
  const form = writeForm(
    ({ wishes, place }) =>
      update({ wishes: { ...state.wishes, ...wishes }, place: place ?? state.place, notice: null }),
    () => void write(),
  );
  const notice = element("p", { className: "notice" });
  notice.setAttribute("role", "status");
  root.classList.add("comove-pane");
  root.replaceChildren(
    element(
      "header",
      {},
      element("img", { src: "assets/icon-64.png", alt: "", width: 36, height: 36 }),
      element(
        "div",
        {},
        element("h1", { textContent: words.title }),
        element("p", { textContent: words.lead }),
      ),
    ),
    element("section", {}, element("h2", { textContent: words.station }), block),
    form.element,
    notice,
    foot(helpUrl),
    ...(extras ? [extras] : []),
  );

  function update(changes: Partial<PaneState>): void {
    state = { ...state, ...changes };
    // drawn anew only for another block, so that a focused button keeps its focus
    if (state.block !== shown) block.replaceChildren(...blockView(state.block));
    shown = state.block;
    form.show(state);
    notice.hidden = state.notice === null;
    notice.textContent = state.notice?.text ?? "";
    notice.dataset["kind"] = state.notice?.kind ?? "";
  }

  const blockView = (held: Block | null): HTMLElement[] =>
    held
      ? readingView(held, (cell) => void attempt(() => host.select(cell).then(() => ({}))))
      : [element("p", { textContent: words.nothing })];

  /** Reads a block; null when it holds no series. */
  async function read(address: string): Promise<Block | null> {
    const reading = readSelection(await host.readBlock(address), address);
    if (reading.series.length === 0) return null;
    const now: Block = { address, reading, free: null };
    const size = forecastSize(reading, state.wishes.horizon);
    return isClean(now) ? { ...now, free: await freePlace(host, address, size) } : now;
  }

  /** Follows the selection: a block is read and kept; a single cell outside it is a place for the result. */
  async function look(): Promise<void> {
    const mine = ++looks;
    await attempt(async () => {
      const address = await host.selectedAddress();
      const meaning = meaningOf(address, state);
      // a refusal is answered by another place; what was done stays said
      const notice = state.notice?.kind === "refused" ? null : state.notice;
      const chosen = meaning === "place" ? { place: address, notice } : {};
      // a block with something to mend is read again at every move, as the user may just have mended it
      const mending = state.block !== null && !isClean(state.block);
      if (meaning !== "block" && !mending) return chosen;
      const found = await read(meaning === "block" ? address : state.block!.address);
      if (mine !== looks) return {};
      if (meaning !== "block") return { block: keepIfSame(state.block, found), ...chosen };
      return found === null ? {} : { block: keepIfSame(state.block, found), place: null, notice: null };
    }, words.oneBlock);
  }

  async function write(): Promise<void> {
    // a second press while the first is at work would find the first forecast in the way
    if (writing) return;
    writing = true;
    await attempt(() => writeForecast(host, state));
    writing = false;
    // what was written is shown, even where it lies out of sight
    if (state.notice?.kind === "done") await attempt(() => host.select(placeOf(state)).then(() => ({})));
  }

  /** Does something with the host; what the host refuses is said, never lost. */
  async function attempt(
    work: () => Promise<Partial<PaneState>>,
    failed: string = words.failed,
  ): Promise<void> {
    try {
      update(await work());
    } catch (fault) {
      console.error(fault);
      update({ notice: { kind: "refused", text: failed } });
    }
  }

  host.onSelectionChanged(() => void look());
  update({});
  void (firstBlock === undefined ? look() : attempt(async () => ({ block: await read(firstBlock) })));
}

/** The block held before, where nothing in it has changed: what is drawn from it need not be drawn anew. */
const keepIfSame = (before: Block | null, now: Block | null): Block | null =>
  JSON.stringify(before) === JSON.stringify(now) ? before : now;

/** Help, and the cautions: the first in plain sight, the others a click away. */
function foot(helpUrl: string): HTMLElement {
  const [first, ...others] = words.cautions.map((text) => element("p", { textContent: text }));
  return element(
    "footer",
    {},
    first,
    element("details", {}, element("summary", { textContent: words.cautionsTitle }), ...others),
    element("a", { href: helpUrl, target: "_blank", rel: "noopener", textContent: words.help }),
  );
}
