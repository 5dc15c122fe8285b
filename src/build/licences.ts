import { existsSync, readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";

const PACKAGES = fileURLToPath(new URL("../../node_modules/", import.meta.url));
/** Licences that let us hand a package on inside our files, if its own words go with it. */
const ACCEPTED = /^\(?(MIT|ISC|Apache-2\.0|BSD-2-Clause|BSD-3-Clause|0BSD|CC0-1\.0|Unlicense|MIT-0|BlueOak-1\.0\.0)( (OR|AND) [A-Za-z0-9.-]+)*\)?$/;

/**
 * The package that a file belongs to.
 *
 * @param path  of a file, in any form
 * @returns     folder below node_modules, such as "@scope/name"; undefined for a file of ours
 */
export function packageOf(path: string): string | undefined {
  return /^.*[/\\]node_modules[/\\]((?:@[^/\\]+[/\\])?[^/\\]+)/.exec(path)?.[1]?.replace("\\", "/");
}

/**
 * The licences of packages that go into a bundle: each asks that its words go along.
 *
 * @param packages  folders below node_modules, in any order, each any number of times
 * @throws {Error}  a package is under a licence that nobody has looked at
 */
export function licences(packages: Iterable<string>): string {
  const parts = [...new Set(packages)].sort().map((name) => {
    const { version, author, license } = JSON.parse(readFileSync(`${PACKAGES}${name}/package.json`, "utf8")) as { version: string; author?: string | { name?: string }; license?: string };
    const words = wordsOf(name);
    const stated = license ?? (words !== undefined && /^\s*Apache License\s+Version 2\.0/.test(words) ? "Apache-2.0" : undefined);
    if (stated === undefined || !ACCEPTED.test(stated)) throw new Error(`The package ${name} ${version} is under ${stated === undefined ? "no licence that it states" : `the licence "${stated}"`}; none of its code may go out with ours before somebody has read that licence and entered it in src/build/licences.ts.`);
    const by = typeof author === "string" ? author : author?.name;
    return `${name} ${version}, ${stated}${by === undefined ? "" : `, by ${by}`}\n\n${words ?? "The package holds no longer text of its licence."}\n`;
  });
  return `Parts of other people's work in these files, and their licences. Our own: MIT.\n\n${parts.join(`\n${"-".repeat(72)}\n\n`)}`;
}

function wordsOf(name: string): string | undefined {
  const folder = `${PACKAGES}${name}`;
  const file = existsSync(folder) ? readdirSync(folder).find((each) => /^(licen[cs]e|copying)(\.(md|txt))?$/i.test(each)) : undefined;
  return file === undefined ? undefined : readFileSync(`${folder}/${file}`, "utf8").trim();
}
