import { existsSync, readdirSync, readFileSync } from "node:fs";
import { orderFaults, typeOf } from "./manifest-order.js";
import { parsedXml } from "./parsed-page.js";

/** What the add-in may ask of Excel at most: a higher floor shuts out perpetual Excel 2021. */
const FLOOR: Readonly<Record<string, string>> = { SharedRuntime: "1.1", CustomFunctionsRuntime: "1.3", ExcelApi: "1.9" };

/** What the manifest is compared with. */
export interface Build {
  /** release in package.json */
  readonly version: string;
  /** a file of the build by its path below the folder that holds pane.html; undefined: there is none */
  read(path: string): Uint8Array | undefined;
  /** every script of the add-in's page in one text */
  readonly scripts: string;
}

/**
 * A build that lies in a folder.
 *
 * @param folder   that holds pane.html
 * @param version  release in package.json
 */
export function buildIn(folder: string, version: string): Build {
  return {
    version,
    read: (path) => (existsSync(`${folder}/${path}`) ? readFileSync(`${folder}/${path}`) : undefined),
    scripts: readdirSync(folder)
      .filter((name) => name.endsWith(".js"))
      .map((name) => readFileSync(`${folder}/${name}`, "utf8"))
      .join("\n"),
  };
}

interface Page {
  readonly all: readonly Element[];
  named(name: string): Element[];
  only(name: string): string;
}

/**
 * What is wrong with a manifest, as far as that can be told without asking a server. The limits are those of the platform's
 * manifest reference.
 *
 * @param xml    text of the manifest
 * @param build  what it belongs to
 * @returns      one sentence a fault
 */
export function manifestFaults(xml: string, build: Build): string[] {
  const document = parsedXml(xml);
  if (document.getElementsByTagName("parsererror").length > 0) return ["The manifest is not well-formed XML."];
  const all = [...document.getElementsByTagName("*")];
  const named = (name: string): Element[] => all.filter(({ localName }) => localName === name);
  const page: Page = { all, named, only: (name) => named(name)[0]?.textContent?.trim() ?? "" };
  return [...orderFaults(document.documentElement), ...headFaults(page, build), ...resourceFaults(page), ...pageFaults(page), ...commandFaults(page, build), ...lengthFaults(page), ...addressFaults(page, build), ...iconFaults(page, build), ...formFaults(page)];
}

