import { readdirSync } from "node:fs";
import { dirname } from "node:path";
import { fileURLToPath } from "node:url";

/** The project's own folder. */
export const ROOT = dirname(dirname(dirname(fileURLToPath(import.meta.url))));

/**
 * Every file below a folder.
 *
 * @returns paths relative to root with forward slashes, sorted; nothing from node_modules or dist
 */
export function filesBelow(root: string, folder: string): string[] {
  const found: string[] = [];
  for (const entry of readdirSync(`${root}/${folder}`, { withFileTypes: true })) {
    if (entry.name === "node_modules" || entry.name === "dist") continue;
    const path = `${folder}/${entry.name}`;
    if (entry.isDirectory()) found.push(...filesBelow(root, path));
    else found.push(path);
  }
  return found.sort();
}
