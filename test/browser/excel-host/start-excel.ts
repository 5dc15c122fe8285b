import { build } from "esbuild";
import { readFile } from "node:fs/promises";
import { fileURLToPath } from "node:url";
import type { Browser, BrowserContext, Page, Route } from "playwright-core";
import type { FunctionsJson } from "../../../src/build/metadata.js";
import { ExcelHost } from "./excel-host.js";
import { OUTRIGHT } from "./faults.js";
import type { Blanks } from "./function-arguments.js";
import { libraryFile, LIBRARY_ADDRESS } from "./library.js";
import type { SupportedSets } from "./requirement-sets.js";
import type { WireRequest } from "./wire.js";

// the library's own numbers of methods, events and flags
const EXECUTE_RICH_API = 93;
const COMMAND_COMPLETED = 94;
const COMMAND_INVOKED = 39;
const UNKNOWN_METHOD = 5_001;
const SHARED_RUNTIME = 1;
const CUSTOM_FUNCTIONS = 2;
const DELAY_FOR_CELL_EDIT = 64;
const OF_FUNCTIONS = 2_048;

/** Longer than any workbook of the tests takes on a machine that is busy with others, ms. */
const PATIENCE = 60_000;

/** Which Excel, and what it opens. */
export interface ExcelOptions {
  /** the page that the manifest names; its origin is the only one that may be asked for anything, besides the library */
  readonly address: string;
  /** how far ExcelApi goes: "1.9" is the perpetual Excel of 2021 */
  readonly excelApi?: string;
  /** blank cells as the desktop (0) or the web (null) hands them to functions */
  readonly blanks?: Blanks;
  /** what Excel reads from functions.json; without it no cell function exists */
  readonly metadata?: FunctionsJson;
  readonly namespace?: string;
  readonly colorScheme?: "light" | "dark";
  readonly viewport?: { readonly width: number; readonly height: number };
}

/** A page of the add-in beside a model of Excel. */
export interface Excel {
  readonly page: Page;
  readonly host: ExcelHost;
  /** what the page said to its console, threw, or asked for elsewhere: nothing of that may happen */
  readonly complaints: string[];
  /** Does something to the workbook as a person would, and lets Excel calculate and tell the page. */
  person(act: (host: ExcelHost) => void): Promise<void>;
  /** Presses a button of the ribbon, and waits until the page says that it is done. @param action  as the manifest names it */
  command(action: string): Promise<void>;
  /** Waits until no cell function is on its way and nothing waits to be calculated. */
  calculated(): Promise<void>;
  close(): Promise<void>;
}

/**
 * Opens a page of the add-in in a browser context of its own, with Excel around it.
 *
 * @param browser  shared by the tests
 */
export async function startExcel(browser: Browser, options: ExcelOptions): Promise<Excel> {
  const sets = supportedSets(options.excelApi ?? "1.20");
  const context = await browser.newContext({ viewport: options.viewport ?? { width: 320, height: 900 }, colorScheme: options.colorScheme ?? "light" });
  const page = await context.newPage();
  const complaints = listen(page);
  const host = new ExcelHost({ sets, namespace: options.namespace ?? "PROBEDEV", metadata: options.metadata, blanks: options.blanks === undefined ? 0 : options.blanks }, (messages) => {
    void page.evaluate((each) => (window as unknown as { excelDeliver(all: unknown): void }).excelDeliver(each), messages).catch(() => undefined);
  });
  page.on("framenavigated", (frame) => {
    if (frame === page.mainFrame()) host.pageGone();
  });
  await route(context, new URL(options.address).origin, complaints);
  const commands = new Map<string, (status: number) => void>();
  await context.exposeBinding("excelExecute", async (_source, method: number, text: string) => {
    if (method !== COMMAND_COMPLETED) return execute(host, method, text);
    const [id, status] = JSON.parse(text) as [string, number];
    commands.get(id)?.(status);
    return { status: 0, body: "" };
  });
  await context.addInitScript({ content: `window.excelSettings = ${JSON.stringify({ matrix: JSON.stringify(sets), flags: SHARED_RUNTIME | CUSTOM_FUNCTIONS })};\n${await standIn()}` });
  await page.goto(options.address);
  return {
    page,
    host,
    complaints,
    person: async (act) => {
      act(host);
      host.settle();
    },
    command: async (action) => {
      const id = `command-${commands.size + 1}`;
      const done = new Promise<number>((resolve) => commands.set(id, resolve));
      const isHeard = await page.evaluate((payload) => (window as unknown as { excelFire(event: number, payload: unknown): boolean }).excelFire(payload.event, payload.content), { event: COMMAND_INVOKED, content: [id, action, JSON.stringify({ source: { id: action } })] });
      if (!isHeard) throw new Error("The page does not listen to the ribbon yet.");
      const status = await done;
      if (status !== 0) throw new Error(`The page has no action ${action} (${status}).`);
    },
    calculated: async () => {
      const end = Date.now() + PATIENCE;
      do {
        host.settle();
        if (host.functions.waiting === 0) return;
        await new Promise((resolve) => setTimeout(resolve, 20));
      } while (Date.now() < end);
      throw new Error(`${host.functions.waiting} cell functions have not answered in ${PATIENCE / 1_000} s.`);
    },
    close: () => context.close(),
  };
}

