import "./parts/fluent.js";
import { simulationSheet } from "../host/simulation-sheet.js";
import { siteSheet } from "../host/site-sheet.js";
import type { InsertedSheet, SheetPlan, Workbook } from "../host/workbook.js";
import { WorkbookRefusal } from "../host/workbook-refusal.js";
import { webThreads, type PageWorker } from "../jobs/web-threads.js";
import { PRODUCT_VERSION } from "../results/version.js";
import { exampleSheet } from "./model/example-sheet.js";
import type { FunctionMetadata } from "./model/help-entries.js";
import { numberWriter } from "./model/numbers.js";
import { copyText } from "./parts/clipboard.js";
import { element } from "./parts/element.js";
import { toolMark } from "./parts/marks.js";
import { hatchPatterns } from "./parts/patterns.js";
import { statusLine } from "./parts/status-line.js";
import { tabs, type TabView } from "./parts/tabs.js";
import { themeSwitch } from "./parts/theme.js";
import { Pricing, type WorkerLike } from "./pricing.js";
import { QuickFigures } from "./quick-figures.js";
import { ResultsStore } from "./results-store.js";
import { reportOf } from "./run-report.js";
import { browserShelf } from "./run-shelf.js";
import { RunStore } from "./run-store.js";
import { briefSheet } from "./sheets/brief-sheet.js";
import { contentOf, type SimulationReport } from "./sheets/simulation-report.js";
import { SiteStore } from "./site-store.js";
import { startCountsWorker, startSimulationWorker } from "./start-worker.js";
import { adoptStyles } from "./style/adopt-styles.js";
import { helpView, type Versions } from "./views/help-view.js";
import { resultsView, type SimulatedSource } from "./views/results-view.js";
import { runView } from "./views/run-view.js";
import { siteView } from "./views/site-view.js";

/** What a page may tell the pane about itself. */
export interface PaneOptions {
  /** functions.json as parsed; omitted where it could not be read */
  readonly functions?: { readonly functions: readonly FunctionMetadata[] };
  /** what stands before the functions' names; "PROBE" when omitted */
  readonly namespace?: string;
  /** versions of the page and of the cell functions as each states its own; omitted where they are one program */
  readonly versions?: Versions;
  /** enters formulas again that are stuck, and says what it did; omitted where formulas cannot get stuck */
  readonly repair?: () => Promise<string>;
  /** why there is no workbook, in a sentence */
  readonly withoutWorkbook?: string;
  /** starts the engine's thread; omitted: the one that the build puts beside the page */
  readonly startWorker?: () => WorkerLike;
  /** starts a thread of a simulation; omitted as above */
  readonly startSimulationWorker?: () => PageWorker;
  /** language of the numbers; the person's own when omitted */
  readonly locale?: string;
}

/** A pane in place. */
export interface Pane {
  /** brings a view into sight; one that the pane has not got changes nothing */
  show(view: "Site" | "Run" | "Results" | "Help"): void;
  /** puts the template of the site block on a new sheet and reads it; says why where that cannot be */
  insertTemplate(): Promise<void>;
  /** repairs formulas and says what was done */
  repair(): Promise<void>;
  /** takes the pane off the page and ends its thread */
  unmount(): void;
}

/**
 * Puts the pane into an element of a page. The pane knows nothing of Excel: it asks the workbook.
 *
 * @param host      element that becomes the pane; its contents are replaced
 * @param workbook  the workbook beside it; undefined: the page has none, and only the help is shown
 * @param options   what the page tells about itself
 */
export function mountPane(host: HTMLElement, workbook: Workbook | undefined, options: PaneOptions = {}): Pane {
  adoptStyles();
  const root = element("div", { class: "probeworth" });
  // The theme of the controls only takes hold of an element that is on the page.
  host.replaceChildren(root);
  const { line, tell } = statusLine();
  const theme = themeSwitch(root, tell);
  const working = workbook === undefined ? undefined : workingViews(workbook, options, tell);
  const repair = repairOf(options, tell);
  const views = tabs([...(working?.views ?? []), helpTab(workbook, working?.siteName ?? (() => "Site"), options, repair, tell)]);
  const header = element("header", { class: "header" }, element("h1", {}, toolMark(), "Probeworth"), theme.button);
  root.append(hatchPatterns(), element("div", { class: "top" }, header, views.list), element("main", { class: "main" }, ...views.panels), line);
  return {
    show: views.show,
    insertTemplate: async () => working?.insertTemplate(),
    repair: async () => repair?.(),
    unmount: () => {
      theme.stop();
      working?.close();
      host.replaceChildren();
    },
  };
}

