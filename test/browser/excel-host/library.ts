import { createRequire } from "node:module";
import { join, normalize, sep } from "node:path";

/** Where the platform serves its library from; the page of the add-in names it. */
export const LIBRARY_ADDRESS = "https://appsforoffice.microsoft.com/lib/1/hosted/";

const FOLDER = join(createRequire(import.meta.url).resolve("@microsoft/office-js/package.json"), "../dist/");

/**
 * A file of the platform's own library, as npm installed it.
 *
 * @param path  below the library's folder, such as "office.js"
 * @throws {Error} for a path that leads out of the folder
 */
export function libraryFile(path: string): string {
  const file = normalize(join(FOLDER, decodeURIComponent(path)));
  if (!file.startsWith(normalize(FOLDER + sep))) throw new Error(`${path} is no file of the library.`);
  return file;
}
