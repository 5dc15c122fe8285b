// @vitest-environment jsdom
import { existsSync, readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import { filesBelow, ROOT } from "./files.js";
import { manifestFaults } from "./manifest.js";

const xml = readFileSync(`${ROOT}/manifest.xml`, "utf8");
const { version } = JSON.parse(readFileSync(`${ROOT}/package.json`, "utf8")) as { version: string };
let built: string[];

beforeAll(() => {
  if (!existsSync(`${ROOT}/dist/functions.js`)) throw new Error("There is no build to compare the manifest with; run: npm run build");
  // listed without files.ts's own rule, which leaves dist out
  built = filesBelow(`${ROOT}/dist`, ".").map((path) => path.replace(/^\.\//, ""));
});

describe("the manifest", () => {
  it("is in order and names files of the build", () => {
    expect(manifestFaults(xml, version, built)).toEqual([]);
  });

  it.each([
    ["an address that is not in the build", "/functions.json", "/functions-2.json", "is not in the build"],
    ["a resource that does not exist", '<LearnMoreUrl resid="Help.Url"', '<LearnMoreUrl resid="More.Url"', "More.Url is used and nowhere defined"],
    ["a resource that nobody uses", '<Description resid="Open.Tip"', '<Description resid="Open.Label"', "Open.Tip is defined and nowhere used"],
    ["a resource name above 32 characters", /Functions\.Script\.Url/g, "Functions.Script.Url.OfThisRelease", "longer than 32 characters"],
    ["a page outside the shared runtime", '<FunctionFile resid="Pane.Url"', '<FunctionFile resid="Help.Url"', "do not all name the runtime's page"],
    ["a runtime that ends with the pane", 'lifetime="long"', 'lifetime="short"', "not shared"],
    ["a higher floor", 'Name="ExcelApi" MinVersion="1.9"', 'Name="ExcelApi" MinVersion="1.20"', "not the floor"],
    ["the released namespace on this machine", "PROBEDEV\"", "PROBE\"", "namespace is PROBE;"],
    ["another release", "<Version>", "<Version>9", "the release is"],
    ["an id that is none", "<Id>", "<Id>x", "not a UUID"],
    ["a text that is too long", 'DefaultValue="Probeworth (development)"', `DefaultValue="${"Probeworth ".repeat(12)}"`, "longer than 125"],
    ["XML that does not close", "</OfficeApp>", "", "not well-formed"],
  ])("refuses %s", (_, from, to, fault) => {
    const changed = xml.replace(from, to);
    expect(changed).not.toBe(xml);
    expect(manifestFaults(changed, version, built).join(" ")).toContain(fault);
  });

  it.each([16, 32, 64, 80, 128])("has an icon that is %i pixels wide and high", (size) => {
    const icon = readFileSync(`${ROOT}/assets/icon-${size}.png`);
    expect(icon.subarray(1, 4).toString()).toBe("PNG");
    expect([icon.readUInt32BE(16), icon.readUInt32BE(20)]).toEqual([size, size]); // the header's width and height
  });
});
