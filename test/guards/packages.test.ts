import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { ROOT } from "./files.js";
import { packageFaults } from "./packages.js";

const manifest = readFileSync(`${ROOT}/package.json`, "utf8");
const lock = readFileSync(`${ROOT}/package-lock.json`, "utf8");

type Parsed = Record<string, Record<string, unknown>>;
const changed = (text: string, change: (parsed: Parsed) => void): string => {
  const parsed = JSON.parse(text) as Parsed;
  change(parsed);
  return JSON.stringify(parsed);
};
const locked = (path: string, entry: object): string => packageFaults(manifest, changed(lock, (parsed) => (parsed["packages"][path] = entry))).join(" ");
const asked = (change: (parsed: Parsed) => void): string => packageFaults(changed(manifest, change), lock).join(" ");

describe("packages", () => {
  it("are exact, sorted, open, without an address, and run on the promised Node", () => {
    expect(packageFaults(manifest, lock)).toEqual([]);
  });

  it("refuses a proprietary package of the grid", () => {
    expect(locked("node_modules/@univerjs-pro/sheets-chart", { version: "0.25.1" })).toContain("proprietary");
  });
  it("refuses a package that would bring one", () => {
    expect(locked("node_modules/planted", { version: "1.0.0", dependencies: { "@univerjs-pro/license": "0.25.1" } })).toContain("proprietary");
  });
  it("refuses a package without an open licence", () => {
    expect(locked("node_modules/planted", { version: "1.0.0", license: "SEE LICENSE IN LICENSE.md" })).toContain("no open licence");
  });
  it("refuses an address in the lock file", () => {
    expect(locked("node_modules/planted", { version: "1.0.0", resolved: "https://example.invalid/planted.tgz" })).toContain("names the machine");
  });
  it("refuses a lock file that lacks a package, an optional one too", () => {
    expect(locked("node_modules/planted", { version: "1.0.0", optionalDependencies: { "for-another-system": "^0.1.0" } })).toContain("wants for-another-system, which the lock file lacks");
  });
  it("refuses a package that wants a later Node", () => {
    expect(locked("node_modules/planted", { version: "1.0.0", engines: { node: ">=22.12.0" } })).toContain("wants Node >=22.12.0");
  });
  it("refuses a range where an exact version belongs", () => {
    expect(asked((parsed) => (parsed["dependencies"]["jstat"] = "^1.9.6"))).toContain('jstat is asked for as "^1.9.6"');
  });
  it("refuses a version that the lock file does not hold", () => {
    expect(asked((parsed) => (parsed["dependencies"]["jstat"] = "1.9.5"))).toContain("jstat 1.9.5 is not what the lock file holds");
  });
  it("refuses an unsorted list", () => {
    expect(asked((parsed) => (parsed["dependencies"] = Object.fromEntries(Object.entries(parsed["dependencies"]).reverse())))).toContain("dependencies are not sorted");
  });
  it("refuses another promise about Node", () => {
    expect(asked((parsed) => (parsed["engines"]["node"] = ">=18"))).toContain("does not promise node >=20");
  });
});
