import { expect, it } from "vitest";
import { OfficeHost } from "../../taskpane/host/office-host";
import { FakeExcel } from "../support/fake-excel";
import { sheetHostContract } from "./sheet-host-suite";

function openFake(newest = true): FakeExcel {
  const fake = new FakeExcel(["Work", "Cold store"]);
  Object.assign(globalThis, {
    Excel: fake,
    Office: { context: { requirements: { isSetSupported: () => newest } } },
  });
  return fake;
}

sheetHostContract("Excel (a strict stand-in)", async () => {
  const fake = openFake();
  return { host: new OfficeHost(), select: (address) => fake.select(address) };
});

it("the stand-in is strict: a property that was not loaded cannot be read", async () => {
  const fake = openFake();
  await expect(
    fake.run({}, async (context: any) => context.workbook.getSelectedRange().address as string),
  ).rejects.toThrow("PropertyNotLoaded: address");
});

it("charts are line charts of the range with the title given", async () => {
  const fake = openFake();
  await new OfficeHost().addChart({ address: "Work!B4:E16", title: "Landings", at: "Work!G2" });
  expect(fake.charts).toEqual([{ kind: "Line", source: "B4:E16", title: "Landings" }]);
});

it.each([
  [true, [false, true, false]],
  [false, [false, false, false]],
])("writes are joined into one undo step where the program can (newest: %s)", async (newest, joined) => {
  const fake = openFake(newest);
  const host = new OfficeHost();
  await host.writeLabels("Work!A1", [["before"]]);
  // two writes, one batch: only a single batch is taken back in one step
  await host.oneUndoStep(async () => {
    await host.writeLabels("Work!A2", [["inside"]]);
    if (newest) await host.writeLabels("Work!A4", [["inside too"]]);
  });
  expect(host.undoesAtOnce).toBe(newest);
  await host.writeLabels("Work!A3", [["after"]]);
  expect(fake.joined).toEqual(joined);
});
