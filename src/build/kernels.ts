import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { main as compile } from "assemblyscript/asc";

const SOURCES = fileURLToPath(new URL("../kernels/", import.meta.url));

/** File that carries the compiled kernels, so that nobody needs the compiler to start or to build. */
export const KERNEL_CODE = fileURLToPath(new URL("../engine/numerics/kernel-code.ts", import.meta.url));

// No relaxed vectors and no fused products: both may round otherwise from one machine to the next.
const OPTIONS = ["--outFile", "kernels.wasm", "--textFile", "kernels.wat", "--runtime", "stub", "--enable", "simd", "--optimizeLevel", "3", "--shrinkLevel", "0", "--noAssert"];

/**
 * Compiles the kernels.
 *
 * @returns         content of `KERNEL_CODE`, and the module as text
 * @throws {Error}  when a source does not compile
 */
export async function compiledKernels(): Promise<{ file: string; text: string }> {
  const sources = new Map(readdirSync(SOURCES).filter((name) => name.endsWith(".ts")).sort().map((name) => [name, readFileSync(`${SOURCES}${name}`, "utf8")]));
  let code: Uint8Array | undefined;
  let text = "";
  const { error, stderr } = await compile([...sources.keys(), ...OPTIONS], {
    readFile: (name) => sources.get(name) ?? null,
    writeFile: (_, content) => {
      if (typeof content === "string") text = content;
      else code = content;
    },
    listFiles: () => [],
  });
  if (error !== null || code === undefined) throw new Error(`The kernels do not compile: ${error?.message ?? ""}\n${stderr.toString()}`);
  const file = `/** The kernels in WebAssembly as base64, made from src/kernels by \`npm run kernels\`. */\nexport const kernelCode = "${Buffer.from(code).toString("base64")}";\n`;
  return { file, text };
}
