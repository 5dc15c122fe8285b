import { build } from "esbuild";
import { mkdir, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import type { BrowserContextOptions, Page } from "playwright-core";
import { panePolicy } from "../../../src/build/content-policy.js";
import { DEVELOPMENT } from "../../../src/build/form.js";
import { functionsMetadata } from "../../../src/build/metadata.js";
import { pageLog, type PageLog } from "./page-log.js";
import { servedSite, type ServedSite } from "./served-site.js";

const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));

/** Bundles and serves the pane alone, on a page as narrow as Excel's task pane beside a workbook in memory, and starts the browser. */
export function startPane(): Promise<ServedSite> {
  const settings = { bundle: true, minify: true, format: "esm", target: "es2022", logLevel: "warning" } as const;
  return servedSite(async (outdir) =>
    Promise.all([
      build({ ...settings, outdir, splitting: true, entryPoints: { page: here("pane-alone.ts") } }),
      build({ ...settings, outdir, entryPoints: { "counts-worker": here("../../../src/jobs/counts-worker.ts"), "simulation-worker": here("../../../src/jobs/simulation-worker.ts") } }),
      writeFile(join(outdir, "functions.json"), JSON.stringify(await functionsMetadata())),
      writeFile(join(outdir, "index.html"), PAGE),
    ]),
  );
}

/** A page with the pane open. */
export interface PanePage extends PageLog {
  readonly page: Page;
}

/**
 * Opens the pane 320 px wide unless told otherwise, and waits until the site block is read.
 *
 * @param before  what happens to the page before its first line
 */
export async function openPane(site: ServedSite, options: BrowserContextOptions = {}, query = "", before?: () => void): Promise<PanePage> {
  const context = await site.browser.newContext({ viewport: { width: 320, height: 900 }, colorScheme: "light", ...options });
  if (before !== undefined) await context.addInitScript(before);
  const page = await context.newPage();
  const log = pageLog(page);
  await page.goto(site.address + query);
  await page.locator(".probeworth .verdict").waitFor();
  return { page, ...log };
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
