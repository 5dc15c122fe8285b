import ExcelJS from "exceljs";
import { execFile } from "node:child_process";
import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { promisify } from "node:util";
import { fileURLToPath } from "node:url";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Locator, Page, Worker } from "playwright-core";
import type { CellValue } from "../../src/host/workbook.js";
import { openPane, picture, startPane } from "./harness/pane-page.js";
import type { ServedSite } from "./harness/served-site.js";

// a run on a machine that is busy with other tests takes minutes
const WAIT = 240_000;

let site: ServedSite;
beforeAll(async () => {
  site = await startPane();
}, 120_000);
afterAll(() => site?.close());

/** The pane with the Run view open; before: what the browser does to the page before its first line. */
async function opened(before?: () => void): Promise<Page> {
  const { page } = await openPane(site, {}, "", before);
  await page.getByRole("tab", { name: "Run", exact: true }).click();
  return page;
}
const words = (page: Page): Locator => page.locator(".control .run-words");
const notes = async (page: Page): Promise<string> => (await page.locator(".control .hint").allTextContents()).join(" ");
async function start(page: Page, counts: string, grounds: number): Promise<void> {
  await page.getByLabel("Numbers of holes").fill(counts);
  await page.getByLabel("Number of grounds analysed by finite elements").fill(String(grounds));
  await page.getByRole("button", { name: "Start the run" }).click();
}
const grounds = async (page: Page): Promise<number> => Number(/([\d,]+)(?: of about [\d,]+)? grounds? by finite/.exec((await words(page).textContent()) ?? "")?.[1]?.replace(",", "") ?? 0);
const reach = (page: Page, count: number): Promise<void> => expect.poll(() => grounds(page), { timeout: WAIT, interval: 50 }).toBeGreaterThanOrEqual(count);
const finish = (page: Page): Promise<void> => expect.poll(() => words(page).textContent(), { timeout: WAIT }).toMatch(/^Finished: /);
/** The total of each count, as the table of the Results view shows it. */
async function totals(page: Page): Promise<string[]> {
  await page.getByRole("tab", { name: "Results", exact: true }).click();
  await page.getByText("All simulated figures as a table").click();
  const rows = page.locator(".simulated details table tbody tr");
  await rows.first().waitFor();
  return rows.evaluateAll((all) => all.map((row) => [...row.children].slice(0, 3).map((cell) => cell.textContent).join(" ")));
}
/** The threads that compute or make tables, without those of the quick figures. */
const threads = (page: Page): Worker[] => page.workers().filter((worker) => worker.url().includes("simulation-worker"));

/** Lets every thread of the run die of an error. A run that ends over the first closes the others before they can be reached. */
async function pullThreads(page: Page): Promise<void> {
  const pulled = await Promise.allSettled(threads(page).map((thread) => thread.evaluate(() => void setTimeout(() => { throw new Error("pulled from under the run"); }))));
  expect(pulled.map(({ status }) => status)).toContain("fulfilled");
}

/** Every cell of the sheets that the pane has written. */
const writtenBy = (page: Page): Promise<[number, number, CellValue][][]> =>
  page.evaluate(() => window.book.inserted.map(({ cells }) => cells.map(({ row, column, value }): [number, number, CellValue] => [row, column, value ?? ""])));
