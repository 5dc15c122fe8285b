import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { servePractice } from "../../../src/build/practice-server.js";
import { LIBRARY_ADDRESS } from "./library.js";

/** What came of work with Excel: its value, or the error as the page has it. */
export interface Outcome {
  readonly value?: unknown;
  readonly code?: string;
  /** the library's own class of error, not one of ours */
  readonly isGenuine?: boolean;
  /** the member at which it failed */
  readonly location?: string;
}

declare global {
  interface Window {
    /** Excel.run, with an error as a value */
    attempt(work: (context: Excel.RequestContext) => Promise<unknown>, options?: { delayForCellEdit: boolean }): Promise<Outcome>;
    /** what a test keeps in its page */
    kept: unknown[];
  }
}

const ATTEMPT = `window.kept = [];
window.attempt = (work, options = {}) => Excel.run(options, work).then(
  (value) => (value instanceof OfficeExtension.ClientObject ? {} : { value }),
  (reason) => ({ code: reason.code ?? String(reason), isGenuine: reason instanceof OfficeExtension.Error, location: reason.debugInfo?.errorLocation }),
);
`;

/** A page with nothing but the platform's library, for tests that talk to Excel themselves. */
export interface ScriptSite {
  readonly address: string;
  close(): Promise<void>;
}

/**
 * Serves the page to this machine.
 *
 * @param script  runs after the library was loaded
 */
export async function serveScript(script = ""): Promise<ScriptSite> {
  const folder = await mkdtemp(join(tmpdir(), "excel-"));
  await writeFile(join(folder, "index.html"), `<!doctype html><html lang="en"><head><meta charset="utf-8" /><title>Test</title><link rel="icon" href="data:," /><script src="${LIBRARY_ADDRESS}office.js"></script><script src="script.js"></script></head><body></body></html>`);
  await writeFile(join(folder, "script.js"), ATTEMPT + script);
  const server = await servePractice(folder, 0);
  return {
    address: server.address,
    close: async () => {
      await server.close();
      await rm(folder, { recursive: true });
    },
  };
}
