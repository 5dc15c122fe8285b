import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Browser } from "playwright-core";
import { servePractice } from "../../../src/build/practice-server.js";
import { launchBrowser } from "./browser.js";

/** A built page on a server of its own, with a browser to open it in. */
export interface ServedSite {
  readonly browser: Browser;
  readonly address: string;
  close(): Promise<void>;
}

/**
 * Fills a temporary folder, serves it on a free port and starts the browser.
 *
 * @param fill  builds the page into the folder
 */
export async function servedSite(fill: (folder: string) => Promise<unknown>): Promise<ServedSite> {
  const folder = await mkdtemp(join(tmpdir(), "site-"));
  await fill(folder);
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
