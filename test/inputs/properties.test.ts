import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { CATALOGUE, checkSite, InputError, parseSite, templateRows } from "../../src/inputs/index.js";
import { UNITS, type UnitKind } from "../../src/units/unit-table.js";
import { add, SMALL, type Row } from "./block.js";

/** All numbers of a value, with their places, so that two problems can be compared figure by figure. */
function figures(value: unknown, path = ""): [string, number | string][] {
  if (typeof value === "number" || typeof value === "string") return [[path, value]];
  if (typeof value !== "object" || value === null) return [[path, String(value)]];
  return Object.entries(value).flatMap(([key, part]) => figures(part, `${path}.${key}`));
}

function expectSame(one: unknown, other: unknown, tolerance: number): void {
  const [a, b] = [figures(one), figures(other)];
  expect(a.map(([path]) => path)).toEqual(b.map(([path]) => path));
  a.forEach(([path, value], index) => {
    const twin = b[index]![1];
    if (typeof value === "number" && typeof twin === "number") expect([path, Math.abs(value - twin) <= tolerance * Math.abs(value)]).toEqual([path, true]);
    else expect([path, value]).toEqual([path, twin]);
  });
}

// Source: exact definitions, written out apart from the code under test. [unit we write in, how many of it make one of the row's own unit]
const FT = 1 / 0.3048;
const LBF = 1 / 4.4482216152605;
const PSF = 1000 * LBF * 0.3048 ** 2; // per kPa
const CUSTOMARY: Readonly<Record<string, readonly [string, number]>> = {
  "m": ["ft", FT], "mm": ["in", 1 / 25.4], "MPa": ["psf", 1000 * PSF], "GPa": ["ksf", 1000 * PSF], "kN": ["kip", LBF], "EUR/m": ["EUR/ft", 0.3048],
  "MPa/m": ["psf/ft", 1000 * PSF * 0.3048], "kg/m3": ["lb/ft3", 0.3048 ** 3 / 0.45359237], "": ["", 1],
};

const BIG: readonly Row[] = [
  ...add(SMALL, ["Increase with depth", 0.4, "MPa/m"], ["Pile modulus", 30, "GPa"], ["Length step", 0.5, "m"], ["Carbon of concrete", 280, "kg/m3"], ["Surprise tolerance", 1.2, "m"], ["Reading spacing", 0.8, "m"]),
  ["Hole list", "", "", ""], ["Hole", "x, m", "y, m", ""], ["A", 1, 2, ""], ["B", 4.4, 6.1, ""],
];

describe("units never change a problem", () => {
  it("feet, pounds and kips give the same site as metres and newtons, to 1e-12", () => {
    const customary = BIG.map((row) => {
      if (row[0] === "Hole") return ["Hole", "x, ft", "y, ft", ""];
      if (row[0] === "A" || row[0] === "B") return [row[0], Number(row[1]) * FT, Number(row[2]) * FT, ""];
      const known = typeof row[2] === "string" ? CUSTOMARY[row[2]] : undefined;
      return known === undefined || typeof row[1] !== "number" ? row : [row[0]!, row[1] * known[1], known[0], ""];
    });
    expectSame(parseSite(customary).problem, parseSite(BIG).problem, 1e-12);
  });

  it("any unit of the kind, for any input with a unit", () => {
    const kinds = new Map<string, UnitKind>(CATALOGUE.map(({ label, kind }) => [label, kind as UnitKind]));
    const rowsWithUnit = BIG.map((row, index) => [row, index] as const).filter(([row]) => kinds.has(String(row[0])) && UNITS.some(({ kind }) => kind === kinds.get(String(row[0]))) && row[1] !== "");
    fc.assert(fc.property(fc.constantFrom(...rowsWithUnit), fc.nat(), ([row, index], pick) => {
      const kind = kinds.get(String(row[0]))!;
      const units = UNITS.filter((unit) => unit.kind === kind);
      const own = units.find(({ symbol }) => symbol === (row[2] === "" ? "ratio" : row[2]))!;
      const other = units[pick % units.length]!;
      const value = ((Number(row[1]) * own.multiply) / own.divide) * (other.divide / other.multiply);
      const rows = BIG.map((old, at) => (at === index ? [row[0]!, value, other.symbol, ""] : old));
      expectSame(parseSite(rows).problem, parseSite(BIG).problem, 1e-12);
    }), { numRuns: 300, seed: 20 });
  });
});

/** The block cut into pieces that may stand in any order: single rows, and lists with their rows. */
function pieces(rows: readonly Row[]): Row[][] {
  const list = rows.findIndex(([label]) => label === "Hole list");
  return [...rows.slice(0, list).map((row) => [row]), [...rows.slice(list), ["", "", "", ""]]];
}

const spaced = (text: string, stretch: readonly boolean[]): string =>
  [...text].map((letter, k) => (letter === " " ? (stretch[k % stretch.length] ? "  \u00a0" : " ") : stretch[(k * 7) % stretch.length] ? letter.toUpperCase() : letter.toLowerCase())).join("");

