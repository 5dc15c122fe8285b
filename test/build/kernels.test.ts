import { readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import { compiledKernels, KERNEL_CODE } from "../../src/build/kernels.js";
import { kernelCode } from "../../src/engine/numerics/kernel-code.js";

describe("the compiled kernels", () => {
  let compiled: { file: string; text: string };
  beforeAll(async () => {
    compiled = await compiledKernels();
  });

  // The file is committed, so that nobody needs the compiler to start or to build: it must not fall behind its sources.
  it("are what their sources compile to", () => {
    expect(readFileSync(KERNEL_CODE, "utf8") === compiled.file, "src/kernels says otherwise: npm run kernels").toBe(true);
  });

  it("are small enough for a page's own thread, where some browsers compile 4 kB at most", () => {
    expect(Buffer.from(kernelCode, "base64").length).toBeLessThan(4096);
  });

  it("hold no instruction whose rounding differs from machine to machine", () => {
    expect(compiled.text).toContain("f64x2.mul");
    expect(compiled.text).not.toMatch(/relaxed|madd/);
  });
});