function headFaults({ only, named }: Page, { version }: Build): string[] {
  const faults: string[] = [];
  if (!/^[0-9a-f]{8}-[0-9a-f]{4}-[1-8][0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/.test(only("Id"))) faults.push("Id is not a UUID.");
  if (!/^\d{1,5}(\.\d{1,5}){3}$/.test(only("Version"))) faults.push(`Version ${only("Version")} is not four numbers of at most five digits.`);
  if (only("Version") !== `${version}.0`) faults.push(`Version is ${only("Version")}; the release is ${version}.0.`);
  if (!/^[a-z]{2}-[A-Z]{2}$/.test(only("DefaultLocale"))) faults.push(`DefaultLocale ${only("DefaultLocale")} is not a language and a country such as en-US.`);
  if (only("Permissions") !== "ReadWriteDocument") faults.push("Permissions is not ReadWriteDocument.");
  const sets = Object.fromEntries(named("Set").map((set) => [set.getAttribute("Name"), set.getAttribute("MinVersion")]));
  if (JSON.stringify(sets) !== JSON.stringify(FLOOR)) faults.push(`The requirement sets are ${JSON.stringify(sets)}, not the floor.`);
  if (named("Host").some((host) => (typeOf(host) || host.getAttribute("Name")) !== "Workbook")) faults.push("A host is not the workbook.");
  return faults;
}

/** The part of Resources in which an element's resource has to stand. */
const SHELF: Readonly<Record<string, string>> = {
  Label: "ShortStrings",
  Title: "ShortStrings",
  Namespace: "ShortStrings",
  Description: "LongStrings",
  Tooltip: "LongStrings",
  SourceLocation: "Urls",
  FunctionFile: "Urls",
  LearnMoreUrl: "Urls",
  Runtime: "Urls",
  Image: "Images",
};

function resourceFaults({ all, named }: Page): string[] {
  const faults: string[] = [];
  const resources = [...(named("Resources")[0]?.children ?? [])].flatMap((shelf) => [...shelf.children]);
  const ids = resources.map((resource) => resource.getAttribute("id") ?? "");
  const users = all.filter((element) => element.hasAttribute("resid"));
  for (const user of users) {
    const resid = user.getAttribute("resid") ?? "";
    const place = ids.indexOf(resid);
    const shelf = resources[place]?.parentElement?.localName;
    if (place < 0) faults.push(`${resid} is used and nowhere defined.`);
    else if (shelf !== SHELF[user.localName]) faults.push(`${resid} stands in ${shelf}; ${user.localName} takes its resource from ${SHELF[user.localName]}.`);
  }
  for (const id of ids) {
    if (!users.some((user) => user.getAttribute("resid") === id)) faults.push(`${id} is defined and nowhere used.`);
    if (id.length === 0 || id.length > 32) faults.push(`${id} is longer than 32 characters, or empty.`);
    if (ids.indexOf(id) !== ids.lastIndexOf(id)) faults.push(`${id} is defined twice.`);
  }
  return faults;
}

function pageFaults({ named }: Page): string[] {
  const faults: string[] = [];
  const [runtime] = named("Runtime");
  if (runtime?.getAttribute("lifetime") !== "long") faults.push("The runtime is not a long one, so it is not shared.");
  const pages = [...named("Page").map((element) => element.firstElementChild), ...named("Action").flatMap((action) => [...action.children].filter(({ localName }) => localName === "SourceLocation")), named("FunctionFile")[0]];
  if (pages.some((element) => element?.getAttribute("resid") !== runtime?.getAttribute("resid"))) faults.push("Functions, pane and commands do not all name the runtime's page.");
  return faults;
}

function commandFaults({ named }: Page, { scripts }: Build): string[] {
  const faults: string[] = [];
  const ids = [...named("Group"), ...named("Control")].map((element) => element.getAttribute("id") ?? "");
  for (const id of ids) {
    if (id === "" || id.length > 125) faults.push(`The id "${id.slice(0, 30)}" of a group or button is not 1 to 125 characters long.`);
    if (ids.indexOf(id) !== ids.lastIndexOf(id)) faults.push(`Two groups or buttons have the id ${id}.`);
  }
  const actions = named("FunctionName").map((element) => element.textContent ?? "");
  for (const action of actions) {
    if (!/^[A-Za-z][A-Za-z0-9_.]{0,63}$/.test(action)) faults.push(`The action "${action}" is not a name of letters, digits, full stops and low lines, at most 64.`);
    if (actions.indexOf(action) !== actions.lastIndexOf(action)) faults.push(`Two buttons run the action ${action}.`);
    if (!new RegExp(`["'\`]${action}["'\`]|[{,]${action}[:(]`).test(scripts)) faults.push(`The action ${action} has no body in the page's scripts.`);
  }
  if (actions.length > 0 && !/\.actions\.associate\(/.test(scripts)) faults.push("The page's scripts bind no action to a body.");
  return faults;
}

function lengthFaults({ all, named, only }: Page): string[] {
  const texts: (readonly [name: string, text: string, limit: number])[] = [
    ["ProviderName", only("ProviderName"), 125],
    ...named("DisplayName").map((element) => ["DisplayName", valueOf(element), 125] as const),
    ...named("Description").filter((element) => element.hasAttribute("DefaultValue")).map((element) => ["Description", valueOf(element), 250] as const),
    ...named("String").map((element) => [element.getAttribute("id") ?? "", valueOf(element), element.parentElement?.localName === "ShortStrings" ? 125 : 250] as const),
    ...all.filter((element) => /^https?:/.test(valueOf(element))).map((element) => [element.localName, valueOf(element), 2048] as const),
  ];
  return texts.filter(([, text, limit]) => text.trim() === "" || text.length > limit).map(([name, text, limit]) => `${name}, "${text.slice(0, 30)}...", is longer than ${limit} characters, or empty.`);
}

function addressFaults({ all, named }: Page, { read }: Build): string[] {
  const faults: string[] = [];
  const base = baseOf(named);
  for (const address of all.filter((element) => /Url$|^SourceLocation$|^Image$/.test(element.localName)).map(valueOf).filter((value) => value !== "")) {
    if (!/^https:\/\/|^http:\/\/localhost[:/]/.test(address)) faults.push(`${address} is not an https:// address.`);
    else if (!address.startsWith(base)) faults.push(`${address} is not below ${base}, where the pane is.`);
    else if (read(address.slice(base.length)) === undefined) faults.push(`${address} is not in the build.`);
  }
  const domains = named("AppDomain").map((element) => element.textContent ?? "");
  if (URL.canParse(base) && domains.join() !== new URL(base).origin) faults.push(`The pages may lead to ${domains.join(", ")}, not to the add-in's own server alone.`);
  return faults;
}

/** The picture sizes that a group and a button must and may have. */
const NEEDED = ["16", "32", "80"];
const ALLOWED = ["16", "20", "24", "32", "40", "48", "64", "80"];

function iconFaults({ named }: Page, { read }: Build): string[] {
  const faults: string[] = [];
  const base = baseOf(named);
  const address = new Map(named("Image").filter((image) => image.hasAttribute("id")).map((image) => [image.getAttribute("id"), valueOf(image)]));
  const measured = (place: string, pixels: number): void => {
    const png = read(place.slice(base.length));
    if (png === undefined) return; // said elsewhere
    const view = new DataView(png.buffer, png.byteOffset, png.byteLength);
    const size = png.byteLength > 24 && view.getUint32(0) === 0x89504e47 ? [view.getUint32(16), view.getUint32(20)] : ["no PNG"];
    if (size.some((each) => each !== pixels) || size.length !== 2) faults.push(`${place} is ${size.join(" x ")}, not ${pixels} x ${pixels} pixels.`);
  };
  for (const icon of named("Icon")) {
    const sizes = [...icon.children].map((image) => image.getAttribute("size") ?? "");
    for (const size of NEEDED) if (!sizes.includes(size)) faults.push(`An icon has no picture of ${size} pixels.`);
    for (const size of sizes) if (!ALLOWED.includes(size) || sizes.indexOf(size) !== sizes.lastIndexOf(size)) faults.push(`An icon has a picture of ${size} pixels twice, or the platform takes none of that size.`);
    for (const image of icon.children) measured(address.get(image.getAttribute("resid")) ?? "", Number(image.getAttribute("size")));
  }
  for (const [name, pixels] of [["IconUrl", 32], ["HighResolutionIconUrl", 64]] as const) for (const element of named(name)) measured(valueOf(element), pixels);
  return faults;
}

function formFaults({ named }: Page): string[] {
  const faults: string[] = [];
  const text = (resid: string | null | undefined): string => valueOf(named("String").find((resource) => resource.getAttribute("id") === resid));
  const namespace = text(named("Namespace")[0]?.getAttribute("resid"));
  const developed = valueOf(named("DisplayName")[0]).includes("(development)");
  if (!/^[A-Z][A-Z0-9]*$/.test(namespace)) faults.push(`The namespace ${namespace} is not made of capital letters and digits.`);
  if (namespace !== (developed ? "PROBEDEV" : "PROBE")) faults.push(`The namespace is ${namespace}; the development add-in has PROBEDEV, the released one PROBE.`);
  for (const words of named("String").map(valueOf)) if (/\bPROBE(DEV)?\b/.test(words) && !new RegExp(`\\b${namespace}\\b`).test(words)) faults.push(`"${words}" names another namespace than ${namespace}.`);
  return faults;
}

function baseOf(named: Page["named"]): string {
  return valueOf(named("SourceLocation").find((element) => element.hasAttribute("DefaultValue"))).replace(/[^/]*$/, "");
}

function valueOf(element: Element | undefined): string {
  return element?.getAttribute("DefaultValue") ?? "";
}
