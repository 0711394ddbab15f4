import { paneWords as words } from "../src/texts/en";
import { cellsOf, formatAddress, isOnSheet, overlap, parseAddress } from "./address";
import type { SheetHost } from "./host/sheet-host";
import { readSelection } from "./reading";
import { faultyWish, forecastFormula, forecastRegion, isClean, placeOf, type PaneState } from "./state";

/** Writes the forecast formula for the block in hand, unless something speaks against it; says what became of it. */
export async function writeForecast(host: SheetHost, state: PaneState): Promise<Partial<PaneState>> {
  const { block, wishes } = state;
  const refused = (text: string) => ({ notice: { kind: "refused", text } }) as const;
  const faulty = faultyWish(wishes);
  if (faulty !== null) return refused(words.faulty[faulty]);
  const region = forecastRegion(state);
  if (!block || !region) return refused(words.badPlace(placeOf(state)));
  if (!isOnSheet(region)) return refused(words.overTheEdge);
  const read = parseAddress(block.address);
  if (read && overlap(region, read)) return refused(words.inTheWay);
  // the data may have changed since they were read
  const now = { ...block, reading: readSelection(await host.readBlock(block.address), block.address) };
  if (!isClean(now)) return { block: now, ...refused(words.changed) };
  const { filled, first } = await host.contents(formatAddress(region));
  if (first !== null) return refused(words.occupied(filled, first));
  const corner = formatAddress({ ...region, rows: 1, columns: 1 });
  await host.oneUndoStep(() => host.writeFormulas(corner, [[forecastFormula(state)]]));
  const done = words.written(cellsOf(corner), region.rows, region.columns);
  const text = host.undoesAtOnce ? done : `${done} ${words.undoSteps}`;
  return { place: corner, notice: { kind: "done", text } };
}
