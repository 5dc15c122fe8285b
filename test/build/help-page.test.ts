import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { DEVELOPMENT, formFrom } from "../../src/build/form.js";
import { functionSources } from "../../src/build/function-sources.js";
import { helpPage } from "../../src/build/help-page.js";
import type { FunctionsJson } from "../../src/build/metadata.js";
import { textFiles } from "../../src/build/text-files.js";
import { formulaLine } from "../../src/formula/formula-line.js";
import { helpEntries } from "../../src/pane/model/help-entries.js";
import { filesBelow, ROOT } from "../guards/files.js";
import { parsedPage } from "../guards/parsed-page.js";

const form = formFrom(["--base", "https://tools.example.org/probeworth/"]);
const sources = functionSources();
let files: ReadonlyMap<string, string>;
let json: FunctionsJson;
let page: Document;

beforeAll(async () => {
  files = await textFiles(form);
  json = JSON.parse(files.get("functions.json")!) as FunctionsJson;
  page = parsedPage(files.get("help.html")!);
});

describe("the help page", () => {
  it("has an anchor, the call, every argument, an example and the published method for every function", () => {
    expect(json.functions.length).toBeGreaterThan(20);
    for (const { id, description, parameters } of json.functions) {
      const section = page.getElementById(id)!;
      expect(section?.tagName, id).toBe("SECTION");
      const text = section.textContent!;
      for (const words of [description!, `PROBE.${id}(`, ...parameters.flatMap(({ name, description: told }) => [name, told!]), `Example: =PROBE.${id}(`, `Method: ${sources.get(id)!}`]) expect(text, id).toContain(words);
    }
  });

  it("is where the help addresses of functions.json lead", () => {
    for (const { id, helpUrl } of json.functions) {
      const url = new URL(helpUrl!);
      expect(url.origin + url.pathname).toBe(`${form.base}help.html`);
      expect(page.getElementById(url.hash.slice(1)), id).not.toBeNull();
    }
  });

  it("names the functions as the add-in it belongs to does", async () => {
    expect(files.get("help.html")).not.toContain("PROBEDEV");
    const developed = (await textFiles(DEVELOPMENT)).get("help.html")!;
    expect(developed).toContain("=PROBEDEV.TOTALCOST(Site, 4)");
    expect(developed).not.toMatch(/PROBE\./);
  });

  it("says what to do about errors, stuck cells and versions, and what the figures are not", () => {
    for (const id of ["first-cell", "pairs", "errors", "repair", "versions", "cautions", "data"]) expect(page.getElementById(id)?.querySelectorAll("p").length, id).toBeGreaterThan(0);
    expect(page.getElementById("cautions")!.textContent).toContain("Not a foundation design");
    expect(page.body.textContent).toMatch(/Release \d+\.\d+\.\d+/);
  });

  it("leads nowhere that is not there", () => {
    for (const name of ["help.html", "privacy.html"]) {
      const each = parsedPage(files.get(name)!);
      const ids = [...each.querySelectorAll("[id]")].map(({ id }) => id);
      expect(new Set(ids).size).toBe(ids.length);
      for (const link of each.querySelectorAll("[href]")) {
        const to = link.getAttribute("href")!;
        if (to.startsWith("#")) expect(ids).toContain(to.slice(1));
        else if (to !== "data:,") expect([...files.keys()]).toContain(to);
      }
    }
  });

  it("makes text of whatever the descriptions hold", () => {
    const hostile = `<img src=x onerror="alert(1)"> & "quotes"`;
    const first = json.functions[0]!;
    const made = helpPage({ json: { ...json, functions: [{ ...first, description: hostile, parameters: first.parameters.map((each) => ({ ...each, description: hostile })) }] }, sources: new Map([[first.id, hostile]]), namespace: "PROBE" });
    const parsed = parsedPage(made);
    expect(parsed.querySelectorAll("img, script, [onerror]").length).toBe(0);
    expect(parsed.getElementById(first.id)!.textContent).toContain(hostile);
  });

  it("refuses a function without an example or without a source", () => {
    const odd = { ...json.functions[0]!, id: "ODD", name: "ODD", parameters: [{ name: "unheard_of", description: "An argument." }] };
    expect(() => helpPage({ json: { ...json, functions: [odd] }, sources: new Map([["ODD", "somewhere"]]), namespace: "PROBE" })).toThrow("ODD has no example");
    expect(() => helpPage({ json, sources: new Map(), namespace: "PROBE" })).toThrow("has no source");
    const folder = mkdtempSync(join(tmpdir(), "sources-"));
    writeFileSync(join(folder, "odd.ts"), "/**\n * Odd.\n * @customfunction ODD\n * @param a An argument.\n */\nexport function odd(a: any): any {\n  return a;\n}\n");
    expect(() => functionSources(folder)).toThrow("odd.ts: ODD has no @source line");
    rmSync(folder, { recursive: true });
  });
});

describe("every example of the help page gives a value", () => {
  const kept = new Map<string, string>();
  afterAll(() => expect(kept.size).toBeGreaterThan(20));

  const metadata = JSON.parse(readFileSync(`${ROOT}/test/guards/functions.json`, "utf8")) as FunctionsJson;
  it.each(helpEntries(metadata.functions, "PROBE").map((entry) => [entry.id, entry.example("Site")!]))("%s: %s", (id, example) => {
    const { out, err, code } = formulaLine([example]);
    expect({ err, code }).toEqual({ err: "", code: 0 });
    expect(out.trim()).not.toBe("");
    expect(out).not.toMatch(/#(VALUE|NAME|N\/A|REF|DIV|NUM|BUSY|CALC)|NaN|Infinity|undefined/);
    kept.set(id, out);
  });
});

describe("the privacy statement", () => {
  it("names every place in which a page keeps something, and no other", () => {
    const stored = filesBelow(ROOT, "src").filter((path) => path.endsWith(".ts") && /localStorage|sessionStorage|indexedDB|document\.cookie|caches\.open/.test(readFileSync(`${ROOT}/${path}`, "utf8")) && !path.startsWith("src/build/"));
    expect(stored).toEqual(["src/pane/parts/theme.ts", "src/pane/run-shelf.ts", "src/practice/theme-switch.ts"]);
    const names = stored.map((path) => /(?:REMEMBERED|NAME|KEY) = "([^"]+)"/.exec(readFileSync(`${ROOT}/${path}`, "utf8"))?.[1]);
    expect(names).toEqual(["probeworth-colours", "probeworth-runs", "probeworth-theme"]);
    for (const name of names) expect(files.get("privacy.html")).toContain(name);
  });

  it("may say that nothing is sent: the pages fetch their own list of functions and nothing else", () => {
    const asking = filesBelow(ROOT, "src").filter((path) => /^src\/(pane|practice|host|functions|jobs|inputs|results|engine|units)\//.test(path) && path.endsWith(".ts"));
    const found = asking.flatMap((path) => [...readFileSync(`${ROOT}/${path}`, "utf8").matchAll(/\b(fetch\([^)]*\)|XMLHttpRequest|WebSocket|EventSource|sendBeacon|importScripts)/g)].map(([call]) => `${path}: ${call}`));
    expect(found).toEqual(['src/pane/main.ts: fetch("functions.json")', 'src/practice/main.ts: fetch("functions.json")']);
  });

  it("names the platform's address that a released pane asks", () => {
    expect(files.get("privacy.html")).toContain(new URL(form.library).origin);
  });
});
