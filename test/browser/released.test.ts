import { existsSync, readFileSync } from "node:fs";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { panePolicy, THREAD_POLICY } from "../../src/build/content-policy.js";
import { formFrom } from "../../src/build/form.js";
import { builtFaults } from "../guards/built.js";
import { ROOT } from "../guards/files.js";
import { buildIn, manifestFaults } from "../guards/manifest.js";
import { ADDRESS, LIBRARY, startReleased, type OpenPage, type Released } from "./harness/released-add-in.js";

let released: Released;

beforeAll(async () => {
  released = await startReleased();
});

afterAll(async () => {
  await released?.close();
});

const ours = (opened: OpenPage): string[] => opened.violations.filter((violation) => violation.includes(ADDRESS));
const foreign = (opened: OpenPage): string[] => opened.requests.filter((address) => !address.startsWith(ADDRESS) && !address.startsWith(LIBRARY) && !/^(data|blob):/.test(address));

/** Puts a script into a page as an injected cell text would, and lets the page say whether it ran. */
const PLANTED = '<script>window.planted = "ran"</script>';

/** Script that finds out what text and bytes may become code where it runs. */
const PROBE = `
  const attempt = (run) => { try { return String(run()); } catch (reason) { return reason.name; } };
  const tried = {
    text: attempt(() => (0, eval)("1 + 1")),
    body: attempt(() => new Function("return 2")()),
    kernel: attempt(() => new WebAssembly.Module(new Uint8Array([0, 97, 115, 109, 1, 0, 0, 0]))),
  };`;

describe("the pane of a released build", () => {
  it("starts with the platform's own library, shows itself, breaks no rule of its policy and asks nobody else", async () => {
    const opened = await released.open("pane.html", { viewport: { width: 320, height: 800 } });
    await opened.page.locator(".probeworth").getByText("22 functions").waitFor();
    await opened.page.waitForFunction(() => typeof (globalThis as { Office?: { onReady?: unknown } }).Office?.onReady === "function");
    expect(opened.requests.filter((address) => address.startsWith(LIBRARY)).length).toBeGreaterThan(0);
    // what is refused is the library's own, seconds later: the frame in which it would report to its maker, and that frame's look
    const refused = (): string[] => opened.violations.map((violation) => violation.split(" ").slice(0, 2).join(" ")).sort();
    await expect.poll(refused, { timeout: 20_000 }).toEqual(["frame-src https://telemetryservice.firstpartyapps.oaspapps.com", "style-src-attr inline"]);
    expect(ours(opened)).toEqual([]);
    expect(foreign(opened)).toEqual([]);
    await opened.page.context().close();
  });

  it("finds its threads, functions, icon and help beside it under a path", async () => {
    const opened = await released.open("pane.html");
    await opened.page.locator(".probeworth").getByText("22 functions").waitFor();
    const found = await opened.page.evaluate(async () => {
      const answers = [];
      for (const path of ["functions.json", "assets/icon-32.png", "help.html", "functions.js"]) answers.push((await fetch(path)).status);
      return answers;
    });
    expect(found).toEqual([200, 200, 200, 200]);
    const links = await opened.page.locator(".probeworth a").evaluateAll((all) => all.map((link) => link.getAttribute("href")));
    expect(links.sort()).toEqual(["help.html", "privacy.html"]);
    for (const link of links) expect(existsSync(`${released.folder}/${link}`) && existsSync(`${released.folder}/practice/${link}`)).toBe(true);
    expect(opened.requests.every((address) => address.startsWith(ADDRESS) || address.startsWith(LIBRARY))).toBe(true);
    await opened.page.context().close();
  });

  it("carries the policy of its form to the letter", async () => {
    const opened = await released.open("pane.html");
    expect(await opened.page.locator("meta[http-equiv=Content-Security-Policy]").getAttribute("content")).toBe(panePolicy(formFrom(["--base", ADDRESS])));
    await opened.page.context().close();
  });

  it.each([
    ["a script in the page", (html: string) => html.replace("<body>", `<body>${PLANTED}`), "script-src-elem inline"],
    ["an event handler", (html: string) => html.replace("<body>", `<body><img src="x:" onerror="window.planted = 'ran'">`), "script-src-attr inline"],
    ["a script from elsewhere", (html: string) => html.replace("<body>", '<body><script src="https://example.net/planted.js"></script>'), "script-src-elem https://example.net/planted.js"],
    ["a style in the page", (html: string) => html.replace("<body>", "<body><style>body { opacity: 0 }</style>"), "style-src-elem inline"],
    ["a style attribute", (html: string) => html.replace("<body>", '<body><p style="opacity: 0">planted</p>'), "style-src-attr inline"],
    ["a base address elsewhere", (html: string) => html.replace("<title>", '<base href="https://example.net/"><title>'), "base-uri https://example.net"],
    ["a frame", (html: string) => html.replace("<body>", '<body><iframe src="https://example.net/"></iframe>'), "frame-src https://example.net"],
    ["a picture from elsewhere", (html: string) => html.replace("<body>", '<body><img src="https://example.net/p.png">'), "img-src https://example.net/p.png"],
  ])("refuses %s", async (_, change, violation) => {
    const opened = await released.open("pane.html", {}, { "pane.html": change });
    await expect.poll(() => opened.violations.join("\n")).toContain(violation);
    expect(await opened.page.evaluate(() => (window as { planted?: string }).planted)).toBeUndefined();
    expect(opened.requests.filter((address) => address.startsWith("https://example.net/"))).toEqual([]);
    await opened.page.context().close();
  });

  it("turns no text into code, but may compile its kernels", async () => {
    const opened = await released.open("pane.html", {}, { "pane.js": (script) => `${script}\n${PROBE} globalThis.tried = tried;` });
    // read back only: what a test itself has evaluated in a page is not held by the page's policy
    const tried = await opened.page.waitForFunction(() => (globalThis as { tried?: unknown }).tried);
    expect(await tried.jsonValue()).toEqual({ text: "EvalError", body: "EvalError", kernel: "[object WebAssembly.Module]" });
    await opened.page.context().close();
  });
});

