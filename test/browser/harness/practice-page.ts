import { mkdir } from "node:fs/promises";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import type { Page } from "playwright-core";
import { buildPractice } from "../../../src/build/practice-page.js";
import { pageLog, type PageLog } from "./page-log.js";
import { servedSite, type ServedSite } from "./served-site.js";

// a machine that is busy with other tests is slow, but a page that has not answered by then never will
const WAIT = 45_000;
const SCREENSHOTS = fileURLToPath(new URL("../out/", import.meta.url));

/** Builds and serves the practice page and starts the browser. */
export const startPractice = (): Promise<ServedSite> => servedSite((folder) => buildPractice(folder));

/** The page as a person uses it: by keyboard, mouse and what can be read on it. */
export class PracticePage {
  private constructor(
    readonly page: Page,
    readonly log: PageLog,
  ) {}

  /** Opens the page and waits until the workbook is calculated. */
  static async open(practice: ServedSite, options: { width?: number; height?: number; dark?: boolean } = {}): Promise<PracticePage> {
    const context = await practice.browser.newContext({
      permissions: ["clipboard-read", "clipboard-write"],
      viewport: { width: options.width ?? 1360, height: options.height ?? 860 },
      colorScheme: options.dark === true ? "dark" : "light",
    });
    const page = await context.newPage();
    page.setDefaultTimeout(WAIT);
    const log = pageLog(page);
    await page.goto(practice.address);
    await page.locator("body[data-state=ready]").waitFor({ timeout: 60_000 });
    return new PracticePage(page, log);
  }

  /** Brings a sheet to the front by its tab. */
  async showSheet(name: string): Promise<void> {
    await this.page.getByRole("tablist", { name: "Sheet tabs" }).getByText(name, { exact: true }).click();
    await this.page.waitForFunction((wanted) => document.getElementById("cell-place")?.textContent?.startsWith(`${wanted}!`), name);
  }

  /** Selects a cell of the sheet in front, or a range ("B5:G17"), through the box that names the selection. */
  async select(cell: string): Promise<void> {
    const box = this.page.locator("#grid input").first();
    await box.click();
    await box.fill(cell);
    await box.press("Enter");
    const first = cell.split(":")[0]!;
    await this.page.waitForFunction((wanted) => document.getElementById("cell-place")?.textContent?.endsWith(`!${wanted}`), first);
  }

  /** Types into a cell as at a keyboard and waits until everything that depends on it is calculated. What the cell holds already is no change and would be waited for in vain. */
  async type(cell: string, text: string): Promise<void> {
    await this.select(cell);
    await this.calculated(async () => {
      await this.page.keyboard.type(text);
      await this.page.keyboard.press("Enter");
    });
  }

  /** Empties the selected cells. */
  async clear(cell: string): Promise<void> {
    await this.select(cell);
    await this.calculated(() => this.page.keyboard.press("Delete"));
  }

  /** Does something that changes cells and waits until the page says that it is calculated. */
  async calculated(action: () => Promise<void>): Promise<void> {
    await this.page.evaluate(() => (document.body.dataset["state"] = "waiting"));
    await action();
    await this.page.locator("body[data-state=ready]").waitFor({ timeout: WAIT });
  }

  /** Selects a cell and reads the line under the grid. */
  async read(cell: string): Promise<{ value: string; reason: string }> {
    await this.select(cell);
    return { value: (await this.page.textContent("#cell-value")) ?? "", reason: (await this.page.textContent("#cell-reason")) ?? "" };
  }

  /** Selects a cell and reads its number. */
  async number(cell: string): Promise<number> {
    const { value } = await this.read(cell);
    return Number(value.replaceAll(",", "").replace("%", ""));
  }

  /** Copies a cell over a range, as with Ctrl+C and Ctrl+V. */
  async fill(from: string, range: string): Promise<void> {
    await this.select(from);
    await this.page.keyboard.press("Control+C");
    await this.select(range);
    await this.calculated(() => this.page.keyboard.press("Control+V"));
  }

  /** Reads the texts of a column, from one row to another, in lines. */
  async columnText(column: string, first: number, last: number): Promise<string> {
    const lines: string[] = [];
    for (let row = first; row <= last; row++) lines.push((await this.read(`${column}${row}`)).value);
    return lines.join("\n");
  }

  /** Mean brightness, 0 to 255, of a blank part of the sheet: the grid is a picture and tells its look in no other way. */
  async brightnessOfGrid(): Promise<number> {
    const box = await this.page.locator("#grid canvas").last().boundingBox();
    if (box === null) throw new Error("The grid draws nothing.");
    const png = await this.page.screenshot({ clip: { x: box.x + box.width - 120, y: box.y + box.height - 60, width: 20, height: 10 } });
    return this.page.evaluate(async (bytes) => {
      const image = await createImageBitmap(new Blob([new Uint8Array(bytes)], { type: "image/png" }));
      const canvas = new OffscreenCanvas(image.width, image.height);
      const drawing = canvas.getContext("2d")!;
      drawing.drawImage(image, 0, 0);
      const { data } = drawing.getImageData(0, 0, image.width, image.height);
      let sum = 0;
      for (let k = 0; k < data.length; k += 4) sum += (data[k]! + data[k + 1]! + data[k + 2]!) / 3;
      return (4 * sum) / data.length;
    }, [...png]);
  }

  /** Keeps a picture for the eye; pictures are never compared. */
  async picture(name: string): Promise<void> {
    await mkdir(SCREENSHOTS, { recursive: true });
    await this.page.screenshot({ path: join(SCREENSHOTS, `${name}.png`) });
  }

  async close(): Promise<void> {
    await this.page.context().close();
  }
}
