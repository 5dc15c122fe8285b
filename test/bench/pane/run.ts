import type { Page } from "playwright-core";
import { longestTask } from "../../browser/harness/longest-task.js";
import { openPane, startPane } from "../../browser/harness/pane-page.js";

// What only the pane in a real browser shows while a large run goes on: 13 counts, 3 methods by 2 design rules. How long the page's
// own thread is held up at a time, how often the progress is told, and how soon a run is cancelled.

const METHODS = ["Pressuremeter", "Electric cone", "Flat dilatometer"];
const RULES = ["geometric mean", "lower quartile"];
const WATCHED = 45_000;
const CANCELS = 3;

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;
const say = (line: string): void => void process.stdout.write(`${line}\n`);

async function order(page: Page): Promise<void> {
  await page.getByRole("tab", { name: "Run", exact: true }).click();
  await page.getByLabel("Numbers of holes").fill("0 to 12");
  await page.getByText("Methods and design rules").click();
  for (const name of [...METHODS, ...RULES]) await page.locator(".ways").getByText(name, { exact: true }).check();
  // a run to a precision may end while it is watched
  await page.getByLabel("Number of grounds analysed by finite elements").fill("5000");
}

const starting = (page: Page): Promise<void> => page.getByRole("button", { name: "Start the run" }).click();

async function shown(page: Page, grounds: number): Promise<void> {
  await page.waitForFunction((least) => Number(/^([\d,]+) of about/.exec(document.querySelector(".control .run-words")?.textContent ?? "")?.[1]?.replace(",", "") ?? 0) >= least, grounds, { timeout: 300_000, polling: 50 });
}

/** Milliseconds between the times at which the progress was told. */
function gaps(page: Page, during: number): Promise<number[]> {
  return page.evaluate(async (milliseconds) => {
    const times: number[] = [];
    const watch = new MutationObserver(() => times.push(performance.now()));
    watch.observe(document.querySelector(".control fluent-progress-bar")!, { attributes: true, attributeFilter: ["value"] });
    await new Promise((resolve) => setTimeout(resolve, milliseconds));
    watch.disconnect();
    return times.slice(1).map((time, k) => time - times[k]!);
  }, during);
}

/** Milliseconds from the click to the word. */
function cancelling(page: Page): Promise<number> {
  return page.evaluate(async () => {
    const button = [...document.querySelectorAll<HTMLElement>(".control fluent-button")].find((each) => each.textContent === "Cancel")!;
    const begun = performance.now();
    button.click();
    while (!document.querySelector(".control .run-words")!.textContent!.startsWith("Cancelled.")) await new Promise((resolve) => setTimeout(resolve, 2));
    return performance.now() - begun;
  });
}

const site = await startPane();
const { page, complaints } = await openPane(site);
await order(page);
let told: number[] = [];
const longest = await longestTask(page, async () => {
  await starting(page);
  await shown(page, 2);
  told = await gaps(page, WATCHED);
});
const rows = await page.locator(".control .run-words").textContent();
if (!/ of about /.test(rows ?? "")) throw new Error(`The run did not go on while it was watched: ${rows}`);
const cancels = [await cancelling(page)];
while (cancels.length < CANCELS) {
  await page.getByRole("button", { name: "Go on" }).click();
  await page.waitForFunction(() => document.querySelector(".control .run-words")!.textContent!.includes("were kept from before"), undefined, { timeout: 300_000 });
  await page.waitForTimeout(3_000);
  cancels.push(await cancelling(page));
}
await site.close();
if (complaints.length > 0) throw new Error(complaints.join("; "));
say(`13 counts, ${METHODS.length} methods by ${RULES.length} rules, in a pane 320 px wide; after ${WATCHED / 1000} s: ${rows}`);
say(`longest task of the page's thread ${longest.toFixed(1)} ms of its processor time, target 50 ms`);
say(`progress ${(1000 / (told.reduce((sum, gap) => sum + gap, 0) / told.length)).toFixed(1)} a second, longest gap ${Math.max(...told).toFixed(0)} ms, target 4 a second`);
say(`cancelled within ${median(cancels).toFixed(0)} ms (${Math.min(...cancels).toFixed(0)}-${Math.max(...cancels).toFixed(0)}), target 200 ms`);
