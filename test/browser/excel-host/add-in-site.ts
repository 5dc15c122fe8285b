import { mkdtemp, readFile, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { buildAddIn } from "../../../src/build/build-add-in.js";
import { formFrom } from "../../../src/build/form.js";
import type { FunctionsJson } from "../../../src/build/metadata.js";
import { servePractice } from "../../../src/build/practice-server.js";

/** The add-in as it is built for development, served to this machine. */
export interface AddInSite {
  /** the page that the manifest names */
  readonly address: string;
  /** what Excel reads of the functions */
  readonly metadata: FunctionsJson;
  readonly namespace: string;
  close(): Promise<void>;
}

/** Builds the add-in into a folder of its own and serves it. */
export async function serveAddIn(): Promise<AddInSite> {
  const folder = await mkdtemp(join(tmpdir(), "add-in-"));
  const form = formFrom([]);
  await buildAddIn(form, folder);
  const metadata = JSON.parse(await readFile(join(folder, "functions.json"), "utf8")) as FunctionsJson;
  const server = await servePractice(folder, 0);
  return {
    address: `${server.address}pane.html`,
    metadata,
    namespace: form.namespace,
    close: async () => {
      await server.close();
      await rm(folder, { recursive: true });
    },
  };
}
