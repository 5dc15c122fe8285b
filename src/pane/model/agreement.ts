import { hypotenuse, type CountRow, type SimulationRow } from "../../engine/index.js";
import { tableStep } from "./conclusion.js";
import { holesInWords, sentenceCase, type NumberWriter } from "./numbers.js";

/**
 * How well the quick cell figures agree with the simulated ones of the same inputs.
 *
 * @param quick      as the cells have them
 * @param simulated  rows of one way
 * @param cheapest   cheapest count of the simulated rows
 * @param writer     writes the numbers
 * @returns          sentences; "" where no count is in both
 */
export function agreementInWords(quick: readonly CountRow[], simulated: readonly SimulationRow[], cheapest: number, writer: NumberWriter): string {
  const pairs = simulated.flatMap((row) => {
    const same = quick.find(({ count }) => count === row.count);
    return same === undefined ? [] : [{ row, same }];
  });
  if (pairs.length === 0) return "";
  const gap = ({ row, same }: (typeof pairs)[number]): number => Math.abs(same.total - row.total) / Math.max(row.total, Number.MIN_VALUE);
  const widest = pairs.reduce((most, pair) => (gap(pair) > gap(most) ? pair : most));
  const within = pairs.filter(({ row, same }) => Math.abs(same.total - row.total) <= 2 * hypotenuse(row.standardError, same.standardError)).length;
  const quickBest = pairs.reduce((best, pair) => (pair.same.total < best.same.total ? pair : best));
  const regret = quickBest.row.total - Math.min(...pairs.map(({ row }) => row.total));
  const step = tableStep(simulated);
  const choice =
    quickBest.row.count === cheapest
      ? "Both name the same cheapest count."
      : `The quick figures name ${holesInWords(quickBest.row.count)} as the cheapest; by the simulation that costs ${writer.money(regret, step)} more than its own cheapest${quickBest.row.notDistinguishable ? ", which is within its error" : ""}.`;
  const spread = `The totals lie within two standard errors of each other at ${within} of ${pairs.length} counts; the widest gap is ${writer.percent(gap(widest))} at ${holesInWords(widest.row.count)}.`;
  return `${choice} ${sentenceCase(spread)}`;
}
