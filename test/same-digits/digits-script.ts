import { fileURLToPath } from "node:url";
import { build } from "esbuild";

/** A script without imports that puts `work(count, thorough)` into an engine's globals: `engineDigits`, as text. */
export async function digitsScript(): Promise<string> {
  const contents = 'import { engineDigits } from "./engine-digits.ts"; globalThis.work = (count, thorough) => JSON.stringify(engineDigits(count, thorough));';
  const { outputFiles } = await build({
    stdin: { contents, resolveDir: fileURLToPath(new URL(".", import.meta.url)) }, bundle: true, minify: true, format: "iife", target: "es2022", write: false,
  });
  return outputFiles[0].text;
}
