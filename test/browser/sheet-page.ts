import type { Browser, Page } from "playwright-core";
import { launchBrowser } from "./launch";
import { serveDist } from "./serve";

type RawCell = number | string | boolean | null | { readonly type: "Error"; readonly basicValue: string };

/** What the page offers to whoever drives it. */
declare const comovePage: {
  host: {
    readBlock(address: string): Promise<RawCell[][]>;
    select(address: string): Promise<void>;
    writeFormulas(address: string, formulas: string[][]): Promise<void>;
    writeLabels(address: string, labels: string[][]): Promise<void>;
  };
  grid: { api: any };
};

/** The built page in a headless browser, driven as a user does: select, type, read. */
export class SheetPage {
  /** Console errors, page errors, requests to other hosts and refused content, as they happen. */
  readonly complaints: string[] = [];

  private constructor(
    readonly page: Page,
    private readonly browser: Browser,
    private readonly site: { url: string; close(): Promise<void> },
  ) {}

  /** @param prepare what is to be done before the page is loaded */
  static async open(width = 1500, prepare?: (page: Page) => Promise<void>): Promise<SheetPage> {
    const site = await serveDist();
    const browser = await launchBrowser();
    const page = await browser.newPage({ viewport: { width, height: 820 } });
    const opened = new SheetPage(page, browser, site);
    opened.listen();
    await page.addInitScript(() =>
      document.addEventListener(
        "securitypolicyviolation",
        ({ violatedDirective, blockedURI, sourceFile }) => {
          // a library asks whether text can be run as code, and takes the refusal for its answer
          const asked = blockedURI === "eval" && sourceFile.endsWith("/functions.js");
          if (!asked)
            console.error(`refused by the content policy: ${violatedDirective} ${blockedURI} ${sourceFile}`);
        },
      ),
    );
    await prepare?.(page);
    await page.goto(site.url);
    await page.waitForFunction(() => "comovePage" in globalThis);
    await opened.until("Data!H4:K16", (cells) => typeof cells[12][3] === "number");
    return opened;
  }

  private listen(): void {
    this.page.on("console", (message) => {
      if (message.type() === "error") this.complaints.push(message.text());
    });
    this.page.on("pageerror", (error) => this.complaints.push(error.message));
    this.page.on("request", (request) => {
      const url = request.url();
      if (!url.startsWith(this.site.url) && !/^(data|blob):/.test(url))
        this.complaints.push(`foreign request: ${url}`);
    });
  }

  read(address: string): Promise<RawCell[][]> {
    return this.page.evaluate((a) => comovePage.host.readBlock(a), address);
  }

  /** Reads a block until it is as wanted; fails with what stands there when it never is. */
  async until(address: string, wanted: (cells: RawCell[][]) => boolean, seconds = 20): Promise<RawCell[][]> {
    const end = Date.now() + 1000 * seconds;
    for (;;) {
      const cells = await this.read(address);
      if (wanted(cells)) return cells;
      if (Date.now() > end)
        throw new Error(`${address} never came right; it holds ${JSON.stringify(cells).slice(0, 600)}`);
      await this.page.waitForTimeout(25);
    }
  }

  /** What a cell shows, which may be shorter than what it holds. */
  shown(sheet: string, a1: string): Promise<unknown> {
    return this.page.evaluate(
      ([name, cell]) => {
        const range = comovePage.grid.api.getActiveWorkbook().getSheetByName(name).getRange(cell);
        const worksheet =
          range.getSheet?.() ?? comovePage.grid.api.getActiveWorkbook().getSheetByName(name).getSheet();
        return worksheet.getCell(range.getRow(), range.getColumn())?.v as unknown;
      },
      [sheet, a1],
    );
  }

  /** Selects cells of a sheet; the keyboard goes there, as after a click. */
  async select(sheet: string, a1: string): Promise<void> {
    await this.page.evaluate((address) => comovePage.host.select(address), `'${sheet}'!${a1}`);
    await this.page.waitForTimeout(150);
  }

  /** Selects a cell and types into it, key by key. */
  async type(sheet: string, a1: string, text: string, { enter = true } = {}): Promise<void> {
    await this.editing(false);
    await this.select(sheet, a1);
    // the grid needs a moment to open its editor: the first key opens it, the others go in
    await this.page.keyboard.type(text[0]);
    await this.editing(true);
    await this.page.keyboard.type(text.slice(1));
    if (!enter) return;
    // while names are suggested, Enter takes the one suggested
    await this.page.locator('ul[data-u-comp="sheets-formula-editor"]').waitFor({ state: "hidden" });
    await this.page.keyboard.press("Enter");
    await this.editing(false);
  }

  /** Waits until a cell is being edited, or none is any more. */
  private async editing(wanted: boolean): Promise<void> {
    await this.page.waitForFunction(
      (now) => comovePage.grid.api.getActiveWorkbook().isCellEditing() === now,
      wanted,
      { timeout: 10_000 },
    );
  }

  async clear(sheet: string, a1: string): Promise<void> {
    await this.select(sheet, a1);
    await this.page.keyboard.press("Delete");
  }

  shot(name: string): Promise<Buffer> {
    return this.page.screenshot({ path: `test/browser/shots/${name}.png` });
  }

  async close(): Promise<void> {
    await this.browser.close();
    await this.site.close();
  }
}

export const isError = (cell: RawCell, code: string): boolean =>
  typeof cell === "object" && cell !== null && cell.basicValue === code;
