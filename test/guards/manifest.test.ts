import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { OfficeAddinManifest } from "office-addin-manifest";
import { beforeAll, describe, expect, it } from "vitest";
import { formFrom } from "../../src/build/form.js";
import { manifestFor } from "../../src/build/manifest.js";
import { ROOT } from "./files.js";
import { buildIn, manifestFaults, type Build } from "./manifest.js";

const xml = readFileSync(`${ROOT}/manifest.xml`, "utf8");
const { version } = JSON.parse(readFileSync(`${ROOT}/package.json`, "utf8")) as { version: string };
const form = formFrom(["--base", "https://tools.example.org/probeworth/"]);
const released = manifestFor(xml, form);
let build: Build;

beforeAll(() => {
  if (!existsSync(`${ROOT}/dist/functions.js`)) throw new Error("There is no build to compare the manifest with; run: npm run build");
  build = buildIn(`${ROOT}/dist`, version);
});

describe("the manifest", () => {
  it.each([
    ["of development", xml],
    ["that people install", released],
  ])("%s is in order and names files of the build", (_, text) => {
    expect(manifestFaults(text, build)).toEqual([]);
  });

  it.each([
    // what the schema orders
    ["another kind of add-in", 'xsi:type="TaskPaneApp"', 'xsi:type="ContentApp"', "not an OfficeApp of the type TaskPaneApp"],
    ["elements out of order", /( *<ProviderName>.*\n)( *<DefaultLocale>.*\n)/, "$2$1", "out of order in OfficeApp"],
    ["a missing element", /<DefaultLocale>.*\n/, "", "OfficeApp has no DefaultLocale"],
    ["an element twice", /(<SupportUrl .*\n)/, "$1$1", "OfficeApp has 2 times SupportUrl"],
    ["an element of somebody else's", "<Hosts>", "<Host2 /><Hosts>", "Host2 does not belong in OfficeApp"],
    ["an element under another name space", "<bt:Urls>", '<bt:Urls xmlns:bt="http://example.org/">', "is no element of the schema"],
    ["a button without a tip", /<Supertip>[^]*?<\/Supertip>/, "", "Control has no Supertip"],
    ["a tip without words", /<Description resid="Run.Tip" \/>/, "", "Supertip has no Description"],
    ["a group without an icon", /(<Label resid="Group.Label" \/>\s*)<Icon>[^]*?<\/Icon>/, "$1", "Group has no Icon"],
    ["the pane's runtime after what it runs", /(<Runtimes>[^]*?<\/Runtimes>)(\s*<AllFormFactors>[^]*?<\/AllFormFactors>)/, "$2$1", "Runtimes stands out of order in Host"],
    ["a tip after the icon", /(<Supertip>[^]*?<\/Supertip>)(\s*<Icon>[^]*?<\/Icon>)/, "$2$1", "Supertip stands out of order in Control"],
    ["texts before addresses", /(<bt:Urls>[^]*?<\/bt:Urls>)(\s*<bt:ShortStrings>[^]*?<\/bt:ShortStrings>)/, "$2$1", "Urls stands out of order in Resources"],
    ["a kind of action that does not exist", 'xsi:type="ExecuteFunction"', 'xsi:type="RunFunction"', "Action of the type RunFunction is no element"],
    // the head
    ["an id that is none", "<Id>", "<Id>x", "not a UUID"],
    ["a version of three numbers", /<Version>.*</, "<Version>0.1.0<", "not four numbers"],
    ["a number of six digits", /<Version>.*</, "<Version>0.1.0.123456<", "not four numbers of at most five digits"],
    ["another release", "<Version>", "<Version>9", "the release is"],
    ["a language without a country", ">en-US<", ">en<", "DefaultLocale en is not"],
    ["fewer rights than it needs", "ReadWriteDocument", "ReadDocument", "Permissions is not"],
    ["a higher floor", 'Name="ExcelApi" MinVersion="1.9"', 'Name="ExcelApi" MinVersion="1.20"', "not the floor"],
    ["another program", 'Host xsi:type="Workbook"', 'Host xsi:type="Document"', "not the workbook"],
    // resources
    ["a resource that does not exist", '<LearnMoreUrl resid="Help.Url"', '<LearnMoreUrl resid="More.Url"', "More.Url is used and nowhere defined"],
    ["a resource that nobody uses", '<Description resid="Open.Tip"', '<Description resid="Run.Tip"', "Open.Tip is defined and nowhere used"],
    ["a resource twice", /(<bt:Url id="Help.Url".*\n)/, "$1$1", "Help.Url is defined twice"],
    ["a resource name above 32 characters", /Functions\.Script\.Url/g, "Functions.Script.Url.OfThisRelease", "longer than 32 characters"],
    ["a label among the long texts", '<Label resid="Run.Label" />', '<Label resid="Run.Tip" />', "Label takes its resource from ShortStrings"],
    ["a page outside the shared runtime", '<FunctionFile resid="Pane.Url"', '<FunctionFile resid="Help.Url"', "do not all name the runtime's page"],
    ["a runtime that ends with the pane", 'lifetime="long"', 'lifetime="short"', "not shared"],
    // commands
    ["two buttons of one id", 'id="Probeworth.Run"', 'id="Probeworth.Open"', "have the id Probeworth.Open"],
    ["a button named as the group", 'id="Probeworth.Run"', 'id="Probeworth.Group"', "have the id Probeworth.Group"],
    ["an id of 126 characters", 'id="Probeworth.Run"', `id="${"r".repeat(126)}"`, "not 1 to 125 characters"],
    ["an action that nothing is bound to", "<FunctionName>Repair<", "<FunctionName>RepairAll<", "RepairAll has no body"],
    ["an action with a space", "<FunctionName>Repair<", "<FunctionName>Repair all<", "is not a name of letters"],
    ["two buttons with one action", "<FunctionName>Repair<", "<FunctionName>OpenRun<", "Two buttons run the action OpenRun"],
    // texts and addresses
    ["a name that is too long", 'DefaultValue="Probeworth (development)"', `DefaultValue="Probeworth (development)${" of ours".repeat(20)}"`, "longer than 125"],
    ["a label that is too long", 'DefaultValue="Repair cells"', `DefaultValue="${"Repair ".repeat(18)}"`, "longer than 125"],
    ["a tip that is too long", 'id="Run.Tip" DefaultValue="', `id="Run.Tip" DefaultValue="${"Opens ".repeat(42)}`, "longer than 250"],
    ["an empty label", 'DefaultValue="Repair cells"', 'DefaultValue=""', "or empty"],
    ["a maker without a name", ">Probeworth founders<", "><", "ProviderName"],
    ["an address that is not in the build", "/functions.json", "/functions-2.json", "is not in the build"],
    ["a help page that is not in the build", '/help.html" />\n  <AppDomains>', '/helps.html" />\n  <AppDomains>', "helps.html is not in the build"],
    ["an address without a lock", /https:\/\/localhost:3000\/functions.js"/, 'http://192.0.2.1/functions.js"', "is not an https:// address"],
    ["an address elsewhere", "https://localhost:3000/functions.js\"", 'https://example.org/functions.js"', "is not below https://localhost:3000/"],
    ["a domain that is not ours", "<AppDomain>https://localhost:3000<", "<AppDomain>https://example.org<", "not to the add-in's own server alone"],
    // pictures
    ["an icon without the size of 80", /<bt:Image size="80" resid="Run.80" \/>/, '<bt:Image size="64" resid="Run.80" />', "no picture of 80 pixels"],
    ["an icon with a size twice", /<bt:Image size="20" resid="Run.20" \/>/, '<bt:Image size="16" resid="Run.20" />', "16 pixels twice"],
    ["an icon of a size that no one takes", /<bt:Image size="20" resid="Run.20" \/>/, '<bt:Image size="128" resid="Run.20" />', "128 pixels"],
    ["a picture of other pixels than its size", "assets/run-40.png", "assets/run-48.png", "48 x 48, not 40 x 40"],
    ["a picture that is none", "assets/run-40.png", "pane.html", "no PNG, not 40 x 40"],
    ["a large mark of the small size", '/assets/icon-64.png" />\n  <SupportUrl', '/assets/icon-32.png" />\n  <SupportUrl', "32 x 32, not 64 x 64"],
    // forms
    ["the released namespace in the development add-in", 'DefaultValue="PROBEDEV"', 'DefaultValue="PROBE"', "The namespace is PROBE;"],
    ["a hint with the other namespace", "Type =PROBEDEV.VERSION()", "Type =PROBE.VERSION()", "names another namespace"],
    ["a namespace in small letters", 'DefaultValue="PROBEDEV"', 'DefaultValue="Probedev"', "not made of capital letters"],
    ["XML that does not close", "</OfficeApp>", "", "not well-formed"],
  ])("refuses %s", (_, from, to, fault) => {
    const changed = xml.replace(from, to);
    expect(changed).not.toBe(xml);
    expect(manifestFaults(changed, build).join(" ")).toContain(fault);
  });

  it("refuses a page whose scripts bind no action", () => {
    expect(manifestFaults(xml, { ...build, scripts: build.scripts.replaceAll(".actions.associate(", ".actions.forget(") })).toEqual(["The page's scripts bind no action to a body."]);
  });

  it("refuses an address above 2,048 characters", () => {
    const long = `https://localhost:3000/${"x".repeat(2048)}`;
    expect(manifestFaults(xml.replaceAll("https://localhost:3000/help.html", long), build).join(" ")).toContain("longer than 2048");
  });
});

describe("the platform's own reader, which works without a network,", () => {
  it("reads in both forms what the add-in is", async () => {
    const folder = mkdtempSync(join(tmpdir(), "manifest-"));
    writeFileSync(join(folder, "manifest.xml"), released);
    const [mine, theirs] = await Promise.all([`${ROOT}/manifest.xml`, join(folder, "manifest.xml")].map((path) => OfficeAddinManifest.readManifestFile(path)));
    rmSync(folder, { recursive: true });
    const common = { version: `${version}.0`, hosts: ["Workbook"], officeAppType: "TaskPaneApp", permissions: "ReadWriteDocument", defaultLocale: "en-US", providerName: "Probeworth founders" };
    expect(mine).toMatchObject({ ...common, id: "adcf2c65-7c41-47eb-8c06-697bf6195e7f", displayName: "Probeworth (development)", defaultSettings: { sourceLocation: "https://localhost:3000/pane.html" } });
    expect(theirs).toMatchObject({ ...common, id: "9d01fd15-6c5f-498c-a780-d730b1d90afc", displayName: "Probeworth", defaultSettings: { sourceLocation: `${form.base}pane.html` }, supportUrl: `${form.base}help.html` });
  });
});

describe("the two add-ins", () => {
  const blanked = (text: string, base: string): string =>
    text
      .replace(/<!--[^]*?-->\s*/g, "")
      .replace(/<Id>[^<]*</, "<Id><")
      .replace('DefaultValue="Probeworth (development)"', 'DefaultValue="Probeworth"')
      .replaceAll("PROBEDEV", "PROBE")
      .replaceAll(base, "address/")
      .replaceAll(`>${new URL(base).origin}<`, ">origin<");

  it("differ in id, name, namespace and addresses, and in nothing else", () => {
    const [mine, theirs] = [xml, released].map((text) => /<Id>(.*)<\/Id>/.exec(text)?.[1]);
    expect(mine).not.toBe(theirs);
    expect(blanked(released, form.base)).toBe(blanked(xml, "https://localhost:3000/"));
    // the comparison sees a single other word
    expect(blanked(released.replace("MinVersion=\"1.9\"", "MinVersion=\"1.8\""), form.base)).not.toBe(blanked(xml, "https://localhost:3000/"));
    expect(released).not.toMatch(/PROBEDEV|development|localhost/);
  });

  it("keep their ids, because Excel would take a new one for another add-in", () => {
    expect(xml).toContain("<Id>adcf2c65-7c41-47eb-8c06-697bf6195e7f</Id>");
    expect(released).toContain("<Id>9d01fd15-6c5f-498c-a780-d730b1d90afc</Id>");
  });

  it("take any address, one with signs that XML reserves too", () => {
    const odd = manifestFor(xml, formFrom(["--base", "https://example.org:8443/a&b/$&'/probedev"]));
    expect(manifestFaults(odd, { ...build, read: (path) => build.read(path) })).toEqual([]);
    expect(odd).toContain('DefaultValue="https://example.org:8443/a&amp;b/$&amp;\'/probedev/pane.html"');
    expect(odd).toContain("<AppDomain>https://example.org:8443</AppDomain>");
  });
});
