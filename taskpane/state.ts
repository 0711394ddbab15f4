import { formatAddress, parseAddress, type Region } from "./address";
import type { Reading } from "./reading";

/** What the pane knows; everything it shows follows from it. */
export interface PaneState {
  readonly address: string;
  readonly reading: Reading | null;
  readonly horizon: number;
  /** Where the forecast goes, when the user chose a place. */
  readonly place: string | null;
  /** The last thing done or refused, in words. */
  readonly notice: { readonly kind: "done" | "refused"; readonly text: string } | null;
}

export const initialState: PaneState = { address: "", reading: null, horizon: 12, place: null, notice: null };

/** A block that a model can be fitted to: at least one series, no problems. */
export const isClean = ({ reading }: PaneState): boolean =>
  reading !== null && reading.names.length > 0 && reading.problems.length === 0;

/** One column right of the block with one gap between, beside its first row. */
export function proposedPlace(address: string): string {
  const region = parseAddress(address);
  if (!region) return "";
  return formatAddress({ ...region, column: region.column + region.columns + 1, rows: 1, columns: 1 });
}

/** Where the forecast goes, as shown in its field. */
export const placeOf = (state: PaneState): string => state.place ?? proposedPlace(state.address);

/** The cell meant; without a sheet's name it lies on the sheet of the block. Null when it is none. */
function corner(state: PaneState): Region | null {
  const place = parseAddress(placeOf(state));
  return place && { ...place, sheet: place.sheet ?? parseAddress(state.address)?.sheet ?? null };
}

/** The region that the forecast will fill, header included; null when the place is no cell. */
export function forecastRegion(state: PaneState): Region | null {
  const from = corner(state);
  if (!from || !state.reading) return null;
  return {
    ...from,
    rows: state.horizon + (state.reading.hasHeader ? 1 : 0),
    columns: state.reading.names.length,
  };
}

/** The formula for a block, written for a cell of the same sheet without the sheet's name. */
export function forecastFormula(state: PaneState): string {
  const block = parseAddress(state.address)!;
  const sameSheet = corner(state)?.sheet === block.sheet;
  return `=COMOVE.AHEAD(${formatAddress({ ...block, sheet: sameSheet ? null : block.sheet })},${state.horizon})`;
}
