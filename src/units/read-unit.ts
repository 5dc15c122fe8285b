import { UNITS, type Unit, type UnitKind } from "./unit-table.js";

/** The inner unit of a kind, of which a value without a unit is made when the caller states no other. */
const PLAIN_NUMBER: Unit = { kind: "number", symbol: "", multiply: 1, divide: 1, spellings: [], common: true };

/** Words for what a kind measures, for sentences such as "kN is a force". */
const KIND_WORDS: Readonly<Record<UnitKind, string>> = {
  length: "a length",
  pressure: "a stiffness or pressure",
  force: "a force",
  pressurePerLength: "a stiffness per depth",
  ratio: "a ratio",
  days: "a number of days",
  massPerVolume: "a mass per volume",
  number: "a plain number",
};

const BY_SPELLING = spellings();

/**
 * Reads a unit of one kind. Case, spaces, superscripts and "per" for "/" make no difference.
 *
 * @param text  what stands in the unit cell
 * @param kind  what is needed
 * @returns     the unit, or undefined where the text is not a unit of that kind
 */
export function readUnit(text: string, kind: UnitKind): Unit | undefined {
  const plain = plainSpelling(text);
  if (kind === "number") return unitsSpelled(plain).length === 0 ? PLAIN_NUMBER : undefined;
  return unitsSpelled(kind === "massPerVolume" ? plain.replace(/co2(?:eq|e)?/, "") : plain).find((unit) => unit.kind === kind);
}

/**
 * What a unit text measures, in words, whatever was wanted.
 *
 * @param text  what stands in the unit cell
 * @returns     words such as "a force", or undefined where the text is no unit that is known
 */
export function kindInWords(text: string): string | undefined {
  const found = unitsSpelled(plainSpelling(text))[0];
  return found === undefined ? undefined : KIND_WORDS[found.kind];
}

/**
 * Words for what a kind measures.
 *
 * @param kind  the kind
 * @returns     words such as "a force"
 */
export function kindWords(kind: UnitKind): string {
  return KIND_WORDS[kind];
}

/**
 * The units that a person is offered for a kind.
 *
 * @param kind  what is measured
 * @returns     units, the most usual first; empty for plain numbers
 */
export function commonUnits(kind: UnitKind): readonly Unit[] {
  return COMMON[kind];
}

const COMMON = Object.fromEntries(
  (Object.keys(KIND_WORDS) as UnitKind[]).map((kind) => [kind, UNITS.filter((unit) => unit.kind === kind && unit.common)]),
) as Record<UnitKind, Unit[]>;

/**
 * Whether a text names a ton of no stated size: short, long and metric tons differ by up to 12 %, so none is guessed.
 *
 * @param text  what stands in the unit cell
 * @returns     true for ton, tons, tonne, t and the like
 */
export function isTonOfNoStatedSize(text: string): boolean {
  return /^(?:t|tons?|tonnes?|te)$/.test(plainSpelling(text));
}

/**
 * A value in the inner unit of its kind: m, kPa, kN, kPa per m, ratio, days, kg per m3.
 *
 * @param value  in the unit
 * @param unit   the unit
 * @returns      in the inner unit; one rounding where the factor is a power of ten, else two
 */
export function toInner(value: number, unit: Unit): number {
  return (value * unit.multiply) / unit.divide;
}

/**
 * A value in a stated unit.
 *
 * @param value  in the inner unit of the kind: m, kPa, kN, kPa per m, ratio, days, kg per m3
 * @param unit   the unit
 * @returns      in the unit
 */
export function fromInner(value: number, unit: Unit): number {
  return (value * unit.divide) / unit.multiply;
}

/**
 * A unit text in its plainest spelling: lower case, no spaces, "/" for "per", plain digits for superscripts.
 *
 * @param text  as written
 * @returns     the spelling by which units are found
 */
export function plainSpelling(text: string): string {
  if (text.length > 60) return ""; // no unit is that long, and no time is spent on it
  return text.replace(/[\u2018\u2019\u2032]/g, "'").replace(/[\u201c\u201d\u2033]/g, '"').normalize("NFKC").toLowerCase() // NFKC would split a double prime
    .replace(/\bper\b/g, "/").replace(/[\s^()[\]]/g, "").replace(/\.$/, "");
}

function unitsSpelled(plain: string): readonly Unit[] {
  return BY_SPELLING.get(plain) ?? [];
}

function spellings(): ReadonlyMap<string, readonly Unit[]> {
  const map = new Map<string, Unit[]>();
  for (const unit of UNITS) {
    for (const spelling of new Set([plainSpelling(unit.symbol), ...unit.spellings])) {
      const known = map.get(spelling);
      if (known === undefined) map.set(spelling, [unit]);
      else known.push(unit);
    }
  }
  return map;
}
