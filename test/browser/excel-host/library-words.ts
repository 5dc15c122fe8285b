import { readFileSync } from "node:fs";
import { libraryFile } from "./library.js";

const known = new Map<string, readonly string[]>();
let text: string | undefined;

/**
 * The words of one of the platform's lists, such as all types of charts, out of the library itself.
 *
 * @param list  such as "ChartType"
 */
export function libraryWords(list: string): readonly string[] {
  let words = known.get(list);
  if (words === undefined) {
    text ??= readFileSync(libraryFile("excel-win32-16.01.debug.js"), "utf8");
    words = [...text.matchAll(new RegExp(`(?<![\\w.])${list}\\["\\w+"\\] = "(\\w+)"`, "g"))].map((match) => match[1] ?? "");
    if (words.length === 0) throw new Error(`The library has no list ${list}.`);
    known.set(list, words);
  }
  return words;
}
