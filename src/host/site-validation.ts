import type { CATALOGUE } from "../inputs/index.js";
import type { CellValidation } from "./workbook.js";

/** What the readers of a site block accept as a wish for the default. */
const DEFAULT_WORDS = ["default", "automatic"];
/** Signs that stand beside a selected cell. */
const LONGEST_WORDS = 255;

type Entry = (typeof CATALOGUE)[number];

/**
 * What may be typed beside a label of the site block. It stops slips of the hand at once; the reader of the block has the last
 * word, and more to say. A range is only held where the number has no unit that could be changed beside it.
 *
 * @param entry  the input
 * @returns      undefined where texts of many forms are accepted
 */
export function siteValidation(entry: Entry): CellValidation | undefined {
  const isOptional = entry.fallback !== undefined || entry.automatic !== undefined;
  const words = [...(isOptional ? DEFAULT_WORDS : []), ...(entry.automaticWords ?? [])];
  switch (entry.kind) {
    case "choice":
      return { kind: "choice", choices: entry.choices!.map(({ text }) => text), words: shortened(`Choose from the list. ${entry.help}`) };
    case "seed":
    case "counts":
    case "list":
      return undefined;
    default: {
      const none = entry.zero === "refused" ? [] : ["none"];
      const orWords = [...none, ...words];
      return { kind: "number", ...rangeOf(entry), ...(entry.whole === true ? { whole: true } : {}), ...(orWords.length === 0 ? {} : { orWords }), words: shortened(`${acceptedIn(entry, none.length > 0, entry.automaticWords?.[0])} ${entry.help}`) };
    }
  }
}

function rangeOf({ kind, minimum, maximum, zero }: Entry): { least?: number; most?: number } {
  if (kind === "number") return { least: zero === "accepted" ? Math.min(0, minimum!) : minimum, most: maximum };
  return { least: 0 };
}

function acceptedIn({ kind, unit, minimum, maximum, whole }: Entry, hasNone: boolean, automatic: string | undefined): string {
  const isMoney = kind === "money" || kind === "moneyPerLength";
  const symbol = unit === "" || unit === "ratio" || isMoney ? "" : ` ${unit}`;
  const range = isMoney ? "A price above zero" : `A ${whole === true ? "whole number" : "number"} from ${plain(minimum!)} to ${plain(maximum!)}${symbol}`;
  return `${range}${hasNone ? (isMoney ? ", or none if it costs nothing" : ", or none") : ""}${automatic === undefined ? "" : `, or ${automatic}`}.`;
}

function plain(value: number): string {
  return value.toLocaleString("en-US", { maximumSignificantDigits: 6 });
}

/** Whole sentences, as many as fit. */
function shortened(words: string): string {
  let kept = words;
  while (kept.length > LONGEST_WORDS) kept = kept.slice(0, kept.lastIndexOf(". ", kept.length - 2) + 1);
  return kept;
}
