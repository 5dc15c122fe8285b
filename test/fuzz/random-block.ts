import fc from "fast-check";
import { CATALOGUE } from "../../src/inputs/index.js";

export type Row = readonly (string | number)[];

/** The range of an input, in its own unit. */
function rangeOf(label: string): { minimum: number; maximum: number } {
  const { minimum = 0, maximum = 0 } = CATALOGUE.find((entry) => entry.label === label) as { minimum?: number; maximum?: number };
  return { minimum, maximum };
}

/** A number of the whole range of an input: its ends, what is usual, and anything between, as often small as large. */
function within(label: string, usual: readonly number[], limits: { minimum?: number; maximum?: number } = {}): fc.Arbitrary<number> {
  const { minimum, maximum } = { ...rangeOf(label), ...limits };
  const low = Math.max(minimum, maximum * 1e-12);
  return fc.oneof(
    { weight: 1, arbitrary: fc.constantFrom(low, maximum) },
    { weight: 12, arbitrary: fc.constantFrom(...usual) },
    { weight: 2, arbitrary: fc.double({ min: Math.log(low), max: Math.log(maximum), noNaN: true }).map((x) => Math.min(maximum, Math.max(low, Math.exp(x)))) },
  );
}

const orNone = (label: string, usual: readonly number[]): fc.Arbitrary<number | string> => fc.oneof({ weight: 1, arbitrary: fc.constant("none") }, { weight: 9, arbitrary: within(label, usual) });
const choices = (label: string): fc.Arbitrary<string> => fc.constantFrom(...(CATALOGUE.find((entry) => entry.label === label) as { choices: readonly { text: string }[] }).choices.map(({ text }) => text));
const row = (label: string, value: fc.Arbitrary<number | string>, unit = ""): fc.Arbitrary<Row[]> => value.map((cell) => [[label, cell, unit, ""]]);
const sometimes = (rows: fc.Arbitrary<Row[]>): fc.Arbitrary<Row[]> => fc.oneof({ weight: 1, arbitrary: fc.constant<Row[]>([]) }, { weight: 2, arbitrary: rows });

const PLACE = fc.double({ min: -60, max: 60, noNaN: true });

const ground: fc.Arbitrary<Row[]> = fc.oneof(
  { weight: 3, arbitrary: joined(row("Mean stiffness", within("Mean stiffness", [5, 12, 60]), "MPa"), row("Stiffness COV", orNone("Stiffness COV", [0.2, 0.5, 1])), sometimes(row("Increase with depth", within("Increase with depth", [0, 0.5, 3]), "MPa/m"))) },
  {
    weight: 1,
    arbitrary: fc.array(fc.tuple(fc.double({ min: 0.5, max: 40, noNaN: true }), within("Mean stiffness", [5, 20, 100]), within("Increase with depth", [0, 1]), within("Stiffness COV", [0.3, 0.6])), { minLength: 1, maxLength: 6 }).map((layers): Row[] => {
      let top = 0;
      return [["Layer list", "", "", ""], ["Top, m", "Mean, MPa", "Increase, MPa/m", "COV"], ...layers.map(([thick, mean, increase, cov], k) => {
        if (k > 0) top += thick;
        return [top, mean, increase, cov];
      }), ["", "", "", ""]];
    }),
  },
);

const COUNTS_OF_PILES = [[1, 2], [2, 1], [2, 2], [3, 3], [4, 3], [1, 9], [10, 10]] as const;

/** @param mostPiles  work grows with its square, so that only a few blocks may have many */
function building(mostPiles: number): fc.Arbitrary<Row[]> {
  const pairs = COUNTS_OF_PILES.filter(([a, b]) => a * b <= mostPiles);
  const grid = joined(
    fc.constantFrom(...pairs).map(([x, y]): Row[] => [["Piles along x", x, "", ""], ["Piles along y", y, "", ""]]),
    row("Spacing along x", within("Spacing along x", [3, 6]), "m"), sometimes(row("Spacing along y", within("Spacing along y", [4, 7]), "m")),
    row("Interior load", within("Interior load", [500, 1800]), "kN"), sometimes(row("Edge load share", within("Edge load share", [0.5, 1]))), sometimes(row("Corner load share", within("Corner load share", [0.25, 1]))),
  );
  const list = fc.array(fc.tuple(PLACE, PLACE, within("Interior load", [300, 1500])), { minLength: 2, maxLength: Math.min(mostPiles, 9) }).map((piles): Row[] => [["Pile list", "", "", ""], ["x, m", "y, m", "Load, kN", ""], ...piles.map(([x, y, load]) => [x, y, load, ""]), ["", "", "", ""]]);
  const damage = fc.array(fc.tuple(fc.double({ min: 0.1, max: 1.5, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true })), { minLength: 2, maxLength: 6 }).map((steps): Row[] => {
    const shares = steps.map(([, share]) => share).sort((a, b) => a - b);
    let distortion = 1e-5;
    return [["Damage list", "", "", ""], ["Distortion", "Share", "", ""], ...steps.map(([growth], k) => {
      if (k > 0) distortion = Math.min(0.1, distortion * (1 + 10 * growth));
      return [distortion, k === 0 ? 0 : shares[k]!, "", ""];
    }), ["", "", "", ""]];
  });
  return joined(
    fc.oneof({ weight: 4, arbitrary: grid }, { weight: 1, arbitrary: list }), row("Building value", orNone("Building value", [2e6, 8e6]), "EUR"), sometimes(damage),
    row("Allowable settlement", within("Allowable settlement", [15, 25]), "mm"),
    sometimes(row("Footprint length", within("Footprint length", [20, 80]), "m")), sometimes(row("Footprint width", within("Footprint width", [15, 60]), "m")),
  );
}

