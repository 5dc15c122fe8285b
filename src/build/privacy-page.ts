import { PRIVACY } from "../results/cautions.js";
import { PRODUCT_VERSION } from "../results/version.js";
import { escaped, paragraphs, textPage } from "./text-page.js";

/** The platform's address, from which a page inside Excel has to take its library. */
const PLATFORM = "https://appsforoffice.microsoft.com";

const INSIDE_EXCEL = [
  `Inside Excel the pane's page loads one library of the platform, from ${PLATFORM}, as Microsoft requires of every add-in. That server learns what any web server learns of a visitor: the address of your machine, its browser, the time. It learns no cell, no name and no result.`,
  "That library would open a page of Microsoft's own to report how add-ins run. The pane's rules for the browser (its content security policy) refuse this page, and every other address than the add-in's own.",
  "What Excel itself reports to Microsoft is set in Excel, under File, Account, Account privacy. Probeworth can neither see nor change it.",
];

const SERVER = [
  "The add-in's own files come from the server of whoever installed it for you. That server's log sees that files are fetched, as for any web page. Nothing of your workbook is in those requests: the add-in sends none, it only fetches its own files.",
  "The practice workbook that npm start opens comes from your own machine, and asks no other.",
];

const KEPT: readonly (readonly [what: string, words: string])[] = [
  ["Runs", "a database named probeworth-runs: the inputs of your last four simulation runs with the names of their cells, and the finished grounds of each, so that an interrupted run can go on. Delete them in the Run view, or with the browser's data for this site."],
  ["Colours", "the choice of light or dark that you made, under the names probeworth-colours and (practice workbook) probeworth-theme. It goes with the browser's data for this site."],
  ["Your workbook", "what you asked the pane to write stands in your workbook, with a stamp of version, seed and a check sum of the inputs. It travels wherever you send the workbook. Formulas hold the names of the functions and nothing about you."],
];

/**
 * What happens to a person's data, on a page of its own.
 */
export function privacyPage(): string {
  return textPage(
    "Probeworth: data and privacy",
    `<section><h2>In short</h2>
${paragraphs(PRIVACY)}</section>
<section><h2>What is kept, and how to delete it</h2>
<dl>${KEPT.map(([what, words]) => `<dt>${escaped(what)}</dt><dd>${escaped(words.slice(0, 1).toUpperCase() + words.slice(1))}</dd>`).join("")}</dl>
${paragraphs(["Excel for the desktop keeps these in the storage of the browser inside it; removing the add-in does not empty that storage; delete the runs in the Run view first."])}</section>
<section><h2>Inside Excel</h2>
${paragraphs(INSIDE_EXCEL)}</section>
<section><h2>The server</h2>
${paragraphs(SERVER)}</section>
<p class="quiet">Release ${escaped(PRODUCT_VERSION)}. <a href="help.html">Help</a></p>`,
  );
}