/** One call of window.external.Execute, decided on the test's side. */
async function execute(host: ExcelHost, method: number, text: string): Promise<{ status: number; body: string }> {
  if (method !== EXECUTE_RICH_API) return { status: UNKNOWN_METHOD, body: "" };
  const [params] = JSON.parse(text) as [[string, string, string, string[], string, number, number]];
  const body = params[4];
  const flags = params[6];
  const outright = await host.faults.outright(body.length, (flags & DELAY_FOR_CELL_EDIT) !== 0);
  if (outright !== undefined) return { status: outright, body: "" };
  const reply = JSON.stringify(host.perform(JSON.parse(body) as WireRequest, (flags & OF_FUNCTIONS) !== 0));
  // events come after the answer to what caused them
  setTimeout(() => host.settle(), 0);
  return reply.length > host.faults.largest ? { status: OUTRIGHT.responseTooLarge, body: "" } : { status: 0, body: reply };
}

function supportedSets(excelApi: string): SupportedSets {
  return {
    ExcelApi: excelApi,
    CustomFunctions: "1.7",
    CustomFunctionsRuntime: excelApi === "1.9" ? "1.3" : "1.4",
    SharedRuntime: "1.1",
    RibbonApi: "1.1",
    DelayForCellEdit: "1.1",
    ...(excelApi === "1.9" ? {} : { ExcelApiOnline: "1.1" }),
  };
}

async function route(context: BrowserContext, origin: string, complaints: string[]): Promise<void> {
  await context.route("**/*", async (each: Route) => {
    const url = each.request().url();
    const library = [LIBRARY_ADDRESS, `${origin}/office-js/`].find((folder) => url.startsWith(folder));
    if (library !== undefined) {
      const file = libraryFile(new URL(url).pathname.slice(new URL(library).pathname.length));
      await each.fulfill({ contentType: "text/javascript; charset=utf-8", headers: { "Access-Control-Allow-Origin": "*" }, body: await readFile(file) });
    } else if (url.startsWith(`${origin}/`)) await each.continue();
    else {
      complaints.push(`asked for ${url}`);
      await each.abort();
    }
  });
}

function listen(page: Page): string[] {
  const complaints: string[] = [];
  page.on("console", (message) => {
    if (message.type() === "error" || message.type() === "warning") complaints.push(message.text());
  });
  page.on("pageerror", (error) => complaints.push(`uncaught: ${error.message}`));
  page.on("dialog", (dialog) => {
    complaints.push(`dialog: ${dialog.message()}`);
    void dialog.dismiss();
  });
  return complaints;
}

let bundled: Promise<string> | undefined;
function standIn(): Promise<string> {
  bundled ??= build({ entryPoints: [fileURLToPath(new URL("stand-in.ts", import.meta.url))], bundle: true, format: "iife", target: "es2022", write: false, logLevel: "warning" }).then(({ outputFiles }) => outputFiles[0]!.text);
  return bundled;
}
