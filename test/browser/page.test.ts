import { createServer } from "node:http";
import type { AddressInfo } from "node:net";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { PracticePage, startPractice } from "./harness/practice-page.js";
import type { ServedSite } from "./harness/served-site.js";

let practice: ServedSite;

beforeAll(async () => {
  practice = await startPractice();
});

afterAll(async () => {
  await practice?.close();
});

describe.each([
  ["light", false],
  ["dark", true],
])("in the %s look", (look, dark) => {
  let page: PracticePage;

  beforeAll(async () => {
    page = await PracticePage.open(practice, { dark });
  });

  afterAll(async () => {
    await page?.close();
  });

  it("opens in the look that the machine prefers, page, grid and pane alike", async () => {
    expect(await page.page.evaluate(() => document.documentElement.dataset["theme"])).toBe(look);
    expect(await page.page.locator("#pane .probeworth").getAttribute("data-theme")).toBe(look);
    // the middle of a blank cell far below the data tells the grid's look
    expect(await page.brightnessOfGrid()).toBeLessThan(dark ? 80 : 256);
    expect(await page.brightnessOfGrid()).toBeGreaterThan(dark ? -1 : 200);
  });

  it("shows every sheet", async () => {
    for (const sheet of ["Site", "Bid", "Counts", "Sensitivity", "Check"]) {
      await page.showSheet(sheet);
      await page.picture(`${sheet.toLowerCase()}-${look}`);
    }
  });

  it("docks the pane at 320 pixels with nothing cut off at its sides", async () => {
    await page.showSheet("Site");
    const edge = page.page.locator("#pane-edge");
    await edge.focus();
    for (let k = 0; k < 20; k++) await page.page.keyboard.press("ArrowRight");
    expect(await edge.getAttribute("aria-valuenow")).toBe("320");
    for (const view of ["Site", "Run", "Results", "Help"]) {
      await page.page.locator("#pane").getByRole("tab", { name: view }).click();
      await page.page.locator("#pane").getByRole("tabpanel", { name: view }).waitFor();
      if (view === "Results") await page.page.locator("#pane").getByText(/cost least|costs least/).first().waitFor();
      await page.picture(`pane-${view.toLowerCase()}-320-${look}`);
      const { width, over } = await page.page.locator("#pane").evaluate((pane) => {
        const { left, right } = pane.getBoundingClientRect();
        // a wide table in a frame that scrolls is not cut off
        const scrolls = (part: Element): boolean => part !== pane && (/auto|scroll/.test(getComputedStyle(part).overflowX) || scrolls(part.parentElement!));
        const shown = [...pane.querySelectorAll("*")].filter((part) => !scrolls(part.parentElement!)).map((part) => part.getBoundingClientRect()).filter((box) => box.width > 1 && box.height > 1);
        return { width: right - left, over: Math.max(...shown.map((box) => Math.max(box.right - right, left - box.left))) };
      });
      expect(width).toBe(320);
      expect(over).toBeLessThanOrEqual(1);
    }
  });

  it("wrote nothing to the console and asked nothing of another machine", () => {
    expect(page.log.complaints).toEqual([]);
    expect(page.log.requests.length).toBeGreaterThan(2);
    expect(page.log.requests.filter((address) => !address.startsWith(practice.address) && !/^(data|blob):/.test(address))).toEqual([]);
    expect(page.log.requests.filter((address) => /office/i.test(address))).toEqual([]);
  });
});

describe("the page", () => {
  let page: PracticePage;

  beforeAll(async () => {
    page = await PracticePage.open(practice);
  });

  afterAll(async () => {
    await page?.close();
  });

  it("changes its look at a button and keeps the choice", async () => {
    await page.page.getByRole("button", { name: "Dark", exact: true }).click();
    expect(await page.page.evaluate(() => document.documentElement.dataset["theme"])).toBe("dark");
    await page.page.waitForFunction(() => document.querySelector("#pane .probeworth")?.getAttribute("data-theme") === "dark");
    expect(await page.brightnessOfGrid()).toBeLessThan(80);
    await page.page.reload();
    await page.page.locator("body[data-state=ready]").waitFor();
    expect(await page.page.evaluate(() => document.documentElement.dataset["theme"])).toBe("dark");
    await page.page.getByRole("button", { name: "Light", exact: true }).click();
  });

  it("draws the cost chart from the cells and draws it again when they change", async () => {
    await page.showSheet("Counts");
    const picture = page.page.locator("#chart svg[role=img]").first();
    await picture.waitFor();
    expect(await picture.getAttribute("aria-label")).toContain((await page.read("C2")).value);
    const total = (await page.read("F6")).value;
    const drawn = () => page.page.evaluate((words) => document.querySelector("#chart svg[role=img]")?.textContent?.includes(words), `Total, 1: ${total}`);
    expect(await drawn()).toBe(true);
    await page.type("A6", "13");
    expect((await page.read("F6")).value).not.toBe(total);
    expect(await drawn()).toBe(false);
    await page.type("A6", "1");
    expect((await page.read("F6")).value).toBe(total);
    expect(await drawn()).toBe(true);
    await page.page.getByRole("button", { name: "Chart", exact: true }).click();
    expect(await page.page.locator("#chart").isVisible()).toBe(false);
  });

  it("lets the pane insert a site block on a new sheet under a new name, and changes no sheet that was there", async () => {
    await page.showSheet("Site");
    const before = (await page.read("B2")).value;
    await page.page.locator("#pane").getByRole("tab", { name: "Site" }).click();
    await page.calculated(() => page.page.locator("#pane").getByRole("button", { name: "Insert the template" }).click());
    await page.showSheet("Site (2)");
    expect((await page.read("B2")).value).toBe(before);
    await page.picture("inserted-template");
    await page.type("F2", "=PROBE.INVESTIGATIONCOST(Site2,2)-PROBE.INVESTIGATIONCOST(Site,2)");
    expect(await page.number("F2")).toBe(0);
    await page.showSheet("Site");
    expect((await page.read("B2")).value).toBe(before);
  });

  it("takes the pane away and back, and puts it below on a narrow screen", async () => {
    await page.page.getByRole("button", { name: "Pane", exact: true }).click();
    expect(await page.page.locator("#pane").isVisible()).toBe(false);
    await page.page.getByRole("button", { name: "Pane", exact: true }).click();
    await page.page.setViewportSize({ width: 600, height: 900 });
    const [book, pane] = await Promise.all(["#book", "#pane"].map((part) => page.page.locator(part).boundingBox()));
    expect(pane!.y).toBeGreaterThanOrEqual(book!.y + book!.height - 1);
    expect(pane!.width).toBe(600);
    await page.picture("narrow");
    await page.page.setViewportSize({ width: 1360, height: 860 });
  });

  it("forbids a request to another address, even one of this machine", async () => {
    let asked = 0;
    const other = createServer((_, response) => {
      asked++;
      response.setHeader("Access-Control-Allow-Origin", "*").end("reached");
    });
    await new Promise<void>((resolve) => other.listen(0, "127.0.0.1", resolve));
    const address = `http://127.0.0.1:${(other.address() as AddressInfo).port}/`;
    expect(await (await fetch(address)).text()).toBe("reached");
    const told = await page.page.evaluate((to) => fetch(to).then(() => "reached", (reason: unknown) => String(reason)), address);
    expect(told).not.toBe("reached");
    expect(asked).toBe(1);
    other.close();
  });
});