const piles: fc.Arbitrary<Row[]> = fc.tuple(within("Pile diameter", [0.4, 0.9]), fc.double({ min: 0, max: 1, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }), fc.constantFrom(0, 0, 0.02, 0.25, 1), choices("Length rule"), choices("Group interaction"), within("Pile modulus", [20, 35])).map(([diameter, a, b, step, rule, group, modulus]): Row[] => {
  const shortest = Math.max(1, 2 * diameter) * (150 / 1.1 / Math.max(1, 2 * diameter)) ** (a ** 2);
  const longest = Math.min(150, 1.1 * shortest + (150 - 1.1 * shortest) * b ** 2);
  return [
    ["Pile diameter", diameter, "m", ""], ["Pile modulus", modulus, "GPa", ""], ["Shortest length", shortest, "m", ""], ["Longest length", longest, "m", ""], ["Length step", Math.min(20, step * (longest - shortest)), "m", ""],
    ["Length rule", rule, "", ""], ["Group interaction", group, "", ""],
  ];
});

const investigation: fc.Arbitrary<Row[]> = joined(
  fc.oneof(
    row("Method", choices("Method").filter((name) => !/own/i.test(name))),
    joined(fc.constant<Row[]>([["Method", "own", "", ""]]), row("Reading COV", orNone("Reading COV", [0.1])), row("Hole COV", orNone("Hole COV", [0.1])), row("Method COV", orNone("Method COV", [0.3])), sometimes(row("Reading spacing", within("Reading spacing", [0.5, 1]), "m"))),
  ),
  row("Hole depth", within("Hole depth", [10, 25]), "m"), sometimes(row("Design rule", choices("Design rule"))), sometimes(row("Deviations below mean", orNone("Deviations below mean", [0.5]))), sometimes(row("Regional update", choices("Regional update"))),
  fc.oneof({ weight: 3, arbitrary: fc.constant<Row[]>([]) }, { weight: 1, arbitrary: fc.array(fc.tuple(PLACE, PLACE), { minLength: 1, maxLength: 8 }).map((holes): Row[] => [["Hole list", "", "", ""], ["x, m", "y, m", "", ""], ...holes.map(([x, y]) => [x, y, "", ""]), ["", "", "", ""]]) }),
);

const money = (label: string, usual: readonly number[], unit = "EUR"): fc.Arbitrary<Row[]> => row(label, orNone(label, usual), unit);

const prices: fc.Arbitrary<Row[]> = joined(
  sometimes(money("Mobilisation", [2800])), money("Price per hole", [650]), money("Price per metre of hole", [62], "EUR/m"), sometimes(money("Price per reading", [5])), sometimes(money("Report", [3500])), sometimes(row("Days per hole", orNone("Days per hole", [0.4]))),
  sometimes(money("Price of a waiting day", [900])), sometimes(money("Piling rig", [18000])), sometimes(money("Price per pile", [650])), money("Price per metre of pile", [165], "EUR/m"), sometimes(row("Carbon of concrete", orNone("Carbon of concrete", [250]), "kg/m3")),
  sometimes(money("Price of a delay day", [6500])), sometimes(row("Days per surprise", orNone("Days per surprise", [1.5]))), sometimes(row("Surprise tolerance", orNone("Surprise tolerance", [1.5]), "m")), sometimes(row("Share found on site", within("Share found on site", [0, 0.3, 1]))),
);

/**
 * Site blocks over the whole of what is accepted: every input at its ends, at what is usual and anywhere between, every choice,
 * lists and grids, money from none to the dearest.
 *
 * @param mostPiles  of a grid
 */
export function randomBlock(mostPiles: number): fc.Arbitrary<Row[]> {
  return joined(
    ground,
    row("Horizontal scale", within("Horizontal scale", [10, 30]), "m"), row("Vertical scale", within("Vertical scale", [1, 5]), "m"), sometimes(row("Correlation", choices("Correlation"))), sometimes(row("Regional COV", within("Regional COV", [0, 0.4]))),
    sometimes(row("Poisson's ratio", within("Poisson's ratio", [0.3]))),
    building(mostPiles), piles, investigation, prices, row("Seed", fc.integer({ min: 1, max: 1000 })),
  ).map(reconciled);
}

/** What two inputs refuse together is brought to the nearest that both accept, or most blocks would be refused. */
function reconciled(rows: Row[]): Row[] {
  const value = (label: string): number => Number(rows.find(([first]) => first === label)?.[1]);
  const diameter = value("Pile diameter");
  const spacing = value("Reading spacing");
  return rows.map(([label, cell, ...rest]): Row => {
    const number = Number(cell);
    if (label === "Spacing along x" || label === "Spacing along y") return [label, Math.max(number, diameter), ...rest];
    if (label === "Hole depth") return [label, Number.isNaN(spacing) ? Math.max(number, 2) : Math.min(400 * spacing, Math.max(number, spacing)), ...rest];
    return [label!, cell!, ...rest];
  });
}

function joined(...parts: readonly fc.Arbitrary<Row[]>[]): fc.Arbitrary<Row[]> {
  return fc.tuple(...parts).map((rows) => rows.flat());
}
