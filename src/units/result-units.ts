import { KILOGRAMS_PER_POUND, METRES_PER_FOOT, METRES_PER_INCH } from "./factors.js";

/** Units in which results are given: SI, or US customary. */
export type UnitSystem = "SI" | "US";

/** What results measure: a length, a settlement, a mass. Money and chances have no unit to convert. */
export type ResultKind = "length" | "settlement" | "mass";

/** [symbol, size in m or kg] of each kind, by system. */
const RESULTS: Readonly<Record<ResultKind, Readonly<Record<UnitSystem, readonly [string, number]>>>> = {
  length: { SI: ["m", 1], US: ["ft", METRES_PER_FOOT] },
  settlement: { SI: ["mm", 0.001], US: ["in", METRES_PER_INCH] },
  mass: { SI: ["kg", 1], US: ["lb", KILOGRAMS_PER_POUND] },
};

/**
 * A result on its way out, in the units that the person reads.
 *
 * @param value   m for lengths and settlements, kg for masses
 * @param kind    what it measures
 * @param system  SI or US customary
 * @returns       m or ft, mm or in, kg or lb
 */
export function resultIn(value: number, kind: ResultKind, system: UnitSystem): number {
  return value / RESULTS[kind][system][1];
}

/**
 * The unit in which `resultIn` gives a result.
 *
 * @param kind    what it measures
 * @param system  SI or US customary
 * @returns       symbol such as "ft"
 */
export function resultUnit(kind: ResultKind, system: UnitSystem): string {
  return RESULTS[kind][system][0];
}
