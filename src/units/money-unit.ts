import { METRES_PER_FOOT } from "./factors.js";
import { kindInWords, plainSpelling, readUnit } from "./read-unit.js";

/** A money unit as read: whose money, and what one price is for. */
export interface MoneyUnit {
  /** as written before "/" or "per", spaces trimmed; "" where none was written */
  readonly currency: string;
  /** as written after "/" or "per", in its plainest spelling; "" where none was written */
  readonly per: string;
}

/**
 * Splits a money unit such as "EUR/m", "USD per ft" or "GBP each". Money itself is free text.
 *
 * @param text  what stands in the unit cell
 * @returns     currency and what the price is for, or undefined where the text holds digits or is a unit of something else
 */
export function readMoneyUnit(text: string): MoneyUnit | undefined {
  if (text.length > 60) return undefined; // no unit is that long
  const clean = text.normalize("NFKC").replace(/\s+/g, " ").trim();
  const cut = /\/|\bper\b/i.exec(clean);
  const currency = (cut === null ? clean : clean.slice(0, cut.index)).replace(/\beach$/i, "").trim();
  const per = cut === null ? "" : plainSpelling(clean.slice(cut.index + cut[0].length));
  if (/\d/.test(currency) || (currency !== "" && kindInWords(currency) !== undefined)) return undefined;
  return { currency, per };
}

/**
 * How many of a price's lengths make a metre: 1 for money per m, 1 / 0.3048 for money per ft.
 *
 * @param per  the length of a money unit, in any spelling; "" is read as metres
 * @returns    factor from money per that length to money per metre, or undefined where it is not m or ft
 */
export function pricesPerMetre(per: string): number | undefined {
  if (per === "") return 1;
  const symbol = readUnit(per, "length")?.symbol;
  if (symbol === "m") return 1;
  return symbol === "ft" ? 1 / METRES_PER_FOOT : undefined;
}
