import { mkdir, rm, writeFile } from "node:fs/promises";
import { fileURLToPath } from "node:url";
import { DEVELOPMENT, formFrom } from "./form.js";

const dist = fileURLToPath(new URL("../../dist", import.meta.url));

// Each command loads what it needs and no more: the bundler alone takes half a second to load.
const COMMANDS: Readonly<Record<string, (words: readonly string[]) => Promise<void>>> = {
  async build(words) {
    const form = formFrom(words);
    const { buildAddIn } = await import("./build-add-in.js");
    const { buildPractice } = await import("./practice-page.js");
    for (const { name, bytes } of await buildAddIn(form)) process.stdout.write(`${name.padEnd(28)} ${(bytes / 1000).toFixed(1).padStart(9)} kB\n`);
    await rm(`${dist}/practice`, { recursive: true, force: true }); // parts of an older build would be served with it
    await buildPractice(`${dist}/practice`, form);
    process.stdout.write(
      form.namespace === "PROBE"
        ? `dist/ is ready to be served under ${form.base}; people install dist/manifest.xml.\n`
        : "dist/ holds the development add-in. For one that people install, give the address that will serve it: npm run build -- --base https://...\n",
    );
  },
  async start() {
    const { start } = await import("./start.js");
    await start(`${dist}/practice`);
  },
  async metadata() {
    const { functionsMetadata } = await import("./metadata.js");
    const json = await functionsMetadata();
    await mkdir(dist, { recursive: true });
    await writeFile(`${dist}/functions.json`, `${JSON.stringify(json, null, 2)}\n`);
    process.stdout.write(`${json.functions.length} functions: dist/functions.json\n`);
  },
  async kernels() {
    const { compiledKernels, KERNEL_CODE } = await import("./kernels.js");
    const { file } = await compiledKernels();
    await writeFile(KERNEL_CODE, file);
    process.stdout.write(`${KERNEL_CODE}: ${file.length} characters\n`);
  },
  async develop() {
    const { develop } = await import("./develop.js");
    const { onTheWeb } = await import("./excel.js");
    await develop();
    process.stdout.write(`Serving the development add-in at ${DEVELOPMENT.base} (stop with Ctrl+C). For Excel on the web:\n${onTheWeb()}\n`);
  },
  async excel() {
    const { openInExcel } = await import("./excel.js");
    await openInExcel();
  },
  async unload() {
    const { unloadFromExcel } = await import("./excel.js");
    await unloadFromExcel();
  },
};

const [wanted = "", ...words] = process.argv.slice(2);
const command = COMMANDS[wanted];
if (command === undefined) {
  process.stderr.write(`"${wanted}" is not a command; accepted: ${Object.keys(COMMANDS).join(", ")}.\n`);
  process.exitCode = 1;
} else {
  await command(words).catch((reason: unknown) => {
    process.stderr.write(`${reason instanceof Error ? reason.message : String(reason)}\n`);
    process.exitCode = 1;
  });
}
