import { pricesPerMetre, readMoneyUnit } from "../units/money-unit.js";
import { commonUnits, isTonOfNoStatedSize, kindInWords, kindWords, readUnit } from "../units/read-unit.js";
import type { UnitKind } from "../units/unit-table.js";
import { found, isBlankOrZero, isError, type Cell } from "./cells.js";
import type { InputKind } from "./entry.js";
import { inWords, refusal, type Place } from "./place.js";

/** A unit as it stands beside a value: inner value = value x multiply / divide. */
export interface UnitReading {
  readonly symbol: string;
  readonly multiply: number;
  readonly divide: number;
  /** for money: whose, as written; "" where none was written */
  readonly currency: string;
  /** true where the unit cell was blank and the catalogue's unit was taken */
  readonly assumed: boolean;
}

const NO_UNIT: UnitReading = { symbol: "", multiply: 1, divide: 1, currency: "", assumed: false };
const WORDS_OF_ONE_PRICE: Readonly<Record<string, readonly string[]>> = {
  hole: ["hole", "holes", "borehole", "sounding", "each", "no", "nr"],
  pile: ["pile", "piles", "each", "no", "nr"],
  reading: ["reading", "readings", "test", "sample", "each", "no", "nr"],
  day: ["day", "days", "d"],
  visit: ["visit", "sum", "item", "lumpsum", "each", "once"],
  report: ["report", "sum", "item", "lumpsum", "each", "once"],
  building: ["building", "sum", "item", "lumpsum"],
};

/**
 * Reads the unit cell of an input.
 *
 * @param kind    what the input measures
 * @param cell    the unit cell, plain
 * @param normal  the catalogue's unit, taken where the cell is blank
 * @param place   where the input stands
 * @param per     what one price is for, for money
 * @returns       the unit
 * @throws {InputError} the unit is of another kind or not known; the accepted ones are listed
 */
export function readUnitCell(kind: InputKind | "distortion" | "name", cell: Cell, normal: string, place: Place, per?: string): UnitReading {
  if (kind === "choice" || kind === "seed" || kind === "counts" || kind === "list" || kind === "distortion" || kind === "name") return NO_UNIT;
  if (isError(cell)) throw refusal(place, `has the error ${String(cell).trim()} in its unit cell`);
  const blank = isBlankOrZero(cell);
  if (typeof cell === "boolean" || (!blank && typeof cell === "number")) throw refusal(place, `has ${found(cell)} in its unit cell; ${accepted(kind)}`);
  const text = blank ? "" : String(cell).trim();
  if (kind === "money" || kind === "moneyPerLength") return readMoney(kind, text, place, per);
  if (kind === "number" && blank) return NO_UNIT;
  const unit = readUnit(blank ? normal : text, kind);
  if (unit === undefined) throw refusal(place, `has the unit ${found(text)}${whatItIs(kind, text)}`);
  return { symbol: unit.symbol === "ratio" ? "" : unit.symbol, multiply: unit.multiply, divide: unit.divide, currency: "", assumed: blank && unit.symbol !== "ratio" };
}

/**
 * The accepted units of a kind, in words.
 *
 * @param kind  what is measured
 * @returns     such as "the unit must be kN, MN, N, ..."
 */
function accepted(kind: UnitKind | "money" | "moneyPerLength"): string {
  if (kind === "money") return "the unit must be money, such as EUR";
  if (kind === "moneyPerLength") return "the unit must be money per m or per ft, such as EUR/m";
  if (kind === "number") return "it is a plain number without a unit";
  return `the unit must be ${inWords(commonUnits(kind).map(({ symbol }) => symbol))}`;
}

function whatItIs(kind: UnitKind, text: string): string {
  if (isTonOfNoStatedSize(text) && kind === "force") return "; say which ton: tonf US (2,000 lbf), tonf UK (2,240 lbf) or tf (1,000 kgf)";
  const words = kindInWords(text);
  if (kind === "number") return `, which is ${words ?? "not known"}; ${accepted(kind)}`;
  return words === undefined ? `, which is not known; ${accepted(kind)}` : `, which is ${words}; ${kindWords(kind)} is needed, so ${accepted(kind)}`;
}

function readMoney(kind: "money" | "moneyPerLength", text: string, place: Place, per: string | undefined): UnitReading {
  const unit = readMoneyUnit(text);
  if (unit === undefined) {
    const words = kindInWords(text);
    throw refusal(place, `has the unit ${found(text)}${words === undefined ? "" : `, which is ${words}`}; ${accepted(kind)}`);
  }
  const { currency } = unit;
  if (kind === "moneyPerLength") {
    const multiply = pricesPerMetre(unit.per);
    if (multiply === undefined) throw refusal(place, `has the unit ${found(text)}; ${accepted(kind)}`);
    return { symbol: `${currency === "" ? "per " : `${currency}/`}${multiply === 1 ? "m" : "ft"}`, multiply, divide: 1, currency, assumed: text !== "" && unit.per === "" };
  }
  if (unit.per !== "" && !(WORDS_OF_ONE_PRICE[per ?? ""] ?? []).includes(unit.per)) {
    throw refusal(place, `has the unit ${found(text)}; ${accepted(kind)}${per === "hole" || per === "pile" || per === "reading" || per === "day" ? ` or EUR/${per}` : ""}`);
  }
  return { symbol: text, multiply: 1, divide: 1, currency, assumed: false };
}
