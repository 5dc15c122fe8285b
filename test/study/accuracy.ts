import { writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { PRODUCT_VERSION } from "../../src/results/version.js";
import { COUNTS, runAccuracy, type AccuracyCase, type AccuracyRow } from "./accuracy-case.js";

// Cell figures and the second-order form against finite elements under every pile. Prints a line a rule and writes accuracy.md.
// Realisations by elements and by the form alone may be given: npm run accuracy -- 60 6000

const [ELEMENTS, FORM] = [Number(process.argv[2] ?? 60), Number(process.argv[3] ?? 6000)];
const SEED = "accuracy";
const GROUNDS = [
  { label: "separable Markov 8 m / 8 m", change: { scales: [8, 8] } },
  { label: "separable Markov 12 m / 3 m", change: { scales: [12, 3] } },
  { label: "ellipsoidal Markov 8 m / 8 m", change: { scales: [8, 8], correlation: "ellipsoidal" } },
  { label: "ellipsoidal Markov 20 m / 2 m", change: { scales: [20, 2], correlation: "ellipsoidal" } },
] as const;
const COVS = [0.3, 0.6, 1];

const row = (cells: readonly (string | number)[]): string => `| ${cells.join(" | ")} |`;
const percent = (ratio: number): string => `${ratio >= 1 ? "+" : "-"}${Math.abs(100 * (ratio - 1)).toFixed(1)} %`;
const thousands = (money: number): string => (Math.abs(money) < 9950 ? (money / 1000).toFixed(1) : String(Math.round(money / 1000)));
const geometric = (values: readonly number[]): number => Math.exp(values.reduce((sum, value) => sum + Math.log(value), 0) / values.length);
const whole = (value: number): string => Number(value.toPrecision(2)).toLocaleString("en-GB");

/** The cells' ratios, each weighed by how well it is known. */
function cellRatio({ cells, cellsError }: AccuracyRow): { mean: number; error: number } {
  const weights = cellsError.map((error) => 1 / error ** 2);
  const sum = weights.reduce((total, weight) => total + weight, 0);
  // Counts share their realisations: the mean is known hardly better than one of them.
  return { mean: cells.reduce((total, ratio, c) => total + ratio * weights[c], 0) / sum, error: Math.min(...cellsError) };
}

const begun = performance.now();
const lines: string[] = [];
const cuts = new Map<number, number[]>(COVS.map((cov) => [cov, []]));
for (const { label, change } of GROUNDS) {
  for (const cov of COVS) {
    const study: AccuracyCase = { label, change: { ...change, cov } };
    for (const found of runAccuracy(study, SEED, ELEMENTS, FORM)) {
      const { mean, error } = cellRatio(found);
      const known = found.failure[0] > 0 && Number.isFinite(mean);
      cuts.get(cov)!.push(...found.cuts);
      lines.push(
        row([
          label, cov, found.rule, `${thousands(found.failure[0])} to ${thousands(found.failure[1])}`,
          known ? `${percent(mean)} +- ${(100 * error).toFixed(1)} (${percent(Math.min(...found.cells))} to ${percent(Math.max(...found.cells))})` : "too little to say",
          Number.isFinite(found.form) ? `${percent(found.form)} +- ${(100 * found.formError).toFixed(2)}` : "no damage seen",
          found.correlation.toFixed(4), found.cuts.length === 0 ? "-" : `${whole(geometric(found.cuts))} (${whole(Math.min(...found.cuts))})`,
          found.best.simulation, found.best.cells, found.loss === 0 ? "0" : `${thousands(found.loss)} +- ${thousands(found.lossError)}`,
        ]),
      );
      console.log(lines[lines.length - 1]);
    }
  }
}

const head = ["ground", "COV", "design rule", "failure cost, thousands", "cells: failure cost", "form: failure cost", "correlation, lowest", "variance cut, mean (lowest)", "best count", "cells' best", "loss by the cells' choice, thousands"];
const text = [
  "# Cell figures and the second-order form against finite elements",
  "",
  `Version ${PRODUCT_VERSION}, seed "${SEED}", ${ELEMENTS} realisations with finite elements under every pile and ${FORM} by the second-order form alone in each ground; counts ${COUNTS.join(", ")}. Made by \`npm run accuracy -- ${ELEMENTS} ${FORM}\`; not written by hand.`,
  "",
  "The building: nine piles of 0.5 m at 6 m, 562.5 to 1000 kN, worth 2,000 thousand; ground of mean 8 MPa; holes of 15.6 m at 3.4 thousand each; readings, hole and method COV 0.20, 0.15, 0.20; every pile as long as its load needs at the one design value, which is the raw rule's.",
  "",
  "Cells: expected failure cost by the cell functions over that by the simulation, mean of the counts with its standard error, lowest and highest count. Form: the same ratio for the second-order form, all counts together, in the same realised grounds. Correlation of form and finite elements: failure cost of one count, lowest of the counts. Variance cut: variance of the total cost by finite elements over what the form leaves of it, geometric mean and lowest of the counts: so many times fewer finite-element solutions give the same standard error. Best count: of the simulation and of the cells; loss: what the latter costs more in the simulation's table.",
  "",
  row(head), row(head.map(() => "---")), ...lines,
  "",
  ...COVS.map((cov) => `Variance cut at COV ${cov}, geometric mean of all grounds, rules and counts: ${whole(geometric(cuts.get(cov)!))}.`).join("\n\n").split("\n"),
  "",
].join("\n");
writeFileSync(fileURLToPath(new URL("accuracy.md", import.meta.url)), text);
console.log(`${((performance.now() - begun) / 1000).toFixed(0)} s; written to test/study/accuracy.md`);
