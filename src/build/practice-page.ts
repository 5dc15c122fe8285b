import { build } from "esbuild";
import { copyFile, mkdir, readdir, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { DEVELOPMENT, type Form } from "./form.js";
import { licences, packageOf } from "./licences.js";
import { textFiles } from "./text-files.js";

const source = fileURLToPath(new URL("../", import.meta.url));

/**
 * Bundles the practice page with its grid: one module, its rarely needed parts as files of their own, the worker, styles,
 * the functions' metadata and the help.
 *
 * @param output  folder to write into; made if absent
 * @param form    whose help the functions' descriptions name
 */
export async function buildPractice(output: string, form: Form = DEVELOPMENT): Promise<void> {
  await mkdir(output, { recursive: true });
  const settings = {
    bundle: true,
    minify: true,
    // the grid's libraries hold long tables of characters that would triple in size as escapes
    charset: "utf8",
    format: "esm",
    target: "es2022",
    outdir: output,
    legalComments: "none",
    define: { "process.env.NODE_ENV": '"production"' },
    logLevel: "warning",
  } as const;
  const [page] = await Promise.all([
    build({ ...settings, metafile: true, splitting: true, entryPoints: { main: join(source, "practice/main.ts") } }),
    build({ ...settings, entryPoints: await workers() }),
    copyFile(join(source, "practice/index.html"), join(output, "index.html")),
    ...[...(await textFiles(form, "PROBE"))].map(([name, text]) => writeFile(join(output, name), text)),
  ]);
  await writeFile(join(output, "licences.txt"), licences(Object.keys(page.metafile.inputs).flatMap((file) => packageOf(file) ?? [])));
}

/** The pane's threads: each is a file of its own beside the page, under its source's name. */
async function workers(): Promise<string[]> {
  const jobs = join(source, "jobs");
  return (await readdir(jobs)).filter((name) => name.endsWith("-worker.ts")).map((name) => join(jobs, name));
}
