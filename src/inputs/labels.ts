import { CATALOGUE, SECTIONS, type CatalogueEntry } from "./catalogue.js";

/** American spellings and the like, word by word, so that both find the same label. */
const SAME_WORD: Readonly<Record<string, string>> = { meter: "metre", metres: "metre", meters: "metre", mobilization: "mobilisation", poissons: "poisson", "&": "and" };

const ENTRIES = new Map(CATALOGUE.map((entry) => [normaliseLabel(entry.label), entry]));
const FOUND = new Map<string, CatalogueEntry>();
const TITLES = new Map(SECTIONS.map((section) => [normaliseLabel(section), section]));
const SEARCHED = CATALOGUE.map((entry) => ({ label: entry.label, plain: normaliseLabel(entry.label), sorted: sortedWords(normaliseLabel(entry.label)) }));

/**
 * A label in the form by which labels are compared: case, extra spaces, apostrophes, hyphens and a closing colon make no difference.
 *
 * @param text  as written
 * @returns     words in lower case with single spaces between
 */
export function normaliseLabel(text: string): string {
  return text.slice(0, 80).normalize("NFKC").toLowerCase().replace(/['\u2018\u2019`]/g, "").replace(/[:*]+\s*$/, "").replace(/[\s_\-\u2010-\u2014]+/g, " ").trim()
    .split(" ").map((word) => (Object.hasOwn(SAME_WORD, word) ? SAME_WORD[word]! : word)).join(" ");
}

/**
 * The input that a label names.
 *
 * @param text  as written
 * @returns     its entry in the catalogue, or undefined
 */
export function entryLabelled(text: string): CatalogueEntry | undefined {
  if (text.length > 80) return undefined; // no label is that long
  let entry = FOUND.get(text);
  if (entry === undefined) {
    entry = ENTRIES.get(normaliseLabel(text));
    // the same few spellings come at each call, and comparing them anew was half the work of reading a block
    if (entry !== undefined && FOUND.size < 500) FOUND.set(text, entry);
  }
  return entry;
}

/**
 * Whether a text is a section title, such as Ground.
 *
 * @param text  as written
 * @returns     true for a section title
 */
export function isSectionTitle(text: string): boolean {
  return TITLES.has(normaliseLabel(text));
}

/**
 * The known label nearest to an unknown one, by the number of single-letter changes, in either order of words.
 *
 * @param text  as written
 * @returns     a label of the catalogue, or undefined where none comes near
 */
export function nearestLabel(text: string): string | undefined {
  return nearest(normaliseLabel(text), SEARCHED);
}

/**
 * The nearest of some words to an unknown one.
 *
 * @param text   as written
 * @param words  what would be accepted
 * @returns      one of them, or undefined where none comes near
 */
export function nearestWord(text: string, words: readonly string[]): string | undefined {
  return nearest(normaliseLabel(text), words.map((label) => ({ label, plain: normaliseLabel(label), sorted: sortedWords(normaliseLabel(label)) })));
}

function nearest(plain: string, candidates: readonly { label: string; plain: string; sorted: string }[]): string | undefined {
  const sorted = sortedWords(plain);
  let best: string | undefined;
  let least = Infinity;
  for (const candidate of candidates) {
    const longer = Math.max(plain.length, candidate.plain.length);
    if (Math.min(Math.abs(plain.length - candidate.plain.length), Math.abs(sorted.length - candidate.sorted.length)) / longer > least) continue; // a change a letter of difference at least
    const changes = Math.min(editDistance(plain, candidate.plain), editDistance(sorted, candidate.sorted) + 0.5); // the same order of words wins a tie
    const share = changes / longer;
    if (share < least) [least, best] = [share, candidate.label];
  }
  return least <= 0.6 ? best : undefined;
}

/** Words in alphabetical order without the small ones, so that "COV of stiffness" finds "Stiffness COV". */
function sortedWords(plain: string): string {
  return plain.split(" ").filter((word) => !/^(?:of|the|for|per|in|a)$/.test(word)).sort().join(" ");
}

/**
 * Single-letter changes (insert, drop, replace, swap of neighbours) between two words.
 *
 * @source Damerau (1964), A technique for computer detection and correction of spelling errors, Commun. ACM 7(3); restricted form
 */
function editDistance(a: string, b: string): number {
  let twoBack: number[] = [];
  let back = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      let changes = Math.min(back[j]! + 1, row[j - 1]! + 1, back[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) changes = Math.min(changes, twoBack[j - 2]! + 1);
      row.push(changes);
    }
    [twoBack, back] = [back, row];
  }
  return back[b.length]!;
}
