import { decade, powerOfTen } from "../../results/powers-of-ten.js";

/** Writes numbers for people: grouped, and no finer than they are known. */
export interface NumberWriter {
  /** money, rounded to a step */
  money(value: number, step: number): string;
  /** a plain figure with at most so many decimals */
  plain(value: number, decimals: number): string;
  /** a share from 0 to 1 as a percentage; never "0 %" or "100 %" for a share that is neither */
  percent(share: number): string;
}

/**
 * Makes the writer for a language.
 *
 * @param locale  language tag; omitted: the person's own, because a comma is a decimal mark in half the world
 * @returns       the writer
 */
export function numberWriter(locale?: string): NumberWriter {
  const grouped = new Map<number, Intl.NumberFormat>();
  const plain = (value: number, decimals: number): string => {
    let format = grouped.get(decimals);
    if (format === undefined) {
      format = new Intl.NumberFormat(locale, { maximumFractionDigits: decimals });
      grouped.set(decimals, format);
    }
    const rounded = Number(value.toFixed(decimals));
    return format.format(rounded === 0 ? 0 : rounded).replace("-", "\u2212");
  };
  return {
    plain,
    money: (value, step) => {
      const decimals = step >= 1 ? 0 : -decade(step);
      return plain(Math.round(value / step) * step, decimals);
    },
    percent: (share) => {
      const hundredths = share * 100;
      if (share > 0 && hundredths < 1) return `under ${plain(1, 0)}\u00a0%`;
      if (share < 1 && hundredths > 99) return `over ${plain(99, 0)}\u00a0%`;
      return `${plain(hundredths, 0)}\u00a0%`;
    },
  };
}

/**
 * The step to which money is rounded: the second figure of its standard error, and never more than five figures of the largest sum.
 *
 * @param standardError  largest standard error of the sums shown, money, >= 0
 * @param largest        largest sum shown, money, >= 0
 * @returns              a power of ten; at least 1 where sums reach 100
 */
export function moneyStep(standardError: number, largest: number): number {
  const power = (value: number): number => powerOfTen(decade(value));
  const byError = standardError > 0 ? power(standardError) / 10 : 0;
  const bySize = largest > 0 ? power(largest) / 1e4 : 0;
  const step = Math.max(byError, bySize);
  if (largest >= 100) return Math.max(1, step);
  return step > 0 ? step : 0.01;
}

/** Numbers of holes in words read faster in a sentence than digits; above twelve digits are clearer. */
const WORDS = ["no", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine", "ten", "eleven", "twelve"];

/**
 * A count of holes as words: "no holes", "one hole", "four holes", "16 holes".
 *
 * @param count  number of holes, integer >= 0
 * @returns      the words, in lower case
 */
export function holesInWords(count: number): string {
  return `${WORDS[count] ?? String(count)} ${count === 1 ? "hole" : "holes"}`;
}

/**
 * Joins a list as people do: "1", "1 and 2", "1, 2 and 5".
 *
 * @param items  the words
 * @returns      one phrase
 */
export function joinWords(items: readonly string[]): string {
  if (items.length < 2) return items.join("");
  return `${items.slice(0, -1).join(", ")} and ${items[items.length - 1]!}`;
}

/**
 * Consecutive counts drawn together: [2,3,4,7] becomes "2 to 4 and 7".
 *
 * @param counts  integers, rising
 * @returns       one phrase
 */
export function countsInWords(counts: readonly number[]): string {
  const runs: string[] = [];
  for (let start = 0; start < counts.length; ) {
    let end = start;
    while (end + 1 < counts.length && counts[end + 1] === counts[end]! + 1) end++;
    if (end - start >= 2) runs.push(`${counts[start]!} to ${counts[end]!}`);
    else for (let k = start; k <= end; k++) runs.push(String(counts[k]!));
    start = end + 1;
  }
  return joinWords(runs);
}

/**
 * Cuts a text from a cell to a length that a narrow pane can bear.
 *
 * @param text   any text
 * @param most   largest number of characters kept, >= 2
 * @returns      the text, or its beginning and an ellipsis
 */
export function shorten(text: string, most = 90): string {
  const characters = [...text];
  return characters.length <= most ? text : `${characters.slice(0, most - 1).join("")}\u2026`;
}

/** First letter in upper case, for a sentence. */
export const sentenceCase = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
