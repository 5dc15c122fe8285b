import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Page } from "playwright-core";
import { assessCounts, cheapestCount, holePositions } from "../../src/engine/index.js";
import { parseSite, templateRows } from "../../src/inputs/index.js";
import { longestTask } from "./harness/longest-task.js";
import { openPane, picture, showResults, startPane } from "./harness/pane-page.js";
import type { ServedSite } from "./harness/served-site.js";
import { weakTexts } from "./harness/weak-texts.js";

let site: ServedSite;
beforeAll(async () => {
  site = await startPane();
});
afterAll(async () => {
  await site?.close();
});

const { problem } = parseSite(templateRows());
const tab = (page: Page, name: string) => page.getByRole("tab", { name });

describe("the Site view", () => {
  it("reads the block, says that all can be used, and draws as many holes as asked for", async () => {
    const { page, complaints } = await openPane(site);
    expect(await page.locator(".verdict").textContent()).toMatch(/^All \d+ inputs can be used\.$/);
    const figure = page.locator("figure").first();
    const piles = problem.building.piles.length;
    await expect.poll(() => figure.locator("svg.pane-plot g[aria-label=dot] circle, svg.pane-plot g[aria-label=dot] path").count()).toBe(piles + 2 * 4);
    await page.getByRole("spinbutton", { name: "Holes shown" }).fill("7");
    await expect.poll(() => figure.locator("figcaption").textContent()).toContain("seven holes");
    // Source: the engine's own positions, written as the pane writes numbers
    const [first] = holePositions(problem, 7);
    expect(await figure.locator("figcaption").textContent()).toContain(`(${Number(first!.x.toFixed(2))}; ${Number(first!.y.toFixed(2))})`);
    await page.getByRole("slider", { name: "Number of holes shown" }).focus();
    await page.keyboard.press("ArrowRight");
    expect(await page.getByRole("spinbutton", { name: "Holes shown" }).inputValue()).toBe("8");
    await page.getByRole("spinbutton", { name: "Holes shown" }).fill("-3");
    await page.keyboard.press("Tab");
    expect(await page.getByRole("spinbutton", { name: "Holes shown" }).inputValue()).toBe("0");
    await page.getByRole("spinbutton", { name: "Holes shown" }).fill("2.5");
    await page.keyboard.press("Tab");
    expect(await page.getByRole("spinbutton", { name: "Holes shown" }).inputValue()).toBe("0");
    expect(complaints).toEqual([]);
    await page.context().close();
  });

  it("shows refused cells as words, whatever markup they hold, and recovers when they are put right", async () => {
    const { page, complaints } = await openPane(site);
    const markup = '<img src="x" onerror="document.title=1"><b>bold</b>';
    await page.evaluate((text) => {
      window.book.set("Correlation", text);
      window.book.set(`Wobble ${text}`, 3);
    }, markup);
    const refused = page.locator(".refused .check-refused");
    await expect.poll(() => refused.count()).toBe(2);
    expect((await refused.allTextContents()).join(" ")).toContain("<img src=");
    expect(await page.locator(".probeworth img, .probeworth b").count()).toBe(0);
    expect(await page.title()).toBe("Pane");
    expect(await refused.first().locator(".mark").textContent()).toBe("Refused");
    await expect(page.getByText("Plan", { exact: true }).isVisible()).resolves.toBe(false);
    await picture(page, "pane-refused");
    await tab(page, "Results").click();
    expect(await page.locator(".run-words").textContent()).toMatch(/^Correlation \(row 7/);
    await page.evaluate(() => {
      window.book.rows = window.book.rows.filter((row) => !String(row[0]).startsWith("Wobble"));
      window.book.set("Correlation", "Gaussian");
    });
    await tab(page, "Site").click();
    await expect.poll(() => page.locator(".verdict").textContent()).toMatch(/^All/);
    expect(complaints).toEqual([]);
    await page.context().close();
  });

  it("puts the template on a new sheet and reads it from there", async () => {
    const { page } = await openPane(site, {}, "?empty");
    expect(await page.locator(".verdict").textContent()).toMatch(/^No site block is chosen yet/);
    await page.getByRole("button", { name: "Insert the template" }).click();
    await expect.poll(() => page.locator(".verdict").textContent()).toMatch(/^All/);
    expect(await page.evaluate(() => window.book.inserted.map((plan) => [plan.name, plan.names?.map(({ name }) => name)]))).toEqual([["Site", ["Site"]]]);
    expect(await page.getByRole("status").textContent()).toMatch(/^The template stands on the new sheet Site under the name Site\./);
    await page.context().close();
  });
});

describe("the Results view", () => {
  it("states the engine's cheapest count and the saving against the client's", async () => {
    const { page, complaints, requests } = await openPane(site);
    await showResults(page);
    // Identity: the worker prices as the engine does here
    const rows = assessCounts(problem, parseSite(templateRows()).counts!);
    const best = cheapestCount(rows);
    expect(await page.locator(".numeral").textContent()).toBe(String(best));
    const worst = rows.reduce((most, row) => (row.total > most.total ? row : most));
    await page.getByLabel("Holes your client proposes").fill(String(worst.count));
    const sentence = (await page.locator(".comparison").textContent())!;
    expect(sentence).toMatch(/^That is .* less than/);
    const saving = worst.total - rows.find((row) => row.count === best)!.total;
    expect(Math.abs(Number(/[\d,]+/.exec(sentence)![0].replaceAll(",", "")) / saving - 1)).toBeLessThan(0.01); // it is rounded for people
    await page.getByLabel("Holes your client proposes").fill("1.5");
    expect(await page.locator(".comparison").textContent()).toBe("The proposed count must be a whole number, 0 or more.");
    await page.getByText("All figures as a table").click();
    expect(await page.locator(".table-frame tbody tr").count()).toBe(rows.length);
    expect(await page.locator(".table-frame tr.strong th").textContent()).toBe(String(best));
    expect(complaints).toEqual([]);
    expect(requests.filter((address) => !address.startsWith(site.address) && !address.startsWith("data:"))).toEqual([]);
    await page.context().close();
  });

  it("prices again when an input changes, and says meanwhile that the figures are old", async () => {
    const { page } = await openPane(site);
    await showResults(page);
    const before = await page.locator(".answer").textContent();
    await page.evaluate(() => {
      const seen = new MutationObserver(() => {
        if (document.querySelector(".figures-of-results")!.classList.contains("old")) document.body.dataset["sawOld"] = document.querySelector(".run-words")!.textContent!;
      });
      seen.observe(document.querySelector(".probeworth")!, { attributes: true, childList: true, subtree: true, characterData: true });
      window.book.set("Price per pile", 900);
    });
    await expect.poll(() => page.locator(".answer").textContent(), { timeout: 30_000 }).not.toBe(before);
    expect(await page.evaluate(() => document.body.dataset["sawOld"])).toMatch(/for the inputs as they were before/);
    expect(await page.locator(".figures-of-results.old").count()).toBe(0);
    await page.context().close();
  });

  // Target: cancelling takes at most 200 ms
  it("cancels at once and does not start again by itself", async () => {
    const { page } = await openPane(site);
    const took = await page.evaluate(async () => {
      [...document.querySelectorAll<HTMLElement>("[role=tab]")].find((each) => each.textContent === "Results")!.focus();
      const button = [...document.querySelectorAll<HTMLElement>(".run [role=button]")][0]!;
      const wasRunning = button.textContent;
      const start = performance.now();
      button.click();
      while (!document.querySelector(".run-words")!.textContent!.startsWith("Cancelled")) await new Promise((next) => setTimeout(next, 1));
      return { wasRunning, milliseconds: performance.now() - start };
    });
    expect(took.wasRunning).toBe("Cancel");
    expect(took.milliseconds).toBeLessThan(2000); // the target, 200 ms, is for a quiet machine
    await tab(page, "Site").click();
    await tab(page, "Results").click();
    expect(await page.locator(".run-words").textContent()).toMatch(/^Cancelled/);
    expect(await page.locator(".run [role=button]").textContent()).toBe("Price now");
    await page.locator(".run [role=button]").click();
    await page.getByText("All piles together").waitFor({ timeout: 60_000 });
    await page.context().close();
  });
});

describe("the Help view", () => {
  it("finds a function, shows its arguments, and puts its example on a new sheet", async () => {
    const { page } = await openPane(site);
    await tab(page, "Help").click();
    await page.getByLabel("Find a function").fill("percentile length");
    const entry = page.locator("details.function:visible", { hasText: "PILELENGTH" });
    await entry.locator("summary").click();
    expect(await entry.locator(".call").textContent()).toMatch(/^PROBE\.\u200bPILELENGTH\(/);
    expect(await entry.locator(".formula").textContent()).toBe("=PROBE.PILELENGTH(Site, 4, 90)");
    await entry.getByRole("button", { name: "Put the example of PILELENGTH on a new sheet" }).click();
    expect(await page.evaluate(() => window.book.inserted[0]!.cells.map((cell) => cell.formula).filter(Boolean))).toEqual(["=PROBE.PILELENGTH(Site, 4, 90)"]);
    expect(await page.getByText("Nothing leaves this machine", { exact: false }).count()).toBe(1);
    await page.context().close();
  });
});

describe("for everybody", () => {
  it("can be worked by keyboard alone, in the order of reading", async () => {
    const { page } = await openPane(site);
    const focused = () =>
      page.evaluate(() => {
        const at = document.activeElement!;
        return at.getAttribute("aria-label") ?? (at as HTMLInputElement).labels?.[0]?.textContent ?? at.textContent!.trim();
      });
    const order: string[] = [];
    for (let k = 0; k < 6; k++) {
      await page.keyboard.press("Tab");
      order.push((await focused())!);
    }
    expect(order).toEqual([expect.stringMatching(/^Colours/), "Site", "Cells that hold the inputs", "Read again", "Insert the template", expect.stringMatching(/Ground/)]);
    await page.keyboard.press("Enter");
    expect(await page.locator("details[open] .check").count()).toBeGreaterThan(5);
    for (let k = 0; k < 4; k++) await page.keyboard.press("Shift+Tab");
    await page.keyboard.press("ArrowRight");
    expect(await tab(page, "Run").getAttribute("aria-selected")).toBe("true");
    await page.keyboard.press("ArrowRight");
    expect(await tab(page, "Results").getAttribute("aria-selected")).toBe("true");
    await page.getByText("All piles together").waitFor({ timeout: 60_000 });
    await page.keyboard.press("Tab");
    expect(await focused()).toBe("Price again");
    await page.context().close();
  });

  it.each([
    ["light", { colorScheme: "light" }],
    ["dark", { colorScheme: "dark" }],
    ["dark contrast theme", { colorScheme: "dark", forcedColors: "active" }],
    ["light contrast theme", { colorScheme: "light", forcedColors: "active" }],
  ] as const)("every text stands out from its ground by 4.5 to 1 and nothing is cut off at 320 px: %s", async (name, options) => {
    const { page } = await openPane(site, options);
    for (const view of ["Site", "Run", "Results", "Help"]) {
      if (view === "Results") await showResults(page);
      else await tab(page, view).click();
      await page.evaluate(() => {
        for (const each of document.querySelectorAll("details")) if (each.closest("[hidden]") === null) each.open = true;
      });
      expect(await page.evaluate(() => document.querySelector(".main")!.scrollWidth - document.querySelector(".main")!.clientWidth)).toBe(0);
      // a contrast theme's colours are the system's own choice
      if (!("forcedColors" in options)) expect(await weakTexts(page)).toEqual([]);
      await picture(page, `pane-${name.replaceAll(" ", "-")}-${view.toLowerCase()}`);
    }
    await page.context().close();
  });

  it("in a contrast theme tells the parts of a cost by hatching, in light and dark by four fills", async () => {
    const fills = async (options: Parameters<typeof openPane>[1]) => {
      const { page } = await openPane(site, options);
      await showResults(page);
      const found = await page.evaluate(() =>
        [...document.querySelectorAll(".swatch")].map((swatch) => {
          const { fill } = getComputedStyle(swatch);
          const name = /#([\w-]+)/.exec(fill)?.[1];
          // a fill that names a pattern shows what the pattern holds; without the pattern it shows nothing
          return name === undefined || fill.startsWith("rgb") ? fill : `${name} ${document.getElementById(name)?.innerHTML ?? "is missing"}`;
        }),
      );
      await page.context().close();
      return found;
    };
    const contrast = await fills({ forcedColors: "active" });
    expect(contrast.length).toBe(4);
    expect(new Set(contrast).size).toBe(4);
    expect(contrast.every((fill) => /^probeworth-hatch-\w+ </.test(fill))).toBe(true);
    expect(new Set(await fills({ colorScheme: "dark" })).size).toBe(4);
  });

  it("switches colours by its own button, and follows the page until it does", async () => {
    const { page } = await openPane(site);
    const theme = () => page.evaluate(() => document.querySelector<HTMLElement>(".probeworth")!.dataset["theme"]);
    expect(await theme()).toBe("light");
    await page.evaluate(() => (document.documentElement.dataset["theme"] = "dark"));
    await expect.poll(theme).toBe("dark");
    await page.getByRole("button", { name: /^Colours/ }).click();
    expect(await theme()).toBe("light");
    await page.getByRole("button", { name: /^Colours/ }).click();
    expect(await theme()).toBe("dark");
    await page.reload();
    await page.locator(".probeworth .verdict").waitFor();
    expect(await theme()).toBe("dark");
    await page.context().close();
  });

  it("gives fingers room: targets of 44 px where the pointer is coarse, 24 px elsewhere", async () => {
    for (const [options, least] of [[{}, 24], [{ hasTouch: true, isMobile: true }, 44]] as const) {
      const { page } = await openPane(site, options);
      for (const view of ["Site", "Run", "Results", "Help"]) {
        await tab(page, view).click();
        if (view === "Results") await page.getByText("All piles together").waitFor({ timeout: 60_000 });
        const small = await page.evaluate((height) => {
          const targets = document.querySelectorAll<HTMLElement>(".probeworth :is([role=button], [role=tab], [role=slider], select, input:not(.tick), .choice-label, summary)");
          return [...targets].filter((target) => target.offsetParent !== null && target.getBoundingClientRect().height < height - 0.5).map((target) => `${target.tagName} ${target.textContent?.slice(0, 20) ?? ""} ${target.getBoundingClientRect().height}`);
        }, least);
        expect(small).toEqual([]);
      }
      await page.context().close();
    }
  });

  it("keeps still for those who asked for it", async () => {
    const moving = async (reducedMotion: "reduce" | "no-preference") => {
      const { page } = await openPane(site, { reducedMotion });
      const found = await page.evaluate(async () => {
        const slider = document.querySelector<HTMLElement & { value: string }>("fluent-slider")!;
        slider.value = "20";
        await new Promise((next) => requestAnimationFrame(() => requestAnimationFrame(next)));
        return [...document.getAnimations(), ...slider.shadowRoot!.getAnimations()].length;
      });
      await page.context().close();
      return found;
    };
    expect(await moving("no-preference")).toBeGreaterThan(0); // else there would be nothing to hold still
    expect(await moving("reduce")).toBe(0);
  });

  // Target: no task of the main thread above 50 ms; processor time is counted, so that a busy machine does not spoil it
  it("never prices on the page's own thread while it opens, prices, and changes", async () => {
    const { page } = await openPane(site);
    const longest = await longestTask(page, async () => {
      await page.reload();
      await page.locator(".probeworth .verdict").waitFor();
      await showResults(page);
      await page.evaluate(() => window.book.set("Stiffness COV", 0.5));
      await page.getByText("Priced 13 counts").waitFor({ timeout: 60_000 });
      await tab(page, "Help").click();
      await tab(page, "Site").click();
      await page.getByRole("slider", { name: "Number of holes shown" }).focus();
      for (let k = 0; k < 10; k++) await page.keyboard.press("ArrowRight");
    });
      // the meter itself: a loop of 400 ms, of which a busy machine may take the larger part away, must not escape it
    const known = await longestTask(page, () =>
      page.evaluate(() => {
        const start = performance.now();
        while (performance.now() - start < 400);
      }),
    );
    expect(known).toBeGreaterThan(50);
    // The target, 50 ms, is for a quiet machine and is read off this line; pricing 13 counts on this thread would take more than the bound.
    console.info(`longest task ${longest.toFixed(1)} ms`);
    expect(longest).toBeLessThan(200);
    await page.context().close();
  });
});
