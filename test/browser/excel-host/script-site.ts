import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { servePractice } from "../../../src/build/practice-server.js";
import { LIBRARY_ADDRESS } from "./library.js";

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
  await writeFile(join(folder, "script.js"), script);
  const server = await servePractice(folder, 0);
  return {
    address: server.address,
    close: async () => {
      await server.close();
      await rm(folder, { recursive: true });
    },
  };
}
