import { readFile } from "node:fs/promises";
import { join } from "node:path";
import { formFrom } from "../../../src/build/form.js";
import type { FunctionsJson } from "../../../src/build/metadata.js";
import { servePractice } from "../../../src/build/practice-server.js";
import { builtAddIn } from "../harness/built-add-in.js";

/** The add-in as it is built for development, served to this machine. */
export interface AddInSite {
  /** the page that the manifest names */
  readonly address: string;
  /** what Excel reads of the functions */
  readonly metadata: FunctionsJson;
  readonly namespace: string;
  close(): Promise<void>;
}

/** Builds the add-in, if its sources have changed since it was last built for a test, and serves it. */
export async function serveAddIn(): Promise<AddInSite> {
  const form = formFrom([]);
  const folder = await builtAddIn(form);
  const metadata = JSON.parse(await readFile(join(folder, "functions.json"), "utf8")) as FunctionsJson;
  const server = await servePractice(folder, 0);
  return { address: `${server.address}pane.html`, metadata, namespace: form.namespace, close: () => server.close() };
}
