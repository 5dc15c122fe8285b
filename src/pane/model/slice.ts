import { geometricStep } from "../../engine/index.js";
import type { Section } from "../../jobs/section.js";
import { holesInWords, joinWords, type NumberWriter } from "./numbers.js";

/** Classes of stiffness, from soft to stiff: each darker than the one before, so that no hue need be told from another. */
export const SLICE_COLOURS: readonly string[] = ["#fbf3d9", "#f0dca8", "#dfbd76", "#c4934d", "#9c6a36", "#6d4526", "#3d2617"];

/** A hole this far before or behind the section is drawn dashed, m. */
const BESIDE = 1;

/** Whether a hole stands in the section or is only seen from it. */
export const isInSection = (off: number): boolean => off <= BESIDE;

/**
 * Bounds between the classes of a section, rising, in MPa: even in the logarithm, rounded to two figures.
 *
 * @param modulus  kPa
 * @returns        one fewer than there are colours; fewer where the ground hardly varies
 */
export function sliceBounds(modulus: Float64Array): number[] {
  const sorted = Float64Array.from(modulus).sort();
  const at = (share: number): number => sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))]! / 1000;
  const [low, high] = [at(0.05), at(0.95)];
  const inner = SLICE_COLOURS.length - 2;
  const bounds = Array.from({ length: inner + 1 }, (_, k) => Number((geometricStep(low, high, k / inner)).toPrecision(2)));
  return bounds.filter((bound, k) => k === 0 || bound > bounds[k - 1]!);
}

/**
 * The words of the legend, one a class.
 *
 * @param bounds  as from sliceBounds, MPa
 * @param writer  writes the numbers
 */
export function sliceLegend(bounds: readonly number[], writer: NumberWriter): string[] {
  const plain = (value: number): string => writer.plain(value, value < 1 ? 3 : value < 10 ? 1 : 0);
  return [`under ${plain(bounds[0]!)}`, ...bounds.slice(1).map((bound, k) => `${plain(bounds[k]!)} to ${plain(bound)}`), `over ${plain(bounds.at(-1)!)}`];
}

/**
 * Says what the section shows, for a person who does not see it.
 *
 * @param section  what is drawn
 * @param number   of the ground, from 1
 * @param writer   writes the numbers
 */
export function describeSection(section: Section, number: number, writer: NumberWriter): string {
  const sorted = Float64Array.from(section.modulus).sort();
  const at = (share: number): string => writer.plain(sorted[Math.floor(share * (sorted.length - 1))]! / 1000, 1);
  const lengths = [...new Set(section.piles.map(({ length }) => `${writer.plain(length, 1)} m`))];
  return `Ground ${number}, vertical section along x at y ${writer.plain(section.y, 2)} m, ${writer.plain(section.depth, 0)} m deep: Young\u2019s modulus ${at(0.05)} to ${at(0.95)} MPa in nine tenths of it, ${at(0.5)} MPa in the middle. ${section.piles.length} piles of ${joinWords(lengths)}, ${holesInWords(section.holes.length)}.`;
}
