import { existsSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { THREAD_POLICY } from "../../src/build/content-policy.js";
import { formFrom } from "../../src/build/form.js";
import { ROOT } from "./files.js";

const read = (path: string): string => readFileSync(`${ROOT}/${path}`, "utf8");
const { scripts } = JSON.parse(read("package.json")) as { scripts: Record<string, string> };
const manifest = read("manifest.xml");
const PAPERS = ["README.md", "DEVELOPERS.md", "assets/deployment.md", "assets/excel-checklist.md"];

/** What a paper says that the project does not hold. */
function faults(path: string, text: string): string[] {
  const folder = path.includes("/") ? path.replace(/[^/]*$/, "") : "";
  return [
    ...[...text.matchAll(/npm run (?:--silent )?([a-z:]+)/g)].map(([, name]) => name!).filter((name) => scripts[name] === undefined).map((name) => `${path} names the command ${name}, which does not exist.`),
    ...[...text.matchAll(/\]\((?!https?:|#)([^)#]+)/g)].map(([, to]) => to!).filter((to) => !existsSync(`${ROOT}/${folder}${to}`)).map((to) => `${path} leads to ${to}, which is not there.`),
  ];
}

describe("what people are told", () => {
  it.each(PAPERS)("names commands and files that exist: %s", (path) => {
    expect(faults(path, read(path))).toEqual([]);
    expect(faults(path, `${read(path)} npm run nothing [x](nothing.md)`).length).toBe(2);
  });

  it("has the server send the policy that threads are tested under", () => {
    expect(read("assets/deployment.md")).toContain(`\`Content-Security-Policy: ${THREAD_POLICY}\``);
  });

  it("gives an address that the build takes, and the platform's address as the build has it", () => {
    const address = /--base (https:\S+)/.exec(read("assets/deployment.md"))![1]!;
    expect(formFrom(["--base", address]).base).toBe(address);
    expect(read("assets/deployment.md")).toContain(new URL(formFrom(["--base", address]).library).origin);
  });

  it("lets the checklist press the buttons that the ribbon has, on one page", () => {
    const checklist = read("assets/excel-checklist.md");
    for (const id of ["Open", "Insert", "Run", "Repair"]) expect(checklist).toContain(new RegExp(`id="${id}\\.Label" DefaultValue="([^"]+)"`).exec(manifest)![1]!);
    expect(checklist.split("\n").length).toBeLessThan(45);
    expect(checklist.split(/\s+/).length).toBeLessThan(800);
  });
});
