import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, rmSync, statSync } from "node:fs";
import { mkdir, mkdtemp, rename, rm } from "node:fs/promises";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { buildAddIn } from "../../../src/build/build-add-in.js";
import type { Form } from "../../../src/build/form.js";

const ROOT = fileURLToPath(new URL("../../../", import.meta.url));
/** Everything that a build can depend on. */
const SOURCES = ["src", "assets", "webpack.config.js", "manifest.xml", "tsconfig.json", "package.json", "package-lock.json"];
const CACHE = join(ROOT, "node_modules/.cache");
const PREFIX = "test-add-in-";
const DAY = 24 * 3_600_000;

/**
 * The add-in built in this form. A build takes long, so one serves all tests for as long as no source changes.
 *
 * @returns the folder; nobody may write into it
 */
export async function builtAddIn(form: Form): Promise<string> {
  const state = stateOfSources(form);
  const folder = join(CACHE, `${PREFIX}${state}`);
  if (existsSync(folder)) return folder;
  await mkdir(CACHE, { recursive: true });
  forgetOld();
  // built aside and renamed, so that an interrupted or parallel build never leaves half of one under the final name
  const aside = await mkdtemp(join(CACHE, `${PREFIX}aside-`));
  await buildAddIn(form, aside);
  // a source that was changed meanwhile is in this build or not: it serves this run alone
  if (stateOfSources(form) !== state) return aside;
  try {
    await rename(aside, folder);
  } catch (error) {
    await rm(aside, { recursive: true });
    if (!existsSync(folder)) throw error;
  }
  return folder;
}

function stateOfSources(form: Form): string {
  const hash = createHash("sha256").update(JSON.stringify(form));
  for (const path of SOURCES.flatMap(filesIn)) hash.update(path).update("\0").update(readFileSync(join(ROOT, path)));
  return hash.digest("hex").slice(0, 24);
}

function filesIn(path: string): string[] {
  if (!statSync(join(ROOT, path)).isDirectory()) return [path];
  return readdirSync(join(ROOT, path)).sort().flatMap((name) => filesIn(`${path}/${name}`));
}

function forgetOld(): void {
  for (const name of readdirSync(CACHE)) {
    const path = join(CACHE, name);
    if (name.startsWith(PREFIX) && Date.now() - statSync(path).mtimeMs > DAY) rmSync(path, { recursive: true, force: true });
  }
}