describe("writing never changes a problem", () => {
  it("order of rows, case and spaces", () => {
    const whole = parseSite(BIG).problem;
    fc.assert(fc.property(fc.shuffledSubarray(pieces(BIG), { minLength: pieces(BIG).length }), fc.array(fc.boolean(), { minLength: 5, maxLength: 40 }), (order, stretch) => {
      const rows = order.flat().map((row) => row.map((cell, column) => (typeof cell === "string" && column < 3 ? spaced(` ${cell} `, stretch) : cell)));
      // names of holes may be spelt in any way; the currency is free text and is compared without regard to case
      expect(parseSite(rows).problem).toEqual(whole);
    }), { numRuns: 100, seed: 21 });
  });

  it("blank rows between the pieces", () => {
    const whole = parseSite(BIG).problem;
    fc.assert(fc.property(fc.array(fc.nat(3), { minLength: 5, maxLength: 60 }), fc.constantFrom<string | number | null>("", null), (gaps, blank) => {
      const rows = pieces(BIG).flatMap((piece, k) => [...piece, ...Array.from({ length: gaps[k % gaps.length]! }, () => [blank, blank, blank, blank])]);
      expect(parseSite(rows as Row[]).problem).toEqual(whole);
    }), { numRuns: 100, seed: 22 });
  });
});

const LABELS = CATALOGUE.map(({ label }) => label);
const oddText = fc.oneof(
  fc.string({ unit: "binary", maxLength: 40 }),
  fc.constantFrom("__proto__", "constructor", "toString", "NaN", "Infinity", "-0", "none", "default", "#N/A", "#REF!", "=1+1", "<img src=x onerror=alert(1)>", "\u0000", "\ud800", "1/0", "1/500", "8,5", "9".repeat(400), " ".repeat(3000), "((((((((", "a".repeat(30000)),
);
const oddCell: fc.Arbitrary<unknown> = fc.oneof(
  { weight: 4, arbitrary: oddText },
  { weight: 3, arbitrary: fc.oneof(fc.double(), fc.integer(), fc.constantFrom(0, -0, 1e308, -1e308, 5e-324, NaN, Infinity, 46000)) },
  { weight: 2, arbitrary: fc.constantFrom(...LABELS, "Ground", "Piles", "m", "MPa", "kN", "EUR/m") },
  { weight: 1, arbitrary: fc.constantFrom(null, undefined, true, false, {}, [], { type: "Error", basicValue: "#N/A" }, 10n, Symbol("s"), () => 1) },
);

/** No NaN, no infinity and nothing undefined but an absent hole list in a problem. */
function sound(problem: unknown): boolean {
  return figures(problem).every(([path, value]) => (typeof value === "number" ? Number.isFinite(value) : path === ".investigation.holes" || value !== "undefined"));
}

function answered(rows: unknown, pairs?: readonly unknown[]): boolean {
  const check = checkSite(rows as Row[], pairs);
  try {
    const site = parseSite(rows as Row[], pairs);
    return sound(site.problem) && check.every(({ ok }) => ok);
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    const sentence = /^[^\n]{10,900}[.?]$/.test(error.message);
    return sentence && check.some(({ verdict }) => verdict === `refused: ${error.message}`) && check.every(({ value }) => typeof value === "string" || Number.isFinite(value));
  }
}

describe("hostile cells", () => {
  it("anything at all is answered: a sound problem or a sentence, the same in the check rows", () => {
    fc.assert(fc.property(fc.array(fc.array(oddCell, { maxLength: 6 }), { maxLength: 30 }), (rows) => answered(rows)), { numRuns: 1000, seed: 23 });
  });

  it("one or two odd cells in a sound block", () => {
    const rows = templateRows();
    const place = fc.tuple(fc.nat(rows.length - 1), fc.nat(3), oddCell);
    fc.assert(fc.property(fc.array(place, { minLength: 1, maxLength: 2 }), (changes) => {
      const changed: unknown[][] = rows.map((row) => [...row]);
      for (const [row, column, cell] of changes) changed[row]![column] = cell;
      return answered(changed);
    }), { numRuns: 1000, seed: 24 });
  });

  it("odd pairs behind a sound block", () => {
    fc.assert(fc.property(fc.array(fc.oneof({ weight: 1, arbitrary: oddCell }, { weight: 1, arbitrary: fc.constantFrom<unknown>(...LABELS, 1, 0.5, 10) }), { maxLength: 6 }), (pairs) => answered(SMALL, pairs)), { numRuns: 1000, seed: 25 });
  });

  it("any number in any numeric input is a sound problem or a sentence", () => {
    const numeric = CATALOGUE.filter(({ minimum, kind }) => minimum !== undefined && kind !== "counts").map(({ label }) => label);
    fc.assert(fc.property(fc.constantFrom(...numeric), fc.oneof(fc.double(), fc.double({ min: 0, max: 100 })), (label, value) => answered(SMALL, [label, value])), { numRuns: 1000, seed: 26 });
  });
});
