import { ALL_COLUMNS, formatAddress, isOneCell, isOnSheet, parseAddress } from "./address";
import type { SheetHost } from "./host/sheet-host";

/** Columns looked at for a free place, to the right of a block. */
const SEARCHED = 60;

/**
 * The first cell right of a block from which a result of the size given lies free, with a blank column on either
 * side, beside the block's first row; null when there is none near.
 */
export async function freePlace(
  host: SheetHost,
  address: string,
  { rows, columns }: { readonly rows: number; readonly columns: number },
): Promise<string | null> {
  const block = parseAddress(address);
  if (!block || isOneCell(block)) return null;
  const column = block.column + block.columns;
  const width = Math.min(SEARCHED, ALL_COLUMNS - column);
  if (width < columns + 2 || !isOnSheet({ ...block, rows })) return null;
  const cells = await host.readBlock(formatAddress({ ...block, column, columns: width, rows }));
  const used = Array.from({ length: width }, (_, j) => cells.some((row) => (row[j] ?? null) !== null));
  for (let from = 1; from + columns < width; from++) {
    if (used.slice(from - 1, from + columns + 1).includes(true)) continue;
    return formatAddress({ ...block, column: column + from, rows: 1, columns: 1 });
  }
  return null;
}