describe("the practice page of a released build", () => {
  it("opens under a path, breaks no rule of its policy and asks its own address only", async () => {
    const opened = await released.open("practice/");
    await opened.page.locator("body[data-state=ready]").waitFor({ timeout: 60_000 });
    await opened.page.locator("#pane").getByRole("tab", { name: "Results" }).click();
    await opened.page.locator("#pane").getByText("All piles together").waitFor({ timeout: 60_000 });
    expect(opened.violations).toEqual([]);
    expect(opened.complaints).toEqual([]);
    expect(opened.requests.filter((address) => !address.startsWith(`${ADDRESS}practice/`) && !/^(data|blob):/.test(address))).toEqual([]);
    expect(opened.requests.filter((address) => address.endsWith("-worker.js")).length).toBeGreaterThan(0);
    await opened.page.context().close();
  });

  it.each(["help.html", "privacy.html", "practice/help.html"])("opens %s beside it, which breaks no rule of its own policy, in both looks and at 320 px", async (path) => {
    for (const colorScheme of ["light", "dark"] as const) {
      const opened = await released.open(path, { viewport: { width: 320, height: 900 }, colorScheme });
      expect(await opened.page.locator("h1").textContent()).toMatch(/^Probeworth/);
      expect(await opened.page.evaluate(() => document.documentElement.scrollWidth)).toBe(320);
      const [ink, paper] = await opened.page.evaluate(() => [getComputedStyle(document.body).color, getComputedStyle(document.body).backgroundColor]);
      expect(Number(/\d+/.exec(ink!)![0]) > Number(/\d+/.exec(paper!)![0])).toBe(colorScheme === "dark");
      expect([opened.violations, opened.complaints]).toEqual([[], []]);
      await opened.page.context().close();
    }
  });

  it("refuses a script in the page", async () => {
    const opened = await released.open("practice/", {}, { "practice/": (html) => html.replace("<main>", `<main>${PLANTED}`) });
    await expect.poll(() => opened.violations.join("\n")).toContain("script-src-elem inline");
    expect(await opened.page.evaluate(() => (window as { planted?: string }).planted)).toBeUndefined();
    await opened.page.context().close();
  });
});

describe("the files of a released build", () => {
  it("pass every check that the manifest and the build of development pass", () => {
    const { version } = JSON.parse(readFileSync(`${ROOT}/package.json`, "utf8")) as { version: string };
    expect(manifestFaults(readFileSync(`${released.folder}/manifest.xml`, "utf8"), buildIn(released.folder, version))).toEqual([]);
    expect(builtFaults(released.folder, ADDRESS)).toEqual([]);
    expect(builtFaults(released.folder, "https://elsewhere.example.org/").length).toBeGreaterThan(20); // the addresses are compared
  });
});

describe("a thread", () => {
  /** What a thread whose script comes from the build can do, with or without a policy among the headers of that script. */
  async function tryThread(headers: Readonly<Record<string, string>>): Promise<Record<string, string>> {
    const script = `${PROBE} fetch("help.html").then((answer) => "answer " + answer.status, (reason) => reason.name).then((fetched) => postMessage({ ...tried, fetched }));`;
    const opened = await released.open("pane.html", {}, { "probe.js": () => script }, headers);
    const answer = await opened.page.evaluate(
      () =>
        new Promise<Record<string, string>>((resolve, reject) => {
          const worker = new Worker("probe.js");
          worker.onmessage = ({ data }) => resolve(data as Record<string, string>);
          worker.onerror = ({ message }) => reject(new Error(message));
        }),
    );
    await opened.page.context().close();
    return answer;
  }

  it("does not inherit the page's policy, and is held by one in its own headers", async () => {
    const module = "[object WebAssembly.Module]";
    expect(await tryThread({})).toEqual({ text: "2", body: "2", kernel: module, fetched: "answer 200" });
    expect(await tryThread({ "Content-Security-Policy": THREAD_POLICY })).toEqual({ text: "EvalError", body: "EvalError", kernel: module, fetched: "TypeError" });
    // a server that knows nothing of kernels: the engine has the same sums in JavaScript
    expect(await tryThread({ "Content-Security-Policy": "default-src 'none'; script-src 'self'" })).toMatchObject({ kernel: "CompileError" });
  });

  it("prices under the policy that the guide has a server send with every script", async () => {
    const opened = await released.open("practice/", {}, {}, { "Content-Security-Policy": `${THREAD_POLICY}; style-src 'self' 'unsafe-inline'; img-src 'self' data: blob:; font-src 'self' data:; connect-src 'self'; worker-src 'self'` });
    await opened.page.locator("body[data-state=ready]").waitFor({ timeout: 60_000 });
    await opened.page.locator("#pane").getByRole("tab", { name: "Results" }).click();
    await opened.page.locator("#pane").getByText("All piles together").waitFor({ timeout: 60_000 });
    expect([opened.violations, opened.complaints]).toEqual([[], []]);
    await opened.page.context().close();
  });
});
