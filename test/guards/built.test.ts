import { randomBytes } from "node:crypto";
import { cpSync, existsSync, mkdtempSync, readFileSync, rmSync, unlinkSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { DEVELOPMENT } from "../../src/build/form.js";
import { builtFaults } from "./built.js";
import { ROOT } from "./files.js";

const dist = `${ROOT}/dist`;
const copies: string[] = [];

beforeAll(() => {
  if (!existsSync(`${dist}/functions.js`)) throw new Error("There is no build to look at; run: npm run build");
});

afterAll(() => {
  for (const copy of copies) rmSync(copy, { recursive: true });
});

/** The faults of a copy of the build into which something was planted. */
function planted(plant: (folder: string) => void): string {
  const folder = mkdtempSync(join(tmpdir(), "built-"));
  copies.push(folder);
  cpSync(dist, folder, { recursive: true, filter: (path) => !/practice[/\\].*\.js$/.test(path) || path.endsWith("main.js") });
  plant(folder);
  return builtFaults(folder, DEVELOPMENT.base).join("\n");
}

const into = (path: string, change: (text: string) => string) => (folder: string) => writeFileSync(join(folder, path), change(readFileSync(join(folder, path), "utf8")));
const grid = (): string => readFileSync(`${dist}/practice/main.js`, "utf8").slice(1_000_000, 1_400_000);
const library = (): string => readFileSync(`${ROOT}/node_modules/@microsoft/office-js/dist/excel-web-16.00.js`, "utf8").slice(0, 300_000);

describe("the build", () => {
  it("has every page and file, no code from text, no stranger, and help where functions.json says", () => {
    expect(builtFaults(dist, DEVELOPMENT.base)).toEqual([]);
    expect(planted(() => undefined)).toBe("");
  });

  it.each<[string, (folder: string) => void, string]>([
    ["a bundle with the grid in it", into("pane.js", (text) => text + grid()), "holds the practice workbook's grid"],
    ["a bundle with the platform's library in it", into("pane.js", (text) => text + library()), "holds the platform's library"],
    ["eval", into("pane.js", (text) => `${text};eval("1")`), "turns text into code"],
    ["eval by another way", into("functions.js", (text) => `${text};(0,eval)("1")`), "turns text into code"],
    ["a function made from text", into("functions.js", (text) => `${text};var f=new Function("return 1")`), "turns text into code"],
    ["a timer that runs text", into("pane.js", (text) => `${text};setTimeout("f()",1)`), "turns text into code"],
    ["a map of the source", into("pane.js", (text) => `${text}\n//# sourceMappingURL=pane.js.map`), "map of its source"],
    ["a script inside a page", into("pane.html", (text) => text.replace("<body>", "<body><script>1</script>")), "pane.html holds a script"],
    ["a style inside a page", into("help.html", (text) => text.replace("</head>", "<style>a{}</style></head>")), "help.html holds a style"],
    ["a style attribute", into("practice/index.html", (text) => text.replace("<main", '<main style="x:y"')), "practice/index.html holds a style"],
    ["a handler inside a page", into("privacy.html", (text) => text.replace("<main>", '<main onclick="f()">')), "holds a handler onclick"],
    ["a page without a policy", into("help.html", (text) => text.replace(/<meta http-equiv[^>]*>/, "")), "help.html has no content policy"],
    ["a script from elsewhere", into("pane.html", (text) => text.replace("<body>", '<body><script src="https://example.net/x.js"></script>')), "leads to https://example.net/x.js"],
    ["an address from the server's root", into("pane.html", (text) => text.replace(/src="?functions.js/, "src=/functions.js")), "leads to /functions.js, which is not below"],
    ["a link to nowhere", into("help.html", (text) => text.replace("privacy.html", "private.html")), "leads to private.html, which is not in the build"],
    ["a help address elsewhere", into("functions.json", (text) => text.replace("help.html#CARBON", "#CARBON")), "The help address of CARBON"],
    ["a help page without a function", into("help.html", (text) => text.replace(/id="?CARBON"?/, 'id="CARBONS"')), "no place named CARBON"],
    ["a missing page", (folder) => unlinkSync(join(folder, "privacy.html")), "privacy.html is missing"],
    ["a stray file", (folder) => writeFileSync(join(folder, "notes.txt"), "x"), "notes.txt is of no kind"],
    ["more than 400 kB packed", (folder) => writeFileSync(join(folder, "more.js"), randomBytes(400_000).toString("base64")), "above 400000"],
  ])("refuses %s", (_, plant, fault) => {
    expect(planted(plant)).toContain(fault);
  });
});
