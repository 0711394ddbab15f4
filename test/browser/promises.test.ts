import { afterAll, beforeAll, expect, it } from "vitest";
import { isError, SheetPage } from "./sheet-page";

/** Two functions that answer later, put beside ours while the page loads. */
let sheet: SheetPage;
beforeAll(async () => {
  sheet = await SheetPage.open(1500, async (page) => {
    await page.route("**/functions.json", async (route) => {
      const response = await route.fetch();
      const listed = (await response.json()) as { functions: unknown[] };
      const parameters = [{ name: "x", description: "anything" }];
      for (const id of ["LATER", "NEVER"]) listed.functions.push({ id, description: id, parameters });
      await page.evaluate(() => {
        const { comoveAssociated: known, CustomFunctions: platform } = globalThis as any;
        const wait = () => new Promise((done) => setTimeout(done, 120));
        known.set("LATER", async (x: unknown[][]) => {
          await wait();
          return [[x[0][0], "came later"]];
        });
        known.set("NEVER", async () => {
          await wait();
          throw new platform.Error(platform.ErrorCode.notAvailable, "It never came.");
        });
      });
      await route.fulfill({ json: listed });
    });
  });
});
afterAll(() => sheet.close());

it("a function that returns a promise spills when it is kept", async () => {
  await sheet.type("Data", "N4", "=COMOVE.LATER(B5)");
  const [row] = await sheet.until("Data!N4:O4", ([cells]) => cells[1] !== null);
  expect(row).toEqual([155.8, "came later"]);
});

it("a promise that is broken shows its error and keeps its message", async () => {
  await sheet.type("Data", "N6", "=COMOVE.NEVER(B5)");
  await sheet.until("Data!N6", ([[v]]) => isError(v, "#N/A"));
  await sheet.select("Data", "N6");
  await sheet.page.locator("#message").getByText("It never came.").waitFor();
});

it("dependants of a late result follow it", async () => {
  await sheet.type("Data", "N8", "=N4*2");
  await sheet.until("Data!N8", ([[v]]) => v === 311.6);
  await sheet.type("Data", "B5", "100");
  await sheet.until("Data!N8", ([[v]]) => v === 200);
});
