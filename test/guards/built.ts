import { existsSync, readFileSync } from "node:fs";
import { gzipSync } from "node:zlib";
import type { FunctionsJson } from "../../src/build/metadata.js";
import { filesBelow } from "./files.js";
import { parsedPage } from "./parsed-page.js";

/** What Excel loads of us may take this much, packed: it is loaded anew on every start. */
const MOST_BYTES = 400_000;
const ENDINGS = /\.(html|js|css|json|xml|png)$/;

/** Names that only these bundles hold, whatever a bundler does to the rest. */
const STRANGERS: readonly (readonly [what: string, mark: RegExp])[] = [
  ["the practice workbook's grid", /univer(?!s)/i],
  ["the platform's library", /Microsoft\.Office\.WebExtension|OSF\.OUtil|OfficeExtension\.ClientRequestContext/],
];

/** Text that becomes code; the numeric kernels are bytes and not among these. */
const TEXT_TO_CODE = /(?<![\w$.])eval\s*\(|\(0,\s*eval\)|new\s+Function\b|(?<![\w$.])Function\s*\(|set(?:Timeout|Interval)\s*\(\s*["'`]|\.constructor\s*\(\s*["'`]/;

/**
 * What is wrong with a build of the add-in, as far as its files tell.
 *
 * @param folder   the build; its practice page below it is looked at for its own pages only
 * @param address  where it is to be served
 * @returns        one sentence a fault
 */
export function builtFaults(folder: string, address: string): string[] {
  const files = filesBelow(folder, ".").map((path) => path.replace(/^\.\//, ""));
  const ours = files.filter((path) => !path.startsWith("practice/"));
  const read = (path: string): string => readFileSync(`${folder}/${path}`, "utf8");
  return [
    ...["pane.html", "functions.js", "functions.json", "help.html", "privacy.html", "manifest.xml", "licences.txt", "practice/index.html", "practice/licences.txt"].filter((path) => !files.includes(path)).map((path) => `${path} is missing.`),
    ...ours.filter((path) => !ENDINGS.test(path) && path !== "licences.txt").map((path) => `${path} is of no kind that a page needs.`),
    ...ours.filter((path) => path.endsWith(".js")).flatMap((path) => scriptFaults(path, read(path))),
    ...files.filter((path) => path.endsWith(".html")).flatMap((path) => pageFaults(folder, path, read(path))),
    ...(files.includes("functions.json") ? helpFaults(JSON.parse(read("functions.json")) as FunctionsJson, parsedPage(read("help.html")), address) : []),
    ...sizeFaults(folder, ours),
  ];
}

function scriptFaults(path: string, text: string): string[] {
  const faults = STRANGERS.filter(([, mark]) => mark.test(text)).map(([what]) => `${path} holds ${what}.`);
  const code = TEXT_TO_CODE.exec(text);
  if (code !== null) faults.push(`${path} turns text into code: ${text.slice(Math.max(0, code.index - 20), code.index + 30)}`);
  if (/sourceMappingURL/.test(text)) faults.push(`${path} names a map of its source.`);
  return faults;
}

function pageFaults(folder: string, path: string, html: string): string[] {
  const faults: string[] = [];
  const page = parsedPage(html);
  const place = path.includes("/") ? path.replace(/[^/]*$/, "") : "";
  if (page.querySelector("meta[http-equiv='Content-Security-Policy']") === null) faults.push(`${path} has no content policy.`);
  if (page.querySelector("script:not([src])") !== null) faults.push(`${path} holds a script.`);
  if (page.querySelector("style, [style]") !== null) faults.push(`${path} holds a style.`);
  for (const element of page.querySelectorAll("*")) for (const { name } of [...element.attributes]) if (/^on/.test(name)) faults.push(`${path} holds a handler ${name}.`);
  for (const element of page.querySelectorAll("[src], link[href], a[href]")) {
    const to = (element.getAttribute("src") ?? element.getAttribute("href") ?? "").replace(/[?#].*$/, "");
    if (to === "" || to === "data:," || to === "https://appsforoffice.microsoft.com/lib/1/hosted/office.js" || to === "office-js/office.js") continue;
    if (/^([a-z]+:|\/)/i.test(to)) faults.push(`${path} leads to ${to}, which is not below its own folder.`);
    else if (!existsSync(`${folder}/${place}${to}`)) faults.push(`${path} leads to ${to}, which is not in the build.`);
  }
  return faults;
}

function helpFaults(json: FunctionsJson, help: Document, address: string): string[] {
  return json.functions.flatMap(({ id, helpUrl }) => {
    if (helpUrl !== `${address}help.html#${id}`) return [`The help address of ${id} is ${helpUrl}.`];
    return help.getElementById(id) === null ? [`The help page has no place named ${id}.`] : [];
  });
}

function sizeFaults(folder: string, ours: readonly string[]): string[] {
  const packed = ours.filter((path) => /\.(js|css|html|json)$/.test(path)).reduce((sum, path) => sum + gzipSync(readFileSync(`${folder}/${path}`)).length, 0);
  return packed > MOST_BYTES ? [`What Excel loads takes ${packed} bytes packed, above ${MOST_BYTES}.`] : [];
}
