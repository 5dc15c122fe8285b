import { writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { stream } from "../../src/engine/random/stream.js";
import { PRODUCT_VERSION } from "../../src/results/version.js";
import { diameter, mean, pileModulus, poissonRatio, runCase, type StudyCase, type StudyResult } from "./second-order-case.js";

// Direct finite elements against the second-order stiffness, in random ground. Prints a line a case and writes second-order.md.

const SEED = "second order study";
const PAIRS = 250;
const COVS = [0.3, 0.6, 1];
const LENGTHS = [5, 10, 20];
const GROUNDS = [
  { label: "separable Markov 8 m / 8 m", ground: { correlation: "markov", horizontalScale: 8, verticalScale: 8 } },
  { label: "separable Markov 12 m / 3 m", ground: { correlation: "markov", horizontalScale: 12, verticalScale: 3 } },
  { label: "ellipsoidal Markov 8 m / 8 m", ground: { correlation: "ellipsoidal", horizontalScale: 8, verticalScale: 8 } },
] as const;

const fixed = (value: number, digits: number) => (value >= 0 ? " " : "-") + Math.abs(value).toFixed(digits);
const row = (cells: readonly (string | number)[]) => `| ${cells.join(" | ")} |`;
const head = (cells: readonly string[]) => [row(cells), row(cells.map(() => "---"))];

const cases: StudyCase[] = GROUNDS.flatMap(({ label, ground }) => COVS.flatMap((cov) => LENGTHS.map((length) => ({ label, ground, cov, length }))));
const begun = performance.now();
const results = cases.map((study, number): [StudyCase, StudyResult] => {
  const result = runCase(study, PAIRS, (k) => stream(SEED, number, k));
  console.log(`${study.label}, COV ${study.cov}, ${study.length} m: residual ${fixed(result.sloped.mean, 4)} +- ${result.sloped.sd.toFixed(4)}, slope ${result.slope.closed.toFixed(4)} (${result.slope.sampled.toFixed(4)})`);
  return [study, result];
});

const text = [
  "# The second-order pile stiffness against direct finite elements",
  "",
  `Version ${PRODUCT_VERSION}, seed "${SEED}", ${2 * PAIRS} fields a case (${PAIRS} antithetic pairs, drawn anew for every case). Made by \`npm run study\`; not written by hand.`,
  "",
  `Pile: diameter ${diameter} m, modulus ${pileModulus / 1e6} GPa. Ground: mean ${mean / 1e3} MPa, lognormal, Poisson's ratio ${poissonRatio}; ring means drawn on the rings and levels of the mesh. Everything is in ln of head stiffness about its value in the median ground.`,
  "",
  "## Direct less predicted",
  "",
  "sd: standard deviation of the direct ln stiffness. First order: energy shares alone, ln K = ln K0 + sigma X. Second order: with the form Q. With slope: beta sigma X + sigma^2 Q with beta in closed form. Bias and standard deviation of direct less predicted; r is the correlation of direct and predicted in the last.",
  "",
  ...head(["ground", "COV", "length, m", "sd", "first: bias", "sd", "second: bias", "sd", "with slope: bias", "sd", "1 - r"]),
  ...results.map(([s, r]) =>
    row([s.label, s.cov, s.length, r.stiffness.sd.toFixed(3), fixed(r.first.mean, 4), r.first.sd.toFixed(4), fixed(r.second.mean, 4), r.second.sd.toFixed(4), fixed(r.sloped.mean, 4), r.sloped.sd.toFixed(4), (1 - r.correlation).toExponential(1)]),
  ),
  "",
  "## Slope, curvature and residual",
  "",
  "ln K = ln K0 + a + beta x - c (x^2 - Var x) + tau z with x = sigma X. beta: sampled on the fields by Stein's lemma with its standard error, and in closed form. a, c, tau: fitted to the fields by least squares, and from the form alone.",
  "",
  ...head(["ground", "COV", "length, m", "beta sampled", "+-", "beta closed", "a fitted", "a form", "c fitted", "c form", "tau fitted", "tau form"]),
  ...results.map(([s, r]) =>
    row([s.label, s.cov, s.length, r.slope.sampled.toFixed(4), r.slope.error.toFixed(4), r.slope.closed.toFixed(4), fixed(r.fitted.a, 4), fixed(r.formula.a, 4), r.fitted.c.toFixed(3), r.formula.c.toFixed(3), r.fitted.tau.toFixed(4), r.formula.tau.toFixed(4)]),
  ),
  "",
].join("\n");

writeFileSync(fileURLToPath(new URL("second-order.md", import.meta.url)), text);
console.log(`${cases.length} cases, ${cases.length * 2 * PAIRS} direct solves, ${((performance.now() - begun) / 1000).toFixed(0)} s; written to test/study/second-order.md`);
