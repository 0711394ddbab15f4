import { LocaleType, LogLevel, Univer, type Injector } from "@univerjs/core";
import { FUniver } from "@univerjs/core/facade";
import { UniverSheetsCorePreset } from "@univerjs/preset-sheets-core";
import englishLabels from "@univerjs/preset-sheets-core/locales/en-US";
import "@univerjs/preset-sheets-core/lib/index.css";
import { fetchListed, formulaConfig } from "./catalogue";
import { demoBook } from "./demo/book";
import { LEADS_HEAT } from "./demo/leads-sheet";
import { tintCorrelations } from "./heat";
import { explainOnHover } from "./hover-message";
import { faultMessage } from "./message-strip";
import type { HostSurroundings } from "./host-function";
import { showLegibleNumbers } from "./legible-numbers";
import { restartWhenChanged } from "./restart-when-changed";
import { enableSpillReference } from "./spill-reference";
import { cureStaleDependants } from "./stale-dependants";

/** The grid of the page with our functions in it. */
export interface Grid {
  readonly api: FUniver;
  readonly injector: Injector;
}

/** Opens the demo book in the element with the id given: grid, formula line and sheet tabs, nothing else. */
export async function openWorkbook(container: string, around: HostSurroundings): Promise<Grid> {
  const associated = (
    globalThis as unknown as { comoveAssociated: Map<string, (...args: unknown[]) => unknown> }
  ).comoveAssociated;
  const formula = formulaConfig(associated, await fetchListed(), around);
  const univer = new Univer({
    logLevel: LogLevel.WARN,
    locale: LocaleType.EN_US,
    locales: { [LocaleType.EN_US]: englishLabels },
  });
  const injector = univer.__getInjector();
  enableSpillReference(() => injector);
  const { plugins } = UniverSheetsCorePreset({
    container,
    // the header holds the formula line; without a toolbar nothing else is in it
    header: true,
    toolbar: false,
    footer: { sheetBar: true, statisticBar: false, menus: false, zoomSlider: false },
    contextMenu: false,
    formulaBar: true,
    formula: formula as never,
  });
  for (const plugin of plugins) {
    if (Array.isArray(plugin)) univer.registerPlugin(plugin[0], plugin[1]);
    else univer.registerPlugin(plugin);
  }
  const api = FUniver.newAPI(univer);
  api.createWorkbook(demoBook());
  const grid: Grid = { api, injector };
  // these reach for services that exist only once a workbook is open
  showLegibleNumbers(injector);
  tintCorrelations(injector, LEADS_HEAT);
  restartWhenChanged(injector, around.calls);
  cureStaleDependants(injector);
  explainOnHover(injector, (sheet, row, column) => faultMessage(grid, around.faults, sheet, row, column));
  return grid;
}
