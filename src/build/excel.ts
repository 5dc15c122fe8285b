import { fileURLToPath } from "node:url";
import { AppType, startDebugging, stopDebugging } from "office-addin-debugging";
import { OfficeApp } from "office-addin-manifest";
import { develop } from "./develop.js";
import { DEVELOPMENT } from "./form.js";

const MANIFEST = fileURLToPath(new URL("../../manifest.xml", import.meta.url));

/** What the commands do to the machine; another set stands in for it in tests. */
export interface Machine {
  readonly platform: string;
  /** builds and serves */
  serve(): Promise<unknown>;
  /** puts the add-in into Excel and opens Excel */
  load(): Promise<void>;
  /** takes the add-in out of Excel */
  unload(): Promise<void>;
  say(words: string): void;
}

const THIS_MACHINE: Machine = {
  platform: process.platform,
  serve: () => develop(),
  load: () => startDebugging(MANIFEST, { appType: AppType.Desktop, app: OfficeApp.Excel, enableDebugging: false }),
  unload: () => stopDebugging(MANIFEST),
  say: (words) => void process.stdout.write(`${words}\n`),
};

/**
 * What to do where the system has no Excel for the desktop, one step a line.
 *
 * @param first  steps before these
 */
export function onTheWeb(...first: readonly string[]): string {
  const steps = [
    ...first,
    `Open ${DEVELOPMENT.base}pane.html in the browser that Excel will run in, and accept this machine's certificate: Excel shows nothing until then.`,
    "Open a workbook in Excel on the web. On its Home tab choose Add-ins, More Add-ins, My Add-ins, Upload My Add-in, and give it manifest.xml from this folder.",
    `On the Home tab choose Price boreholes, or type =${DEVELOPMENT.namespace}.VERSION() into a cell.`,
  ];
  return steps.map((step, k) => `${k + 1}. ${step}`).join("\n");
}

/**
 * Builds, serves and opens the development add-in in the Excel of this machine.
 *
 * @throws {Error} with what to do instead, where there is no Excel for the desktop
 */
export async function openInExcel(machine: Machine = THIS_MACHINE): Promise<void> {
  if (!hasExcel(machine)) {
    const instead = onTheWeb("In another terminal start the server, and leave it running: npm run develop");
    throw new Error(`Excel for the desktop runs on Windows and on a Mac, not on this machine (${machine.platform}). Use Excel on the web instead:\n${instead}`);
  }
  await machine.serve();
  machine.say("Serving. Excel opens next.");
  await machine.load();
  machine.say(`On the Home tab choose Price boreholes, or type =${DEVELOPMENT.namespace}.VERSION() into a cell. Stop the server with Ctrl+C; take the add-in out again with: npm run unload`);
}

/**
 * Takes the development add-in out of the Excel of this machine.
 *
 * @throws {Error} with what to do instead, where there is no Excel for the desktop
 */
export async function unloadFromExcel(machine: Machine = THIS_MACHINE): Promise<void> {
  if (!hasExcel(machine)) throw new Error(`Nothing was put into Excel on this machine (${machine.platform}). In Excel on the web an uploaded add-in goes away when the browser's data for the site is cleared, or under Add-ins, More Add-ins, My Add-ins, by its three dots.`);
  await machine.unload();
  machine.say("The development add-in is out of Excel. Restart Excel if its button is still on the Home tab.");
}

function hasExcel({ platform }: Machine): boolean {
  return platform === "win32" || platform === "darwin";
}
