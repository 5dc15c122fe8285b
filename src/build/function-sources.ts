import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";

const FUNCTIONS = fileURLToPath(new URL("../functions/", import.meta.url));

/**
 * Where each cell function's method was published. The metadata generator knows no such tag, so the doc comments are read here.
 *
 * @param folder  where the functions' sources stand
 * @returns       id -> the text behind @source
 * @throws {Error} a function names no source
 */
export function functionSources(folder = FUNCTIONS): ReadonlyMap<string, string> {
  const found = new Map<string, string>();
  for (const name of readdirSync(folder).filter((each) => each.endsWith(".ts"))) {
    for (const [comment] of readFileSync(`${folder.replace(/\/$/, "")}/${name}`, "utf8").matchAll(/\/\*\*[^]*?\*\//g)) {
      const id = /@customfunction\s+(\S+)/.exec(comment)?.[1];
      if (id === undefined) continue;
      const words = /@source\s+([^]*?)(?=\n\s*\*\s*@|\*\/)/.exec(comment)?.[1]?.replace(/\s*\n\s*\*\s*/g, " ").trim();
      if (words === undefined || words === "") throw new Error(`${name}: ${id} has no @source line; the help page names where each method was published.`);
      found.set(id, words);
    }
  }
  return found;
}
