import { build } from "esbuild";
import { mkdir, mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import type { Browser, BrowserContextOptions, Page } from "playwright-core";
import { panePolicy } from "../../../src/build/content-policy.js";
import { DEVELOPMENT } from "../../../src/build/form.js";
import { functionsMetadata } from "../../../src/build/metadata.js";
import { servePractice } from "../../../src/build/practice-server.js";
import { launchBrowser } from "./browser.js";

const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));

/** The pane alone on a page as narrow as Excel's task pane, beside a workbook in memory. */
export interface PaneSite {
  readonly browser: Browser;
  readonly address: string;
  close(): Promise<void>;
}

/** Bundles and serves the page and starts the browser. */
export async function startPane(): Promise<PaneSite> {
  const folder = await mkdtemp(join(tmpdir(), "pane-"));
  const settings = { bundle: true, minify: true, format: "esm", target: "es2022", outdir: folder, logLevel: "warning" } as const;
  await Promise.all([
    build({ ...settings, splitting: true, entryPoints: { page: here("pane-alone.ts") } }),
    build({ ...settings, entryPoints: { "counts-worker": here("../../../src/jobs/counts-worker.ts"), "simulation-worker": here("../../../src/jobs/simulation-worker.ts") } }),
    writeFile(join(folder, "functions.json"), JSON.stringify(await functionsMetadata())),
    writeFile(join(folder, "index.html"), PAGE),
  ]);
  const server = await servePractice(folder, 0);
  const browser = await launchBrowser();
  return {
    browser,
    address: server.address,
    close: async () => {
      await browser.close();
      await server.close();
      await rm(folder, { recursive: true });
    },
  };
}

/** A page with the pane open, and what it did that a person may not see. */
export interface PanePage {
  readonly page: Page;
  readonly complaints: string[];
  readonly requests: string[];
}

/**
 * Opens the pane 320 px wide unless told otherwise, and waits until the site block is read.
 *
 * @param before  what happens to the page before its first line
 */
export async function openPane(site: PaneSite, options: BrowserContextOptions = {}, query = "", before?: () => void): Promise<PanePage> {
  const context = await site.browser.newContext({ viewport: { width: 320, height: 900 }, colorScheme: "light", ...options });
  if (before !== undefined) await context.addInitScript(before);
  const page = await context.newPage();
  const complaints: string[] = [];
  const requests: string[] = [];
  page.on("console", (message) => {
    if (message.type() === "error" || message.type() === "warning") complaints.push(message.text());
  });
  page.on("pageerror", (error) => complaints.push(`uncaught: ${error.message}`));
  page.on("dialog", (dialog) => {
    complaints.push(`dialog: ${dialog.message()}`);
    void dialog.dismiss();
  });
  page.on("request", (request) => requests.push(request.url()));
  await page.goto(site.address + query);
  await page.locator(".probeworth .verdict").waitFor();
  return { page, complaints, requests };
}

/** Opens the Results view and waits until the last part of it, the table of lengths, is there. */
export async function showResults(page: Page): Promise<void> {
  await page.getByRole("tab", { name: "Results" }).click();
  await page.getByText("All piles together").waitFor({ timeout: 60_000 });
}

/** Keeps a picture of the whole pane for the eye; pictures are never compared. */
export async function picture(page: Page, name: string): Promise<void> {
  const folder = here("../out/");
  await mkdir(folder, { recursive: true });
  const hidden = await page.evaluate(() => {
    const main = document.querySelector(".probeworth .main")!;
    return main.scrollHeight - main.clientHeight;
  });
  const size = page.viewportSize()!;
  await page.setViewportSize({ width: size.width, height: size.height + hidden });
  await page.screenshot({ path: join(folder, `${name}.png`) });
  await page.setViewportSize(size);
}

const PAGE = `<!doctype html>
<html lang="en">
  <head>
    <meta charset="utf-8" />
    <meta http-equiv="Content-Security-Policy" content="${panePolicy(DEVELOPMENT)}" />
    <title>Pane</title>
    <link rel="icon" href="data:," />
    <link rel="stylesheet" href="page.css" />
    <script type="module" src="page.js"></script>
  </head>
  <body><div id="pane"></div></body>
</html>
`;
