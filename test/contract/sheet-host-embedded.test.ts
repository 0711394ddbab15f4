import { afterAll, expect, it } from "vitest";
import type { Contents, SheetHost } from "../../taskpane/host/sheet-host";
import { SheetPage } from "../browser/sheet-page";
import { sheetHostContract } from "./sheet-host-suite";

let sheet: SheetPage;
afterAll(() => sheet.close());

/** The embedded host, spoken to through the browser. */
function remoteHost({ page }: SheetPage): SheetHost {
  const call = <T>(method: string, ...args: unknown[]): Promise<T> =>
    page.evaluate(
      ([name, values]) => (globalThis as any).comovePage.host[name as string](...(values as unknown[])),
      [method, args] as const,
    ) as Promise<T>;
  return {
    canChart: false,
    undoesAtOnce: true,
    select: (address) => call<void>("select", address),
    selectedAddress: () => call<string>("selectedAddress"),
    readBlock: (address) => call<unknown[][]>("readBlock", address),
    writeFormulas: (address, formulas) => call<void>("writeFormulas", address, formulas),
    writeLabels: (address, labels) => call<void>("writeLabels", address, labels),
    addSheet: (name) => call<string>("addSheet", name),
    nameRange: (name, address) => call<void>("nameRange", name, address),
    addChart: (chart) => call<void>("addChart", chart),
    contents: (address) => call<Contents>("contents", address),
    // a function cannot cross into the page: the work is done here and only its place is kept there
    oneUndoStep: async (work) => {
      const result = await work();
      return page.evaluate(
        (value) => (globalThis as any).comovePage.host.oneUndoStep(() => Promise.resolve(value)),
        result,
      );
    },
    onSelectionChanged: (listener) => {
      const id = `heard${Math.trunc(performance.now())}`;
      const listening = page.exposeFunction(id, listener).then(() =>
        page.evaluate((name) => {
          (globalThis as any)[`${name}Stop`] = (globalThis as any).comovePage.host.onSelectionChanged(() =>
            (globalThis as any)[name](),
          );
        }, id),
      );
      return () => listening.then(() => page.evaluate((name) => (globalThis as any)[`${name}Stop`](), id));
    },
  };
}

sheetHostContract("the embedded sheet", async () => {
  sheet = await SheetPage.open();
  const host = remoteHost(sheet);
  await host.addSheet("Work");
  await host.addSheet("Cold store");
  return {
    host,
    select: (address) => {
      const at = address.lastIndexOf("!");
      return sheet.select(address.slice(0, at).replaceAll("'", ""), address.slice(at + 1));
    },
  };
});

it("everything written inside one undo step is taken back by one undo", async () => {
  const read = () => sheet.read("Work!K1:K3");
  await sheet.page.evaluate(() => {
    const { host } = (globalThis as any).comovePage;
    return host.oneUndoStep(async () => {
      await host.writeLabels("Work!K1", [["a"]]);
      await host.writeLabels("Work!K2", [["b"]]);
      await host.writeFormulas("Work!K3", [["=1+1"]]);
    });
  });
  await sheet.until("Work!K1:K3", (cells) => cells[2][0] === 2);
  await sheet.page.evaluate(() => (globalThis as any).comovePage.grid.api.undo());
  await sheet.page.waitForTimeout(300);
  expect(await read()).toEqual([[null], [null], [null]]);
});

it("formulas that use a name follow it when it is moved", async () => {
  const host = remoteHost(sheet);
  await host.writeFormulas("Work!D20", [["=30+12"]]);
  await host.writeFormulas("Work!D21", [["=40+17"]]);
  await host.nameRange("moving_total", "Work!D20");
  await host.writeFormulas("Work!E20", [["=moving_total"]]);
  await sheet.until("Work!E20", ([[v]]) => v === 42);
  await host.nameRange("moving_total", "Work!D21");
  await sheet.until("Work!E20", ([[v]]) => v === 57);
});
