import { readFileSync } from "node:fs";
import { libraryFile } from "./library.js";

/** How far each requirement set goes, such as ExcelApi "1.14". */
export type SupportedSets = Readonly<Record<string, string>>;

// one line of the library for each member that came after the first version: name, set and version
const GUARD = /_throwIfApiNotSupported\("([\w.]+)", (_defaultApiSetName|"[^"]*"), "([\d.]+)"/g;

let members: Map<string, { set: string; version: string }> | undefined;

/**
 * The set and version that a member came with, out of the library's own guards.
 *
 * @param member  such as "Worksheet.getRangeByIndexes"
 * @returns       undefined for a member of ExcelApi 1.1
 */
export function requirementOf(member: string): { set: string; version: string } | undefined {
  members ??= readGuards();
  return members.get(member);
}

/** Whether these sets hold the member. */
export function isSupported(member: string, sets: SupportedSets): boolean {
  const wanted = requirementOf(member);
  if (wanted === undefined) return true;
  const reached = sets[wanted.set];
  return reached !== undefined && isAtLeast(reached, wanted.version);
}

function isAtLeast(reached: string, wanted: string): boolean {
  const [a = 0, b = 0] = reached.split(".").map(Number);
  const [c = 0, d = 0] = wanted.split(".").map(Number);
  return a > c || (a === c && b >= d);
}

function readGuards(): Map<string, { set: string; version: string }> {
  const found = new Map<string, { set: string; version: string }>();
  for (const [, member, set, version] of readFileSync(libraryFile("excel-win32-16.01.debug.js"), "utf8").matchAll(GUARD)) {
    found.set(member ?? "", { set: set === "_defaultApiSetName" ? "ExcelApi" : (set ?? "").replaceAll('"', ""), version: version ?? "" });
  }
  // an empty table would let every member pass
  if (found.size < 600) throw new Error(`Only ${found.size} members of the library name their requirement set; its text has changed.`);
  return found;
}
