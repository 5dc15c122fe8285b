import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { SheetPlan } from "../../src/host/workbook.js";
import { templateRows } from "../../src/inputs/index.js";
import { hostileTexts } from "../hostile/hostile-texts.js";
import { serveForms, startExcelForm, startPracticeForm, type FormSite } from "./forms/start-forms.js";
import { launchBrowser } from "./harness/browser.js";
import { openPane, startPane } from "./harness/pane-page.js";
import type { ServedSite } from "./harness/served-site.js";
import { PracticePage, startPractice } from "./harness/practice-page.js";

const texts = hostileTexts(20_261_202, 160);
/** Whatever a text could have made of itself: elements that no page of ours has, handlers, addresses that run, a mark that it ran. */
async function traces(page: Page, within: string): Promise<string[]> {
  return page.evaluate((root) => {
    const found: string[] = [];
    const look = (scope: ParentNode): void => {
      for (const element of scope.querySelectorAll("*")) {
        if (/^(script|iframe|object|embed|img|b|a|base|link|meta)$/i.test(element.tagName) && !(element.tagName === "A" && element.getAttribute("href")?.endsWith(".html"))) found.push(element.outerHTML.slice(0, 120));
        for (const { name, value } of [...element.attributes]) if (/^on/i.test(name) || (/^(href|src|xlink:href|srcdoc)$/i.test(name) && /^\s*javascript:|planted/i.test(value))) found.push(`${element.tagName} ${name}=${value.slice(0, 60)}`);
        if (element.tagName === "STYLE" && element.textContent?.includes("display:none")) found.push("a style");
        if (element.shadowRoot !== null) look(element.shadowRoot);
      }
    };
    look(document.querySelector(root)!);
    if ("planted" in window) found.push("a text ran");
    return found;
  }, within);
}

let browser: Browser;
beforeAll(async () => {
  browser = await launchBrowser();
});
afterAll(() => browser?.close());

describe("the pane", () => {
  let site: ServedSite;
  beforeAll(async () => {
    site = await startPane();
  });
  afterAll(() => site?.close());

  it("shows hostile labels, values, units, notes, names and sheets as the texts they are", async () => {
    const { page, complaints } = await openPane(site);
    let shown = 0;
    for (let k = 0; k < texts.length; k += 4) {
      const [label, value, unit, sheet] = [0, 1, 2, 3].map((step) => texts[(k + step) % texts.length]!) as [string, string, string, string];
      await page.evaluate(
        ([rows, a, b, c, d]) => {
          const { book } = window;
          book.rows = rows.map((row) => [...row]);
          book.rows.push([a, b, c, d]);
          book.rows[3]![1] = b;
          book.rows[4]![2] = c;
          book.rows[5]![3] = d;
          book.blocks.clear();
          const range = () => ({ sheet: d, address: "A1:D60", values: book.rows.map((row) => [...row]) });
          for (const name of ["Site", a, d]) book.blocks.set(name, range);
          book.set("Seed", b);
        },
        [templateRows(), label, value, unit, sheet] as const,
      );
      await page.waitForFunction((words) => document.querySelector(".probeworth")!.textContent!.includes(words), label.slice(0, 30).trim().split(/\s/)[0]!.slice(0, 12), { timeout: 5000 }).then(() => shown++, () => undefined);
      expect([label, await traces(page, ".probeworth")]).toEqual([label, []]);
    }
    for (const view of ["Run", "Results", "Help", "Site"]) {
      await page.getByRole("tab", { name: view }).click();
      expect([view, await traces(page, ".probeworth")]).toEqual([view, []]);
    }
    // nearly all labels were seen on the page, as texts; those of signs without a shape cannot be told apart there
    expect(shown).toBeGreaterThan(texts.length / 4 * 0.8);
    expect(complaints).toEqual([]);
    await page.context().close();
  });

  it("would be seen if it made elements of them", async () => {
    const { page } = await openPane(site);
    for (const text of texts.filter((each) => /<(script|img|svg|b |a |iframe|style)/.test(each) && each.length < 60)) {
      await page.evaluate((markup) => {
        const place = document.createElement("div");
        place.id = "planted";
        place.innerHTML = markup;
        document.querySelector(".probeworth")!.append(place);
      }, text);
      expect([text, (await traces(page, ".probeworth")).length > 0]).toEqual([text, true]);
      await page.evaluate(() => document.getElementById("planted")!.remove());
    }
    await page.context().close();
  });
});

