import { commonUnits } from "../units/read-unit.js";
import type { UnitKind } from "../units/unit-table.js";
import { amount, found, isBlankOrZero, isError, looksLikeNumber, type Cell } from "./cells.js";
import { LARGEST_COV } from "./limits.js";
import { refusal, type Place } from "./place.js";
import type { UnitReading } from "./read-unit-cell.js";

const ROUNDING = 1e-12;

/** What a number must satisfy: the parts of an input or of a list column that speak of its value. */
export interface NumberRule {
  readonly kind: UnitKind | "money" | "moneyPerLength";
  /** unit of the range */
  readonly unit: string;
  readonly minimum: number;
  readonly maximum: number;
  readonly zero: "accepted" | "none" | "refused";
  readonly whole?: boolean;
  readonly usual?: string;
  /** the default in words, for the sentence about a blank cell; undefined where there is none */
  readonly fallbackWords?: string;
}

/**
 * Reads the number of a value cell.
 *
 * @param rule   what it must satisfy
 * @param cell   the value cell, plain
 * @param unit   the unit beside it
 * @param place  where it stands
 * @param range  the unit of the rule's range
 * @returns      the value in the inner unit
 * @throws {InputError} text, a number stored as text, an error, blank or zero where zero has no meaning, out of range
 */
export function readNumber(rule: NumberRule, cell: Cell, unit: UnitReading, place: Place, range: UnitReading): number {
  if (typeof cell === "string" && cell.trim() !== "") return readText(rule, cell, unit, place);
  if (typeof cell === "boolean") throw refusal(place, `is ${found(cell)}; ${needed(rule, unit)} is needed`);
  if (isBlankOrZero(cell)) return readBlank(rule, place);
  const value = cell as number;
  const written = `is ${amount(value)}${unit.symbol === "" ? "" : ` ${unit.symbol}`}`;
  if (unit.symbol === "%" && Math.abs(value) < 1 && rule.maximum === LARGEST_COV) {
    throw refusal(place, `${written}; if its cell shows ${amount(100 * value)} %, leave the unit cell blank, because the sheet stores ${amount(value)}`);
  }
  const inner = (value * unit.multiply) / unit.divide;
  const least = (rule.minimum * range.multiply) / range.divide;
  const most = (rule.maximum * range.multiply) / range.divide;
  if (isMoney(rule) && inner <= 0) throw refusal(place, `${written}; a price above zero is needed, or the word none if it costs nothing`);
  // an end of the range stays one in any unit: 1 m as a formula makes it in feet is an ulp less
  const near = Math.abs(inner - least) <= ROUNDING * Math.abs(least) ? least : Math.abs(inner - most) <= ROUNDING * Math.abs(most) ? most : inner;
  if (near < least || near > most) throw refusal(place, `${written}; it must be ${rangeInWords(rule, range.symbol)}${hint(rule, value, unit, least, most)}`);
  if (rule.whole === true && !Number.isInteger(value)) throw refusal(place, `${written}; a whole number ${rangeInWords(rule, "")} is needed`);
  return near;
}

/**
 * A range in words.
 *
 * @param rule    its ends and what is usual
 * @param symbol  the unit of the ends
 * @returns       such as "from 0.1 m to 4 m"
 */
function rangeInWords(rule: Pick<NumberRule, "minimum" | "maximum" | "usual">, symbol: string): string {
  const unit = symbol === "" ? "" : ` ${symbol}`;
  return `from ${amount(rule.minimum)}${unit} to ${amount(rule.maximum)}${unit}${rule.usual === undefined ? "" : ` (common practice ${rule.usual})`}`;
}

function readBlank(rule: NumberRule, place: Place): number {
  if (rule.zero === "accepted") return 0;
  const nothing = isMoney(rule) ? "the word none if it costs nothing" : "the word none for a deliberate zero";
  const write = rule.zero === "none" ? `write a number, or ${nothing}` : "write a number";
  throw refusal(place, `is blank or zero; ${write}${rule.fallbackWords === undefined ? "" : `, or take the row out for the default (${rule.fallbackWords})`}`);
}

function readText(rule: NumberRule, cell: string, unit: UnitReading, place: Place): number {
  const text = cell.trim();
  if (isError(text)) throw refusal(place, `is the error ${text}; ${needed(rule, unit)} is needed`);
  if (/^none$/i.test(text)) {
    if (rule.zero !== "refused") return 0;
    throw refusal(place, `is the word none, but it cannot be zero; ${needed(rule, unit)} is needed`);
  }
  if (looksLikeNumber(text)) {
    throw refusal(place, `is ${found(text)}, a number stored as text; type it again in a cell of number format`);
  }
  if (/^[+-]?[\d.,]+\s*\p{L}/u.test(text.slice(0, 60))) {
    throw refusal(place, `is the text ${found(text)}; write the number alone, and its unit in the unit column`);
  }
  throw refusal(place, `is the text ${found(text)}; ${needed(rule, unit)} is needed`);
}

function needed(rule: NumberRule, unit: UnitReading): string {
  if (isMoney(rule)) return "a number";
  return `a ${rule.whole === true ? "whole number" : "number"}${unit.symbol === "" ? "" : ` in ${unit.symbol}`}`;
}

function isMoney({ kind }: NumberRule): boolean {
  return kind === "money" || kind === "moneyPerLength";
}

/** Where the number would fit in another usual unit, that unit was probably meant. */
function hint(rule: NumberRule, value: number, unit: UnitReading, least: number, most: number): string {
  const { kind } = rule;
  if (kind === "money" || kind === "moneyPerLength") return "";
  const meant = commonUnits(kind).find(({ symbol, multiply, divide }) => {
    const inner = (value * multiply) / divide;
    return symbol !== unit.symbol && symbol !== "ratio" && inner >= least && inner <= most;
  });
  return meant === undefined ? "" : `. If it is meant in ${meant.symbol}, write ${meant.symbol} in the unit column`;
}