/** The columns of counts and totals of a written table, from its heads down. */
function countsAndTotals(cells: [number, number, CellValue][]): [CellValue, CellValue][] {
  const head = (label: RegExp): [number, number, CellValue] => cells.find(([, , value]) => label.test(String(value)))!;
  const [row, countColumn] = head(/^Count \(holes\)$/);
  const [, totalColumn] = head(/^Total \(/);
  const at = (down: number, column: number): CellValue | undefined => cells.find(([r, c]) => r === row + down && c === column)?.[2];
  const found: [CellValue, CellValue][] = [];
  for (let down = 1; typeof at(down, totalColumn) === "number"; down++) found.push([at(down, countColumn)!, at(down, totalColumn)!]);
  return found;
}

let undisturbed: string[];
/** row, column and value of every cell of the two sheets that the pane wrote */
let fromPane: [number, number, CellValue][][];

describe("a run that nobody disturbs", () => {
  it("is what the disturbed ones are held against", { timeout: WAIT }, async () => {
    const page = await opened();
    await start(page, "0, 2", 8);
    await finish(page);
    undisturbed = await totals(page);
    expect(undisturbed.length).toBe(2);
    await page.locator(".simulated").getByLabel("Holes your client proposes").fill("0");
    await page.getByRole("button", { name: "Write the tables" }).click();
    await expect.poll(() => page.evaluate(() => window.book.inserted.length)).toBe(1);
    await page.getByRole("button", { name: "Write the client brief" }).click();
    await expect.poll(() => page.evaluate(() => window.book.inserted.length)).toBe(2);
    fromPane = await writtenBy(page);
    // the pane shows the totals rounded, so many noughts at the end
    const shown = undisturbed.map((line) => line.split(" ").map((word) => word.replaceAll(",", "")));
    const inSheet = countsAndTotals(fromPane[0]!);
    expect(inSheet.map(([count]) => String(count))).toEqual(shown.map(([count]) => count));
    inSheet.forEach(([, total], k) => {
      const step = 10 ** /0*$/.exec(shown[k]![1]!)![0].length;
      expect(Math.abs(Number(total) - Number(shown[k]![1]))).toBeLessThanOrEqual(step / 2);
    });
    await page.context().close();
  });

  it("writes the sheets that the terminal writes, to the last digit", { timeout: WAIT }, async () => {
    const folder = await mkdtemp(join(tmpdir(), "terminal-"));
    const file = join(folder, "out.xlsx");
    const words = ["--import", "tsx", "src/formula/simulation/simulate-main.ts", "--counts", "0,2", "--realisations", "8", "--workers", "2", "--brief", "0", "--out", file];
    await promisify(execFile)(process.execPath, words, { cwd: fileURLToPath(new URL("../..", import.meta.url)) });
    const book = new ExcelJS.Workbook();
    await book.xlsx.readFile(file);
    await rm(folder, { recursive: true });
    let compared = 0;
    ["Simulation", "Client brief"].forEach((name, sheet) => {
      const cellAt = (row: number, column: number): unknown => book.getWorksheet(name)!.getCell(row + 1, column + 1).value ?? "";
      // the day, and in the brief the stamp's last lines, which tell the day and where the inputs were read
      const dates = fromPane[sheet]!.flatMap(([row, , value]) => (value === "Date" || value === "Stamp" ? [row] : []));
      const isOfTheDay = (row: number): boolean => (sheet === 0 ? dates.includes(row) : row > dates[0]!);
      expect(dates.length).toBe(1);
      for (const [row, column, value] of fromPane[sheet]!.filter(([at]) => !isOfTheDay(at))) {
        expect(cellAt(row, column), `${name}, row ${row + 1}, column ${column + 1}`).toBe(value);
        if (typeof value === "number") compared++;
      }
      expect(fromPane[sheet]!.map(([, , value]) => value).join(" ")).toMatch(sheet === 0 ? /Hash of the inputs [0-9a-f]{16}/ : /Against buying none, as proposed, this /);
    });
    expect(compared).toBeGreaterThan(60);
  });
});

describe("a thread of the browser", () => {
  it("that fails is replaced and its work done again, with the same table", { timeout: WAIT }, async () => {
    const page = await opened();
    await start(page, "0, 2", 8);
    await reach(page, 2);
    // both kinds: the one that computes and the one that makes the tables
    await pullThreads(page);
    await expect.poll(() => notes(page), { timeout: WAIT, interval: 50 }).toMatch(/A thread was replaced and its work is done again: .*pulled from under the run\./);
    await finish(page);
    expect(await totals(page)).toEqual(undisturbed);
    await page.context().close();
  });

  it("that fails again and again ends the run in a sentence with the reason, and what is done is kept", { timeout: WAIT }, async () => {
    const page = await opened();
    await start(page, "0, 2", 400);
    await reach(page, 2);
    // whatever takes the place of a thread dies as it begins
    await page.route("**/simulation-worker.js", (route) => route.fulfill({ contentType: "text/javascript", body: 'throw new Error("the browser allows no more");' }));
    await pullThreads(page);
    const ending = /^(No thread|The thread that makes the tables|Realisations? .*) (can be kept at work|cannot be kept at work|could not be computed in 3 tries): .*the browser allows no more\. \d+ grounds? by finite elements and [\d,]+ by the short form are there and kept on this machine\.$/;
    await expect.poll(() => words(page).textContent(), { timeout: WAIT, interval: 50 }).toMatch(ending);
    expect(await page.getByRole("button", { name: "Go on" }).isVisible()).toBe(true);
    await picture(page, "run-failed-320-light");
    await page.context().close();
  });
});

describe("a pane that closes in the middle of a run", () => {
  it("loses at most the last seconds, offers to go on, and comes to the same table", { timeout: WAIT }, async () => {
    const page = await opened();
    await start(page, "0, 2", 8);
    await reach(page, 3);
    const before = await grounds(page);
    await page.reload();
    await page.getByRole("tab", { name: "Run", exact: true }).click();
    await expect.poll(() => words(page).textContent(), { timeout: WAIT }).toMatch(/^A run was left on this machine: /);
    expect(await grounds(page)).toBeGreaterThanOrEqual(before - 1);
    await page.getByRole("button", { name: "Go on" }).click();
    await finish(page);
    expect(await totals(page)).toEqual(undisturbed);
    await page.context().close();
  });
});

describe("a site block that changes during a run", () => {
  it("is said, in the view and in what is written, and the run keeps its inputs", { timeout: WAIT }, async () => {
    const page = await opened();
    await start(page, "0, 2", 8);
    await reach(page, 1);
    await page.evaluate(() => window.book.set("Price per hole", 99_000));
    await page.getByText("The site block has changed since this run was ordered. The run keeps its inputs, and its tables say so.").waitFor();
    await finish(page);
    expect(await totals(page)).toEqual(undisturbed);
    await page.getByRole("button", { name: "Write the tables" }).click();
    await page.getByRole("button", { name: "Write the client brief" }).click();
    await expect.poll(() => page.evaluate(() => window.book.inserted.length)).toBe(2);
    const warned = await page.evaluate(() => window.book.inserted.map(({ cells }) => cells.filter(({ value }) => /^The site block has changed since this run was ordered/.test(String(value))).length));
    expect(warned).toEqual([1, 1]);
    // of the inputs that were ordered, in the stamp too
    const sheet = (await writtenBy(page))[0]!;
    const hash = (cells: [number, number, CellValue][]): CellValue => cells[cells.findIndex(([, , value]) => value === "Hash of the inputs") + 1]![2];
    expect(hash(sheet)).toMatch(/^[0-9a-f]{16}$/);
    expect(hash(sheet)).toBe(hash(fromPane[0]!));
    expect(countsAndTotals(sheet)).toEqual(countsAndTotals(fromPane[0]!));
    await page.context().close();
  });
});

describe("a workbook that refuses a sheet", () => {
  it("is heard beside the button in its own words, the figures stay, and the button works again", { timeout: WAIT }, async () => {
    const page = await opened();
    await start(page, "0, 2", 2);
    await finish(page);
    const before = await totals(page);
    const sentence = "The structure of this workbook is protected, so no sheet can be added. Take the protection away (Review, Protect Workbook), then press again.";
    await page.evaluate((words) => (window.book.refusal = words), sentence);
    await page.getByRole("button", { name: "Write the tables" }).click();
    const said = page.locator(".simulated .written");
    await expect.poll(() => said.textContent()).toBe(sentence);
    expect(await said.getAttribute("class")).toContain("refusal");
    expect(await page.locator(".status").textContent()).toBe(sentence);
    await said.scrollIntoViewIfNeeded();
    await picture(page, "run-refused-320-light");
    await page.evaluate(() => (window.book.refusal = ""));
    await page.getByRole("button", { name: "Write the tables" }).click();
    await expect.poll(() => said.textContent()).toBe("Written on the new sheet Simulation.");
    expect(await said.getAttribute("class")).not.toContain("refusal");
    expect(await page.locator(".simulated details table tbody tr").count()).toBe(before.length);
    await page.context().close();
  });
});

describe("a storage that refuses", () => {
  it("lets the run go on and says that it cannot be kept: none at all", { timeout: WAIT }, async () => {
    const page = await opened(() => Object.defineProperty(globalThis, "indexedDB", { value: undefined }));
    await start(page, "0, 2", 3);
    await finish(page);
    expect(await notes(page)).toContain("This run cannot be kept for later, because the storage of this machine refused it (this browser gives the page none). It is lost when the pane closes; write the tables before that.");
    await picture(page, "run-unkept-320-light");
    await page.context().close();
  });

  it("lets the run go on and says that it cannot be kept: one that fills up", { timeout: WAIT }, async () => {
    const page = await opened(() => {
      // as a browser does that finds the disk full: the whole transaction is taken back as it would end
      IDBTransaction.prototype.commit = function () {
        this.abort();
      };
      Object.defineProperty(IDBTransaction.prototype, "error", { get: () => new DOMException("", "QuotaExceededError") });
    });
    await start(page, "0, 2", 40);
    await expect.poll(() => notes(page), { timeout: WAIT }).toContain("This run cannot be kept for later, because the storage of this machine refused it (its room is used up).");
    await page.getByRole("button", { name: "Cancel" }).click();
    await expect.poll(() => words(page).textContent()).toMatch(/^Cancelled\. .* are there and stay until the pane closes\.$/);
    await page.context().close();
  });

  it("does not keep the run waiting: one that never answers", { timeout: WAIT }, async () => {
    const page = await opened(() => {
      IDBFactory.prototype.open = () => ({}) as IDBOpenDBRequest;
    });
    await start(page, "0, 2", 2);
    await finish(page);
    expect(await notes(page)).toContain("the storage of this machine refused it (it does not answer)");
    await page.context().close();
  });
});

describe("an absurd order", () => {
  it("is refused beside the field, or ends with the time that it would take and keeps what is there", { timeout: WAIT }, async () => {
    const page = await opened();
    const regret = page.getByLabel(/^Sum that a wrong choice may cost/);
    for (const sum of ["0", "-1", ""]) {
      await regret.fill(sum);
      await page.getByRole("button", { name: "Start the run" }).click();
      expect(await page.getByRole("alert").textContent()).toMatch(/^State the sum that a wrong choice may cost, above 0/);
    }
    await page.getByLabel("Numbers of holes").fill("0, 2");
    await regret.fill("0.000001");
    await page.getByRole("button", { name: "Start the run" }).click();
    await expect.poll(() => words(page).textContent(), { timeout: WAIT }).toMatch(/^To the wanted precision this run would take about [\d,]+ (days|years) on this machine; accept a larger sum, or stop after a number of grounds\. \d+ grounds by finite elements .* kept on this machine\.$/);
    await picture(page, "run-absurd-320-light");
    await page.context().close();
  });
});
