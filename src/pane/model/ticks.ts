import { decade, powerOfTen } from "../../results/powers-of-ten.js";

/**
 * A step of 1, 2 or 5 times a power of ten, so that an axis carries round numbers.
 *
 * @param span  length of the axis in its own unit, finite, > 0
 * @param most  largest number of intervals that fits, >= 1
 * @returns     the smallest such step that needs no more intervals than `most`
 */
export function niceStep(span: number, most: number): number {
  if (!(span > 0) || !(most >= 1) || !Number.isFinite(span)) return 1;
  const exact = span / most;
  const power = powerOfTen(decade(exact));
  for (const factor of [1, 2, 5, 10]) {
    const step = factor * power;
    if (step >= exact * (1 - 1e-9)) return step;
  }
  return 10 * power;
}

/**
 * Round tick values inside an interval.
 *
 * @param low   lower end
 * @param high  upper end, above `low`
 * @param most  largest number of intervals
 * @returns     multiples of a nice step within [low, high], rising; free of binary crumbs such as 0.30000000000000004
 */
export function niceTicks(low: number, high: number, most: number): number[] {
  const step = niceStep(high - low, most);
  const decimals = Math.max(0, -decade(step));
  const ticks: number[] = [];
  const last = Math.floor(high / step + 1e-9);
  for (let k = Math.ceil(low / step - 1e-9); k <= last; k++) ticks.push(Number((k * step).toFixed(decimals)));
  return ticks;
}

/**
 * The round length of a scale bar: the longest of 1, 2, 5 times a power of ten within a third of the plan.
 *
 * @param width  width of the plan, m, > 0
 * @returns      length of the bar, m
 */
export function scaleBarLength(width: number): number {
  const third = width / 3;
  const power = powerOfTen(decade(third));
  for (const factor of [5, 2, 1]) if (factor * power <= third) return factor * power;
  return power;
}

/**
 * Whole-number ticks for an axis of counts, thinned so that their labels do not touch.
 *
 * @param counts  the counts on the axis, rising
 * @param most    largest number of labels
 * @returns       the counts to label: all of them, or the multiples of a nice step among them
 */
export function countTicks(counts: readonly number[], most: number): number[] {
  if (counts.length <= most) return [...counts];
  const low = counts[0]!;
  const high = counts[counts.length - 1]!;
  const step = Math.max(1, niceStep(high - low, most - 1));
  return counts.filter((count) => count % step === 0);
}
