import { cheapestCount, type CountRow } from "../engine/index.js";
import { resultIn, resultUnit, type UnitSystem } from "../units/result-units.js";
import { aligned, grouped, joined, moneyStep } from "./plain-text.js";

/**
 * The table of counts as lines of text for a terminal, money rounded to what a bid can use.
 *
 * @param rows   the counts as the engine priced them
 * @param units  SI: carbon in kilograms; US: in pounds
 * @param currency  whose money, as the person writes it; "" where nobody wrote it
 * @returns      aligned lines: head, one a count (the cheapest and those that cannot be told from it are marked), a closing sentence
 */
export function costTableText(rows: readonly CountRow[], units: UnitSystem, currency = ""): string {
  const step = moneyStep(rows.map((row) => row.total));
  const money = (value: number): string => grouped(Math.round(value / step) * step);
  const cheapest = rows.length === 0 ? undefined : cheapestCount(rows);
  const head = ["Holes", "Investigation", "Foundation", "Failure", "Delay", "Total", "+/-", "Chance cheapest", `Carbon, ${resultUnit("mass", units)} CO2e`, ""];
  const body = rows.map((row) => [
    String(row.count), money(row.investigation), money(row.foundation), money(row.failure), money(row.delay), money(row.total),
    grouped(Number(row.standardError.toPrecision(2))), `${Math.round(row.chanceCheapest * 100)} %`, grouped(Number(resultIn(row.carbon, "mass", units).toPrecision(3))),
    row.count === cheapest ? "cheapest" : row.notDistinguishable ? "cannot be told from it" : "",
  ]);
  return [...aligned([head, ...body], [head.length - 1]), "", closing(rows, cheapest, (value) => `${currency} ${money(value)}`.trim())].join("\n");
}

function closing(rows: readonly CountRow[], cheapest: number | undefined, money: (value: number) => string): string {
  const best = rows.find((row) => row.count === cheapest);
  if (best === undefined) return "No counts were asked for.";
  const others = rows.filter((row) => row.notDistinguishable && row !== best).map((row) => row.count);
  const ties = others.length === 0 ? "" : `; ${joined(others)} cannot be told from it`;
  return `Cheapest: ${best.count} ${best.count === 1 ? "hole" : "holes"}, total ${money(best.total)}${ties}.`;
}
