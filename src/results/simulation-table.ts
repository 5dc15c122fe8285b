import { lengthPercentiles, type SimulationRow, type SimulationTable } from "../engine/index.js";
import { resultIn, resultUnit, type UnitSystem } from "../units/result-units.js";
import { joined } from "./plain-text.js";
import type { ResultTable } from "./result-table.js";

/** Where a simulated table comes from, for whoever wants to trace or repeat it. */
export interface SimulationStamp {
  readonly version: string;
  readonly seed: string;
  /** hash of the inputs, hexadecimal */
  readonly inputs: string;
  /** realisations by finite elements and by the second-order form alone */
  readonly elements: number;
  readonly form: number;
  readonly date: Date;
}

/**
 * What each number of holes costs by simulation, one row a method and count, with how sure that is.
 *
 * @param table  as the engine estimated it
 * @param units  SI: lengths in metres, carbon in kilograms; US: in feet and pounds
 * @param money  whose money, as the person writes it; "" where nobody wrote it
 * @returns      chances from 0 to 1, nothing rounded; a column of methods where there are several
 */
export function simulationTable(table: SimulationTable, units: UnitSystem, money = ""): ResultTable {
  const isOne = hasOneMethod(table);
  const length = resultUnit("length", units);
  return {
    title: "Cost against number of holes, by simulation",
    columns: [
      ...(isOne ? [] : [{ label: "Method", unit: "" }]),
      { label: "Count", unit: "holes" },
      { label: "Investigation", unit: money },
      { label: "Foundation", unit: money },
      { label: "Failure", unit: money },
      { label: "Delay", unit: money },
      { label: "Total", unit: money },
      { label: "Standard error", unit: money },
      { label: "Chance cheapest", unit: "0 to 1" },
      { label: "Expected regret", unit: money },
      { label: "Against the cheapest", unit: "" },
      { label: "Chance of damage", unit: "0 to 1" },
      { label: "Surprises", unit: "piles" },
      { label: "Over-design", unit: length },
      { label: "Total length", unit: length },
      { label: "Carbon", unit: `${resultUnit("mass", units)} CO2e` },
      { label: "Variance cut", unit: "times" },
    ],
    rows: table.rows.map((row, k) => [
      ...(isOne ? [] : [row.name]),
      row.count, row.investigation, row.foundation, row.failure, row.delay, row.total, row.standardError, row.chanceCheapest, row.regret,
      simulationVerdict(table, k), row.failureChance, row.surprises, resultIn(row.overDesign, "length", units), resultIn(row.totalMetres, "length", units),
      resultIn(row.carbon, "mass", units), row.varianceCut ?? "",
    ]),
    notes: [
      "Every figure is a mean over realised grounds; the standard error says how far chance may have moved the total. Differences between counts are surer than the totals, because all counts share the grounds.",
      "Expected regret: what choosing this count is expected to cost more than the cheapest, given the errors. Surprises: piles that need to be longer than built by more than the tolerance. Over-design: metres of all piles beyond what the ground needed.",
      "Variance cut: so many times more realisations by finite elements alone would have been needed for the same error.",
      ...(table.elements < 2 ? ["This table rests on the second-order form alone: no realisation by finite elements is finished yet."] : []),
      ...unseenDamage(table.rows, isOne),
      ...unallowable(table.rows, isOne),
    ],
  };
}

/**
 * How long the piles may turn out by simulation: one row a percentile of the mean pile length, one column a method and count.
 *
 * @param table  as the engine estimated it
 * @param units  SI: metres; US: feet
 */
export function simulationLengthTable(table: SimulationTable, units: UnitSystem): ResultTable {
  const isOne = hasOneMethod(table);
  const unit = resultUnit("length", units);
  return {
    title: "Mean pile length that the design may ask for, by simulation",
    columns: [{ label: "Percentile", unit: "%" }, ...table.rows.map((row) => ({ label: rowName(row, isOne), unit }))],
    rows: lengthPercentiles.map((percentile, k) => [percentile, ...table.rows.map((row) => resultIn(row.meanLengths[k], "length", units))]),
    notes: [],
  };
}

/** Where the table comes from, one row an item. */
export function stampTable(stamp: SimulationStamp): ResultTable {
  return {
    title: "Stamp",
    columns: [{ label: "Item", unit: "" }, { label: "Value", unit: "" }],
    rows: [
      ["Version", stamp.version],
      ["Seed", stamp.seed],
      ["Realisations by finite elements", stamp.elements],
      ["Realisations by the second-order form alone", stamp.form],
      ["Hash of the inputs", stamp.inputs],
      ["Date", `${stamp.date.toISOString().slice(0, 16).replace("T", " ")} UTC`],
    ],
    notes: ["The same version, seed, inputs and realisations give the same table on any machine, to the last digit."],
  };
}

/**
 * How a row compares, in words.
 *
 * @param index  of the row
 */
export function simulationVerdict(table: SimulationTable, index: number): string {
  const row = table.rows[index];
  const own = table.rows.filter(({ variant }) => variant === row.variant);
  const best = own.reduce((least, other) => (other.total < least.total ? other : least), own[0]);
  const of = hasOneMethod(table) ? "" : " of its method";
  if (index === table.cheapest) return "cheapest";
  if (row === best) return `cheapest${of}`;
  return row.notDistinguishable ? `cannot be told from the cheapest${of}` : "dearer";
}

/** Below so many realisations of either kind an interval of two standard errors holds the true cost in 7 to 9 cases of ten instead of 19 of twenty. */
const FEW = { elements: 24, form: 400 };

/**
 * What must be said of a table that rests on few realisations.
 *
 * @returns one sentence, or none
 */
export function fewGrounds({ elements, form }: Pick<SimulationTable, "elements" | "form">): string[] {
  return elements < FEW.elements || form < FEW.form ? ["This rests on few grounds: the errors of so few are themselves not well known, and usually stated too small."] : [];
}

/** "4 holes", or with the method where there are several. */
export function rowName(row: SimulationRow, isOne: boolean): string {
  const holes = `${row.count} ${row.count === 1 ? "hole" : "holes"}`;
  return isOne ? holes : `${row.name}, ${holes}`;
}

/** Whether all rows are of one method. */
export function hasOneMethod(table: SimulationTable): boolean {
  return table.rows.every(({ variant }) => variant === table.rows[0].variant);
}

function unseenDamage(rows: readonly SimulationRow[], isOne: boolean): string[] {
  const unseen = rows.filter((row) => row.failureChanceAtMost !== undefined);
  if (unseen.length === 0) return [];
  const most = Math.max(...unseen.map((row) => row.failureChanceAtMost ?? 0));
  return [`No damage was seen with ${joined(unseen.map((row) => rowName(row, isOne)))}: with 95 % confidence its chance is below ${Number((100 * most).toPrecision(2))} %, and a failure cost of 0 there means no more than that.`];
}

function unallowable(rows: readonly SimulationRow[], isOne: boolean): string[] {
  const found = rows.filter((row) => row.tooShortChance > 0.01);
  if (found.length === 0) return [];
  const worst = found.reduce((most, row) => (row.tooShortChance > most.tooShortChance ? row : most));
  return [`The longest length is built though its predicted settlement is more than allowable in up to ${Math.round(100 * worst.tooShortChance)} % of outcomes (${rowName(worst, isOne)}); allow longer piles for a fair comparison.`];
}
