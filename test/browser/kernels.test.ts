import { createServer, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { launchBrowser } from "./harness/browser.js";
import { kernelFigures, type KernelFigures } from "./harness/kernel-figures.js";

/** What page and thread say. */
interface Said {
  readonly page: KernelFigures;
  readonly thread: KernelFigures;
}

// The engine in the real browser, on a page and in a thread of it, under policies that allow its WebAssembly and that do not.
describe("kernels under a content security policy", () => {
  let browser: Browser;
  let server: Server;
  let script: string;
  beforeAll(async () => {
    const entry = fileURLToPath(new URL("harness/kernels-alone.ts", import.meta.url));
    const { outputFiles } = await build({ entryPoints: [entry], bundle: true, minify: true, format: "iife", target: "es2022", write: false });
    script = outputFiles[0].text;
    server = createServer(({ url }, reply) => {
      // /strict/page and the thread's script below it carry the strict policy, /open/ the one that allows WebAssembly
      const policy = `default-src 'none'; script-src 'self'${url!.startsWith("/open/") ? " 'wasm-unsafe-eval'" : ""}; worker-src 'self'`;
      const isScript = url!.endsWith(".js");
      reply.writeHead(200, { "content-type": isScript ? "text/javascript" : "text/html", "content-security-policy": policy });
      reply.end(isScript ? script : '<!doctype html><meta charset="utf-8"><link rel="icon" href="data:,"><script src="kernels-alone.js"></script>');
    });
    await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
    browser = await launchBrowser();
  });
  afterAll(async () => {
    await browser.close();
    server.close();
  });

  const saidUnder = async (policy: "open" | "strict"): Promise<Said & { errors: string[] }> => {
    const page = await browser.newPage();
    const errors: string[] = [];
    page.on("pageerror", (error) => errors.push(error.message));
    await page.goto(`http://127.0.0.1:${(server.address() as AddressInfo).port}/${policy}/page`);
    await page.waitForFunction(() => "said" in window);
    return { ...(await page.evaluate(() => (window as unknown as { said: Said }).said)), errors };
  };

  it("compile where it is allowed, work where it is refused, and say the same to the last digit", async () => {
    const open = await saidUnder("open");
    const strict = await saidUnder("strict");
    expect([open.page.compiled, open.thread.compiled, strict.page.compiled, strict.thread.compiled]).toEqual([true, true, false, false]);
    expect([...open.errors, ...strict.errors]).toEqual([]);
    for (const { figures } of [open.thread, strict.page, strict.thread]) expect(figures).toEqual(open.page.figures);
    // The browser and Node share their engine of JavaScript, but not the bundle.
    expect(open.page.figures).toEqual(kernelFigures().figures);
  });
});
