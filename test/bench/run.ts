import type { BenchCase } from "./bench-case.js";
import { bandSolves } from "./cases/band-solve.js";
import { draws } from "./cases/draws.js";
import { matrices } from "./cases/matrices.js";
import { pileFamilyCase, pileForm, pileSolve } from "./cases/pile-response.js";
import { costTable, firstCall, newPiles, oneCount, otherPrice, sensitivity } from "./cases/prices.js";
import { quasiRandom } from "./cases/quasi-random.js";
import { ringMeans } from "./cases/ring-means.js";
import { oneElements, oneForm, prepare, savedAtHigh, savedAtModerate } from "./cases/simulation.js";
import { PeerProcess, peersAvailable } from "./peer-process.js";

// Times every case, each alternately with its peer, and prints medians, ratios and their share of the target.

/** A list of cases cannot name the state of each; each is handed its own and no other's. */
type AnyCase = BenchCase<never, never>;
const CASES = [oneCount, otherPrice, costTable, firstCall, newPiles, sensitivity, ...draws, ...bandSolves, pileSolve, pileForm, pileFamilyCase, ...matrices, quasiRandom, ringMeans, prepare, oneElements, oneForm, savedAtModerate, savedAtHigh] as unknown as readonly AnyCase[];

interface Spread {
  readonly low: number;
  readonly median: number;
  readonly high: number;
}

function spread(values: readonly number[]): Spread {
  const sorted = [...values].sort((a, b) => a - b);
  const at = (share: number): number => sorted[Math.round(share * (sorted.length - 1))];
  return { low: at(0.25), median: at(0.5), high: at(0.75) };
}

const figures = (value: number): string => (value >= 1000 ? String(Math.round(value)) : value.toPrecision(3));
const range = ({ low, median, high }: Spread, unit: string): string => `${figures(median)}${unit} (${figures(low)}-${figures(high)})`;

async function time(bench: AnyCase, withPeers: boolean): Promise<string[]> {
  const state = bench.setup();
  const peer = withPeers && bench.peer !== undefined ? new PeerProcess() : undefined;
  const ours: number[] = [];
  const ratios: number[] = [];
  const answers: never[] = [];
  try {
    if (peer !== undefined) await peer.load(bench.peer!.name, bench.peer!.input(state));
    for (let round = -2; round < bench.rounds; round++) {
      const begun = performance.now();
      const answer = bench.run(state, round);
      const took = performance.now() - begun;
      bench.check(answer, state);
      const other = await peer?.time();
      if (other !== undefined) bench.peer!.agree(answer, other.answer);
      if (round < 0) continue; // the compiler is still at work
      ours.push(took);
      if (bench.figure !== undefined) answers.push(answer);
      if (other !== undefined) ratios.push(took / other.milliseconds);
    }
  } finally {
    peer?.end();
  }
  const lines = report(bench, spread(ours), ratios.length === 0 ? undefined : spread(ratios));
  return bench.figure === undefined ? lines : [...lines, `  found     ${bench.figure(answers)}`];
}

function report({ name, size, target, peer }: AnyCase, ours: Spread, ratio: Spread | undefined): string[] {
  const lines = [`${name} - ${size}`, `  time      ${range(ours, " ms")}`];
  if (target.milliseconds !== undefined) lines[1] += `, ${share(ours.median, target.milliseconds)} of ${target.milliseconds} ms`;
  if (ratio !== undefined) {
    lines.push(`  to peer   ${range(ratio, " x")} (${peer!.name})${target.ratio === undefined ? "" : `, ${share(ratio.median, target.ratio)} of ${target.ratio} x`}`);
  } else if (peer !== undefined) {
    lines.push("  to peer   not timed: python3 with numpy and scipy is not here");
  }
  return lines;
}

const share = (value: number, target: number): string => `${Math.round((100 * value) / target)} %${value > target ? " (OVER)" : ""}`;

const wanted = process.argv.slice(2);
const withPeers = peersAvailable();
process.stdout.write("Median (quartiles). Times are this machine's; the ratios are what counts.\n\n");
for (const bench of CASES) {
  if (wanted.length > 0 && !wanted.some((word) => bench.name.includes(word))) continue;
  process.stdout.write(`${(await time(bench, withPeers)).join("\n")}\n\n`);
}
