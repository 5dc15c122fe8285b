import { lengthPercentiles, type SimulationTable } from "../engine/index.js";
import { resultIn, resultUnit, type UnitSystem } from "../units/result-units.js";
import { aligned, grouped, joined, moneyStep } from "./plain-text.js";
import { fewGrounds, hasOneMethod, rowName, simulationVerdict, type SimulationStamp } from "./simulation-table.js";

/**
 * A simulated table as lines of text for a terminal, money rounded to what a bid can use.
 *
 * @param units     SI: lengths in metres; US: in feet
 * @param currency  whose money, as the person writes it; "" where nobody wrote it
 * @returns         aligned lines: head, one a method and count, a closing sentence, where it comes from
 */
export function simulationText(table: SimulationTable, stamp: SimulationStamp, units: UnitSystem, currency = ""): string {
  const isOne = hasOneMethod(table);
  const step = moneyStep(table.rows.map((row) => row.total));
  const money = (value: number): string => grouped(Math.round(value / step) * step);
  const small = (value: number): string => grouped(Number(value.toPrecision(2)));
  const length = (value: number): string => resultIn(value, "length", units).toFixed(1);
  const unit = resultUnit("length", units);
  const [low, middle, high] = [5, 50, 95].map((percentile) => lengthPercentiles.indexOf(percentile));
  const head = [...(isOne ? [] : ["Method"]), "Holes", "Investigation", "Foundation", "Failure", "Delay", "Total", "+/-", "Cheapest", "Surprises", `Over-design, ${unit}`, `Mean length 5/50/95 %, ${unit}`, ""];
  const body = table.rows.map((row, k) => [
    ...(isOne ? [] : [row.name]),
    String(row.count), money(row.investigation), money(row.foundation), money(row.failure), money(row.delay), money(row.total), small(row.standardError),
    `${Math.round(row.chanceCheapest * 100)} %`, row.surprises.toFixed(2), length(row.overDesign),
    [low, middle, high].map((at) => length(row.meanLengths[at])).join("/"), simulationVerdict(table, k).replace("dearer", ""),
  ]);
  const words = isOne ? [head.length - 1] : [0, head.length - 1];
  const best = table.rows[table.cheapest];
  const ties = table.rows.filter((row) => row.variant === best.variant && row.notDistinguishable && row !== best).map((row) => row.count);
  const closing = `Cheapest: ${rowName(best, isOne)}, total ${`${currency} ${money(best.total)}`.trim()}${ties.length === 0 ? "" : `; ${joined(ties)} cannot be told from it`}. Expected regret of choosing it: ${small(table.expectedRegret)}.`;
  return [...aligned([head, ...body], words), "", closing, ...fewGrounds(table), stampLine(stamp)].join("\n");
}

function stampLine({ version, seed, inputs, elements, form }: SimulationStamp): string {
  return `Realisations: ${grouped(elements)} by finite elements, ${grouped(form)} by the second-order form alone. Version ${version}, seed ${seed}, inputs ${inputs}.`;
}
