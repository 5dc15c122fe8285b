import { FUNCTIONS } from "../functions/registry.js";
import { ExcelWorkbook } from "../host/excel-workbook.js";
import { PLANNED_NAMESPACE } from "../host/namespace.js";
import { repairInWords, repairWorkbook } from "../host/repair.js";
import { PRODUCT_VERSION } from "../results/version.js";
import type { FunctionMetadata } from "./model/help-entries.js";
import { mountPane, type Pane, type PaneOptions } from "./mount-pane.js";
import { ribbonCommands } from "./ribbon-commands.js";

/** What the manifest asks for; an Excel that is older does not offer the add-in, but the page may be opened in one all the same. */
const LEAST = "1.9";
/** A library that has not answered by then, ms, is not going to. */
const PATIENCE = 10_000;

async function functionList(): Promise<{ functions: FunctionMetadata[] } | undefined> {
  try {
    const answer = await fetch("functions.json");
    return answer.ok ? ((await answer.json()) as { functions: FunctionMetadata[] }) : undefined;
  } catch {
    return undefined;
  }
}

/** What the build wrote into the page's head. */
function stated(name: string): string | undefined {
  const content = document.querySelector<HTMLMetaElement>(`meta[name="probeworth-${name}"]`)?.content ?? "";
  return content === "" ? undefined : content;
}

/** Why the page has no workbook; undefined inside an Excel that is new enough. */
async function withoutWorkbook(): Promise<string | undefined> {
  if (typeof Office === "undefined") return "The library that connects this page with Excel could not be loaded, so only the help is shown. Check the connection to the network, then open the pane again.";
  const late = new Promise<undefined>((resolve) => setTimeout(() => resolve(undefined), PATIENCE));
  const info = await Promise.race([Office.onReady(), late]);
  if (info === undefined) return "Excel does not answer this page, so only the help is shown. Close the pane and open it again from Excel's ribbon.";
  if (info.host !== Office.HostType.Excel) return "This page was opened outside Excel, so only the help is shown. Open Excel and choose Price boreholes on the Home tab.";
  if (!Office.context.requirements.isSetSupported("ExcelApi", LEAST)) return "This version of Excel is too old for the pane, so only the help is shown. Excel 2021 or later, Microsoft 365 or Excel on the web is needed.";
  return undefined;
}

async function start(): Promise<Pane> {
  const place = document.getElementById("pane");
  if (place === null) throw new Error("The page has no element named pane.");
  const [functions, reason] = await Promise.all([functionList(), withoutWorkbook()]);
  const namespace = stated("namespace") ?? PLANNED_NAMESPACE;
  const options: PaneOptions = {
    ...(functions === undefined ? {} : { functions }),
    namespace,
    versions: { pane: stated("version") ?? PRODUCT_VERSION, functions: String((globalThis as { probeworthFunctions?: unknown }).probeworthFunctions ?? "unknown") },
  };
  if (reason !== undefined) return mountPane(place, undefined, { ...options, withoutWorkbook: reason });
  const repair = async (): Promise<string> => repairInWords(await repairWorkbook(namespace, new Set(FUNCTIONS.keys())));
  return mountPane(place, new ExcelWorkbook(namespace), { ...options, repair });
}

const pane = start();
// A button of the ribbon may be pressed before the pane stands; its command then waits.
if (typeof Office !== "undefined") ribbonCommands(pane);
