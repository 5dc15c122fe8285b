import "./page.css";
import { demonstrationWorkbook } from "../host/demonstration-workbook.js";
import type { FunctionMetadata } from "../pane/model/help-entries.js";
import { mountPane } from "../pane/mount-pane.js";
import { cellLine } from "./cell-line.js";
import { CellReasons } from "./cell-reasons.js";
import { chartPanel } from "./chart-panel.js";
import { startGrid } from "./grid.js";
import { workbookData } from "./grid-data.js";
import { functionDescriptions } from "./grid-functions.js";
import { paneDock } from "./pane-dock.js";
import { PracticeWorkbook } from "./practice-workbook.js";
import { closeStaleSuggestions } from "./stale-suggestions.js";
import { themeSwitch } from "./theme-switch.js";

function element<T extends HTMLElement>(id: string): T {
  const found = document.getElementById(id);
  if (found === null) throw new Error(`The page has no element ${id}.`);
  return found as T;
}

async function start(): Promise<void> {
  const metadata = (await (await fetch("functions.json")).json()) as { functions: FunctionMetadata[] };
  closeStaleSuggestions();
  const reasons = new CellReasons();
  const theme = themeSwitch(element("theme-toggle"), (chosen) => grid.toggleDarkMode(chosen === "dark"));
  const grid = startGrid({
    container: element("grid"),
    workbook: workbookData("demonstration", demonstrationWorkbook()),
    descriptions: functionDescriptions(metadata.functions),
    reasons,
    dark: theme === "dark",
  });
  const workbook = new PracticeWorkbook(grid);
  const refreshCell = cellLine(grid, reasons, element("cell"));
  const refreshChart = chartPanel(grid, workbook, element("chart"), element("chart-toggle"));
  workbook.onChanged(() => {
    refreshCell();
    void refreshChart();
    document.body.dataset["state"] = "ready";
  });
  paneDock(element("pane"), element("pane-edge"), element("pane-toggle"));
  mountPane(element("pane"), workbook, {
    functions: metadata,
    namespace: "PROBE",
    startWorker: () => new Worker("counts-worker.js", { type: "module" }),
  });
}

void start();
