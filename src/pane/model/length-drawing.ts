import { lengthPercentiles, type SimulationRow } from "../../engine/index.js";
import { resultIn, resultUnit, type UnitSystem } from "../../units/result-units.js";
import { holesInWords, type NumberWriter } from "./numbers.js";

/** The mean pile length of one count as it may turn out, in the unit of results: in nine outcomes of ten, in half of them, and its middle. */
export interface LengthBox {
  readonly count: number;
  readonly least: number;
  readonly low: number;
  readonly middle: number;
  readonly high: number;
  readonly most: number;
}

/** Percentiles of a box; the simulation's table holds all of them. */
const BOX = [5, 25, 50, 75, 95] as const;

/**
 * What the picture of pile lengths shows.
 *
 * @param rows   rows of one way, counts rising
 * @param units  SI: metres; US: feet
 */
export function lengthBoxes(rows: readonly SimulationRow[], units: UnitSystem): readonly LengthBox[] {
  return rows.map((row) => {
    const [least, low, middle, high, most] = BOX.map((percentile) => resultIn(row.meanLengths[lengthPercentiles.indexOf(percentile)]!, "length", units)) as [number, number, number, number, number];
    return { count: row.count, least, low, middle, high, most };
  });
}

/**
 * What a count means for the piles: how long they may turn out, how many will surprise, and how much is built for nothing.
 *
 * @param row     of the count
 * @param piles   number of piles
 * @param units   SI: metres; US: feet
 * @param writer  writes the numbers
 */
export function lengthsInWords(row: SimulationRow, piles: number, units: UnitSystem, writer: NumberWriter): string {
  const unit = `\u00a0${resultUnit("length", units)}`;
  const [box] = lengthBoxes([row], units) as [LengthBox];
  const length = (value: number): string => writer.plain(value, 1);
  const with_ = row.count === 0 ? "Without holes" : `With ${holesInWords(row.count)}`;
  const range =
    length(box.least) === length(box.most)
      ? `${with_} the piles are ${length(box.middle)}${unit} long on average, whatever the ground is.`
      : `${with_} the mean pile length comes to between ${length(box.least)} and ${length(box.most)}${unit} in nine outcomes of ten, and to less than ${length(box.middle)}${unit} in half of them.`;
  const surprises = `Surprises: ${writer.plain(row.surprises, 1)} of the ${piles} ${piles === 1 ? "pile is" : "piles are"} expected to need more length than was built, by more than the tolerance.`;
  const spare = `Over-design: ${writer.plain(resultIn(row.overDesign, "length", units), 0)} of ${writer.plain(resultIn(row.totalMetres, "length", units), 0)}${unit} of pile are expected to stand beyond what the ground needed.`;
  return `${range} ${surprises} ${spare}`;
}
