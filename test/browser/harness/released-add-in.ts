import { existsSync, readFileSync, statSync } from "node:fs";
import { cp, mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { extname, join } from "node:path";
import { fileURLToPath } from "node:url";
import type { Browser, BrowserContextOptions, Page, Route } from "playwright-core";
import { formFrom } from "../../../src/build/form.js";
import { buildPractice } from "../../../src/build/practice-page.js";
import { launchBrowser } from "./browser.js";
import { builtAddIn } from "./built-add-in.js";

/** Where the build believes that it is served: nothing is asked of that server, every request is answered from the build. */
export const ADDRESS = "https://tools.example.org/probeworth/";
/** Where a released page takes the platform's library from; here the npm package answers. */
export const LIBRARY = "https://appsforoffice.microsoft.com/lib/1/hosted/";

const PACKAGE = fileURLToPath(new URL("../../../node_modules/@microsoft/office-js/dist/", import.meta.url));
const TYPES: Readonly<Record<string, string>> = { ".html": "text/html", ".js": "text/javascript", ".css": "text/css", ".json": "application/json", ".png": "image/png" };

/** A page of the released build and what it did that a person may not see. */
export interface OpenPage {
  readonly page: Page;
  /** what the browser refused because of the page's policy */
  readonly violations: string[];
  /** errors and warnings of the console, and uncaught errors */
  readonly complaints: string[];
  /** every address that the browser asked for; what the policy refuses is never asked */
  readonly requests: string[];
}

/** A build for an address, in a folder of its own, and a browser that finds it at that address. */
export interface Released {
  readonly folder: string;
  /**
   * Opens a page of the build.
   *
   * @param path     below the address
   * @param change   what is sent instead of a file, or where there is none: path -> text made from the file's
   * @param headers  what the server sends with every file besides its type
   */
  open(path: string, options?: BrowserContextOptions, change?: Readonly<Record<string, (text: string) => string>>, headers?: Readonly<Record<string, string>>): Promise<OpenPage>;
  close(): Promise<void>;
}

/** Builds and starts. */
export async function startReleased(): Promise<Released> {
  const folder = await mkdtemp(join(tmpdir(), "released-"));
  const form = formFrom(["--base", ADDRESS]);
  await Promise.all([builtAddIn(form).then((built) => cp(built, folder, { recursive: true })), buildPractice(join(folder, "practice"), form)]);
  const browser: Browser = await launchBrowser();
  return {
    folder,
    async open(path, options = {}, change = {}, headers = {}) {
      const context = await browser.newContext(options);
      const opened: OpenPage = { page: await context.newPage(), violations: [], complaints: [], requests: [] };
      await context.route("**/*", (route) => {
        opened.requests.push(route.request().url());
        return answer(route, folder, change, headers);
      });
      await context.exposeFunction("reportViolation", (words: string) => opened.violations.push(words));
      await context.addInitScript(() => {
        document.addEventListener("securitypolicyviolation", ({ effectiveDirective, blockedURI, sourceFile, lineNumber, sample }) => {
          (window as unknown as { reportViolation(words: string): void }).reportViolation(`${effectiveDirective} ${blockedURI} ${sourceFile}:${lineNumber} ${sample}`);
        });
      });
      opened.page.on("console", (message) => {
        if (message.type() === "error" || message.type() === "warning") opened.complaints.push(message.text());
      });
      opened.page.on("pageerror", (error) => opened.complaints.push(`uncaught: ${error.message}`));
      await opened.page.goto(ADDRESS + path);
      return opened;
    },
    close: async () => {
      await browser.close();
      await rm(folder, { recursive: true });
    },
  };
}

async function answer(route: Route, folder: string, change: Readonly<Record<string, (text: string) => string>>, headers: Readonly<Record<string, string>>): Promise<void> {
  const url = new URL(route.request().url());
  const place = url.origin + url.pathname;
  const [root, path] = place.startsWith(ADDRESS) ? [folder, place.slice(ADDRESS.length)] : place.startsWith(LIBRARY) ? [PACKAGE, place.slice(LIBRARY.length)] : ["", ""];
  const file = join(root, path.endsWith("/") ? `${path}index.html` : path);
  const stored = root !== "" && existsSync(file) && statSync(file).isFile() ? readFileSync(file) : undefined;
  const changed = root === folder ? change[path] : undefined;
  const body = changed === undefined ? stored : changed(stored?.toString("utf8") ?? "");
  if (body === undefined) {
    await route.fulfill({ status: 404, body: "" });
    return;
  }
  await route.fulfill({ body, headers: { "Content-Type": TYPES[extname(file)] ?? "application/octet-stream", ...headers } });
}
