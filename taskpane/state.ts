import { formatAddress, isOneCell, isSameSheet, overlap, parseAddress, type Region } from "./address";
import type { Reading } from "./reading";

/** A block of series that the user selected, and what was found in it. */
export interface Block {
  readonly address: string;
  readonly reading: Reading;
  /** A place near it that is free for a forecast, if one was found. */
  readonly free: string | null;
}

/** What the user asks for in the form; NaN stands for a field that holds no number. */
export interface Wishes {
  readonly horizon: number;
  /** Rows after which the season repeats; null for none. */
  readonly cycle: number | null;
  /** Smooth waves that make up the season; null for one value per row of it. */
  readonly waves: number | null;
}

/** What the pane knows; everything it shows follows from it. */
export interface PaneState {
  /** The block in hand: it stays while the user picks a cell for the result or mends the data. */
  readonly block: Block | null;
  readonly wishes: Wishes;
  /** Where the forecast goes, when the user chose a place. */
  readonly place: string | null;
  /** The last thing done or refused, in words. */
  readonly notice: { readonly kind: "done" | "refused"; readonly text: string } | null;
}

export const initialState: PaneState = {
  block: null,
  wishes: { horizon: 12, cycle: null, waves: null },
  place: null,
  notice: null,
};

/** What a selection means: a block to read, a place for the result, or nothing for the pane. */
export function meaningOf(address: string, state: PaneState): "block" | "place" | "nothing" {
  const { block } = state;
  const region = parseAddress(address);
  if (!region) return "nothing";
  if (!isOneCell(region)) return "block";
  const held = block && parseAddress(block.address);
  // turning to another sheet is not yet the wish to write there; such a place can be typed
  if (!held || region.sheet !== held.sheet || overlap(region, held)) return "nothing";
  return address === placeOf(state) ? "nothing" : "place";
}

/** A block that a model can be fitted to: at least one series, no problems. */
export const isClean = ({ reading }: { readonly reading: Reading }): boolean =>
  reading.series.length > 0 && reading.problems.length === 0;

/** Rows and columns that a forecast of a block fills, the names included. */
export const forecastSize = ({ hasHeader, series }: Reading, horizon: number) => ({
  rows: horizon + (hasHeader ? 1 : 0),
  columns: series.length,
});

/** One column right of the block with one gap between, beside its first row. */
export function proposedPlace(address: string): string {
  const region = parseAddress(address);
  if (!region) return "";
  return formatAddress({ ...region, column: region.column + region.columns + 1, rows: 1, columns: 1 });
}

export const placeOf = ({ place, block }: PaneState): string =>
  place ?? (block ? (block.free ?? proposedPlace(block.address)) : "");

/** The cell at which the forecast begins, on the block's sheet unless another is named; null when it is no cell. */
function corner(state: PaneState): Region | null {
  const region = parseAddress(placeOf(state));
  if (!region || !isOneCell(region) || !state.block) return null;
  return { ...region, sheet: region.sheet ?? parseAddress(state.block.address)?.sheet ?? null };
}

/** The region that the forecast will fill, header included; null when the place is no cell. */
export function forecastRegion(state: PaneState): Region | null {
  const start = corner(state);
  if (!start || !state.block) return null;
  return { ...start, ...forecastSize(state.block.reading, state.wishes.horizon) };
}

/** What is wrong with the wishes, as the name of the field; null when they can be written as a formula. */
export function faultyWish({ horizon, cycle, waves }: Wishes): keyof Wishes | null {
  const whole = (value: number, from: number, to: number) =>
    Number.isInteger(value) && value >= from && value <= to;
  if (!whole(horizon, 1, 10_000)) return "horizon";
  if (cycle !== null && !whole(cycle, 2, 100_000)) return "cycle";
  if (cycle !== null && waves !== null && !whole(waves, 1, Math.floor(cycle / 2))) return "waves";
  return null;
}

/** The formula for the block in hand, written for a cell of the same sheet without the sheet's name. */
export function forecastFormula(state: PaneState): string {
  const { horizon, cycle, waves } = state.wishes;
  const block = parseAddress(state.block!.address)!;
  const at = corner(state);
  const sheet = at && isSameSheet(at.sheet, block.sheet) ? null : block.sheet;
  const season = cycle === null ? "" : `,,"cycle=${cycle}${waves === null ? "" : `; waves=${waves}`}"`;
  return `=COMOVE.AHEAD(${formatAddress({ ...block, sheet })},${horizon}${season})`;
}