function workingViews(workbook: Workbook, options: PaneOptions, tell: (sentence: string) => void): { readonly views: TabView[]; readonly siteName: () => string; readonly insertTemplate: () => Promise<void>; readonly close: () => void } {
  const site = new SiteStore(workbook);
  const startCounts = options.startWorker ?? startCountsWorker;
  const pricing = new Pricing(startCounts);
  const drawing = new Pricing(startCounts);
  const results = new ResultsStore(pricing, tell);
  const simulation = simulationOf(workbook, options, startCounts, tell);
  const insertTemplate = async (): Promise<void> => {
    const inserted = await addSheet(workbook, siteSheet(), tell);
    const name = inserted?.names[0];
    if (inserted === undefined || name === undefined) return;
    await site.choose({ kind: "name", name });
    tell(`The template stands on the new sheet ${inserted.sheet} under the name ${name}. Replace its figures with your own.`);
  };
  const actions = {
    choose: (source: Parameters<SiteStore["choose"]>[0]) => void site.choose(source),
    readAgain: () => void site.read().then(() => tell(site.state.place === undefined ? "Nothing could be read." : "Read again.")),
    insertTemplate: () => void insertTemplate(),
  };
  site.subscribe((state) => {
    results.take(state);
    simulation.store.take(state);
  });
  void site.open().catch((reason: unknown) => tell(`The workbook could not be read: ${inWords(reason)}.`));
  return {
    views: [
      { name: "Site", content: () => siteView(site, actions, drawing, options.locale) },
      { name: "Run", content: () => runView(simulation.store, site, options.locale) },
      { name: "Results", content: () => resultsView(results, simulation, options.locale), seen: (visible) => results.look(visible) },
    ],
    insertTemplate,
    siteName: () => (site.state.source?.kind === "name" ? site.state.source.name : "Site"),
    close: () => {
      site.close();
      pricing.close();
      drawing.close();
      simulation.close();
    },
  };
}

function simulationOf(workbook: Workbook, options: PaneOptions, startCounts: () => WorkerLike, tell: (sentence: string) => void): SimulatedSource & { readonly close: () => void } {
  const start = options.startSimulationWorker ?? startSimulationWorker;
  const store = new RunStore(() => webThreads(start, navigator.hardwareConcurrency), browserShelf(), tell);
  const quick = new QuickFigures(new Pricing(startCounts));
  const write = async (sheet: (report: SimulationReport) => SheetPlan, say: (sentence: string) => void): Promise<boolean> => {
    const both = (sentence: string): void => {
      tell(sentence);
      say(sentence);
    };
    const report = reportOf(store.state, new Date());
    const inserted = report === undefined ? undefined : await addSheet(workbook, sheet(report), both);
    if (inserted !== undefined) both(`Written on the new sheet ${inserted.sheet}.`);
    return inserted !== undefined;
  };
  store.subscribe(({ phase }) => quick.allow(phase === "ended"));
  void store.open();
  // A page that goes gives no further turn: what is finished is handed to the storage now.
  const save = (): void => store.save();
  window.addEventListener("pagehide", save);
  document.addEventListener("visibilitychange", save);
  return {
    store,
    quick,
    actions: {
      writeTables: (say) => write((report) => simulationSheet(contentOf(report)), say),
      writeBrief: (client, variant, say) => write((report) => briefSheet(report, variant, client, numberWriter(options.locale)), say),
    },
    close: () => {
      window.removeEventListener("pagehide", save);
      document.removeEventListener("visibilitychange", save);
      store.close();
      quick.close();
    },
  };
}

function repairOf({ repair }: PaneOptions, tell: (sentence: string) => void): (() => Promise<void>) | undefined {
  if (repair === undefined) return undefined;
  let isRunning = false;
  return async () => {
    if (isRunning) return;
    isRunning = true;
    tell("Looking through the formulas of this workbook.");
    try {
      tell(await repair());
    } catch (reason) {
      tell(reason instanceof WorkbookRefusal ? reason.message : `The formulas could not be looked through: ${inWords(reason)}.`);
    } finally {
      isRunning = false;
    }
  };
}

function helpTab(workbook: Workbook | undefined, siteName: () => string, options: PaneOptions, repair: (() => Promise<void>) | undefined, tell: (sentence: string) => void): TabView {
  const insert = async (id: string, formula: string): Promise<void> => {
    const inserted = workbook === undefined ? undefined : await addSheet(workbook, exampleSheet(id, formula), tell);
    if (inserted !== undefined) tell(`The example stands on the new sheet ${inserted.sheet}.`);
  };
  const content = { functions: options.functions?.functions, namespace: options.namespace ?? "PROBE", siteName, versions: options.versions ?? { pane: PRODUCT_VERSION, functions: PRODUCT_VERSION }, notice: workbook === undefined ? (options.withoutWorkbook ?? "No workbook is connected to this page, so only the help is shown.") : undefined };
  const actions = { ...(repair === undefined ? {} : { repair: () => void repair() }), copy: copyText, insert: workbook === undefined ? undefined : (id: string, formula: string) => void insert(id, formula), tell };
  return { name: "Help", content: () => helpView(content, actions) };
}

async function addSheet(workbook: Workbook, plan: SheetPlan, tell: (sentence: string) => void): Promise<InsertedSheet | undefined> {
  // Excel holds a request back while a cell is being edited, and the person cannot know what it waits for.
  const waits = setTimeout(() => tell("The workbook has not answered yet. If a cell is being edited, press Enter or Esc there."), PATIENCE);
  try {
    return await workbook.insertSheet(plan);
  } catch (reason) {
    tell(reason instanceof WorkbookRefusal ? reason.message : `No sheet could be added: ${inWords(reason)}.`);
    return undefined;
  } finally {
    clearTimeout(waits);
  }
}

/** Milliseconds after which it is worth saying that a sheet is not there yet. */
const PATIENCE = 1500;

function inWords(reason: unknown): string {
  return (reason instanceof Error ? reason.message : String(reason)).replace(/\.$/, "");
}
