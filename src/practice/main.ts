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
  const answer = await fetch("functions.json");
  if (!answer.ok) throw new Error("its list of functions is missing; build it again with npm start.");
  const metadata = (await answer.json()) as { functions: FunctionMetadata[] };
  closeStaleSuggestions();
  const reasons = new CellReasons();
  const theme = themeSwitch(element("theme-toggle"), (chosen) => grid.toggleDarkMode(chosen === "dark"));
  const plans = demonstrationWorkbook();
  const { grid, spilled } = startGrid({
    container: element("grid"),
    workbook: workbookData("demonstration", plans),
    descriptions: functionDescriptions(metadata.functions),
    reasons,
    dark: theme === "dark",
  });
  const workbook = new PracticeWorkbook(grid, spilled, plans);
  const refreshCell = cellLine(grid, reasons, element("cell"));
  const refreshChart = chartPanel(grid, workbook, element("chart"), element("chart-toggle"));
  workbook.onChanged(() => {
    refreshCell();
    refreshChart();
    document.body.dataset["state"] = "ready";
  });
  paneDock(element("pane"), element("pane-edge"), element("pane-toggle"));
  mountPane(element("pane"), workbook, {
    functions: metadata,
    namespace: "PROBE",
    startWorker: () => new Worker("counts-worker.js", { type: "module" }),
    startSimulationWorker: () => new Worker("simulation-worker.js", { type: "module" }),
  });
}

start().catch((reason: unknown) => {
  document.body.dataset["state"] = "failed";
  element("cell").classList.add("wrong");
  element("cell-reason").textContent = `The practice workbook could not start: ${reason instanceof Error ? reason.message : String(reason)}`;
});