describe("the practice page", () => {
  let practice: ServedSite;
  beforeAll(async () => {
    practice = await startPractice();
  });
  afterAll(() => practice?.close());

  it("shows hostile cells, and errors that quote them, as the texts they are", async () => {
    const page = await PracticePage.open(practice);
    await page.showSheet("Site");
    // pasted: the grid takes a text with markup for a copied table and drops the markup; nothing of it may come to life
    await page.page.evaluate((all) => navigator.clipboard.writeText(all.join("\n")), texts.filter((text) => text.length < 2000 && !/^\s*[=+\-@{]/.test(text)));
    await page.select("J1");
    await page.calculated(() => page.page.keyboard.press("Control+V"));
    expect(await page.page.evaluate(() => document.querySelector("[onerror], [onload], [onmouseover], iframe, object, [href^='javascript:']")?.outerHTML ?? "nothing")).toBe("nothing");
    // typed: shown to the letter
    const typed = texts.filter((text) => /^["<&$j]/.test(text) && text.length < 60 && !/[\u0000-\u001f\u007f-\uffff]/.test(text)).slice(0, 9);
    expect(typed.length).toBe(9);
    for (const [row, text] of typed.entries()) {
      await page.type(`L${row + 1}`, text);
      expect((await page.read(`L${row + 1}`)).value).toBe(text);
      expect([text, await traces(page.page, "#cell")]).toEqual([text, []]);
    }
    // a refused input is quoted in the reasons of the cells that use it, and in the pane
    await page.type("B4", `<img src=x onerror="window.planted='ran'">`);
    await page.showSheet("Counts");
    expect((await page.read("F6")).reason).toContain("<img src=x");
    await page.page.locator("#pane").getByText("<img src=x").first().waitFor();
    expect(await traces(page.page, "#pane")).toEqual([]);
    expect(await traces(page.page, "#cell")).toEqual([]);
    expect(await page.page.evaluate(() => "planted" in window)).toBe(false);
    expect(page.log.complaints).toEqual([]);
    expect(page.log.requests.filter((address) => !address.startsWith(practice.address) && !/^(data|blob):/.test(address))).toEqual([]);
    await page.close();
  });
});

describe("a written sheet", () => {
  let site: FormSite;
  beforeAll(async () => {
    site = await serveForms();
  });
  afterAll(() => site?.close());

  const plan: SheetPlan = { name: "Hostile texts", cells: texts.map((value, row) => ({ row, column: 0, value, style: "input" })), names: [{ name: "Prices", range: `A1:A${texts.length}` }] };
  it.each([
    ["the practice grid", () => startPracticeForm(browser, site)],
    ["Excel", () => startExcelForm(browser, site)],
    ["Excel 2021", () => startExcelForm(browser, site, "1.9")],
  ] as const)("of %s holds hostile texts as texts: none is calculated, none becomes a date or a number", async (_, start) => {
    const form = await start();
    const { names } = await form.workbook.insertSheet(plan);
    await form.settled();
    const { values } = (await form.workbook.readName(names[0]!))!;
    const wrong = texts.flatMap((text, k) => (values[k]![0] === text ? [] : [`${JSON.stringify(text.slice(0, 60))} became ${JSON.stringify(values[k]![0])?.slice(0, 60)}`]));
    expect(wrong).toEqual([]);
    await form.close();
  });
});
