import type { SimulationTable } from "../../engine/index.js";
import { tableStep } from "../model/conclusion.js";
import { shorten, type NumberWriter } from "../model/numbers.js";
import { rowsOfWay, waysOf } from "../model/ways.js";
import { textTable } from "../parts/text-table.js";

/**
 * The ways side by side, each with its own cheapest count.
 *
 * @param table   all rows
 * @param money   whose money; "" where nobody said
 * @param writer  writes the numbers
 */
export function waysTable(table: SimulationTable, money: string, writer: NumberWriter): HTMLElement {
  const step = tableStep(table.rows);
  const ways = waysOf(table);
  const rows = ways.map(({ variant, name }) => {
    const { rows: own, cheapest } = rowsOfWay(table, variant);
    const best = own.find(({ count }) => count === cheapest)!;
    const chance = own.reduce((sum, row) => sum + row.chanceCheapest, 0);
    return [shorten(name, 40), String(cheapest), writer.money(best.total, step), writer.money(2 * best.standardError, step), writer.percent(Math.min(1, chance))];
  });
  const strong = ways.findIndex(({ variant }) => variant === table.rows[table.cheapest]!.variant);
  const head = ["Way", "Cheapest count", "Total", "Give or take", "Chance cheapest"];
  return textTable({ head, rows }, `Each way at its own cheapest count${money === "" ? "" : `, ${money}`}`, { strong: [strong], scrolls: true });
}
