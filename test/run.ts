import { spawn } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

// Runs every check of the project in turn, counts what each said, and ends with one plain line: "N passed, N failed".

interface Tally {
  passed: number;
  failed: number;
}

interface Step {
  readonly name: string;
  /** a script of package.json, or a group of test/vitest.config.ts */
  readonly run: readonly string[];
  /** where the runner leaves its counts; a step without one counts as one check */
  readonly report?: string;
}

const root = fileURLToPath(new URL("..", import.meta.url));
const reports = mkdtempSync(join(tmpdir(), "test-reports-"));
const MINUTES = 60_000;

const script = (name: string, of: string): Step => ({ name, run: ["npm", "run", "--silent", of] });
const group = (name: string): Step => {
  const report = `${reports}/${name}.json`;
  const vitest = ["node", "node_modules/vitest/vitest.mjs", "run", "--config", "test/vitest.config.ts", "--project", name];
  return { name: `tests: ${name}`, run: [...vitest, "--reporter=default", "--reporter=json", `--outputFile.json=${report}`], report };
};

const STEPS: readonly Step[] = [
  script("types", "typecheck"),
  script("lint", "lint"),
  script("layers", "layers"),
  script("unused code", "unused"),
  group("units"),
  script("build", "build"),
  script("size", "size"),
  group("guards"),
  group("browser"),
];

function run([command, ...rest]: readonly string[]): Promise<boolean> {
  return new Promise((resolve) => {
    const child = spawn(command, rest, { cwd: root, stdio: "inherit", timeout: 15 * MINUTES });
    child.on("error", () => resolve(false));
    child.on("close", (code) => resolve(code === 0));
  });
}

/** The runner's own counts. A test that was skipped and a file that could not be loaded count as failed. */
function counted(report: string, ended: boolean): Tally {
  if (!existsSync(report)) return { passed: 0, failed: 1 };
  const said = JSON.parse(readFileSync(report, "utf8")) as {
    numPassedTests: number;
    numTotalTests: number;
    testResults: { status: string; assertionResults: unknown[] }[];
  };
  const unloaded = said.testResults.filter((file) => file.status === "failed" && file.assertionResults.length === 0).length;
  const failed = said.numTotalTests - said.numPassedTests + unloaded;
  return { passed: said.numPassedTests, failed: failed === 0 && !ended ? 1 : failed };
}

async function take(step: Step): Promise<Tally> {
  process.stdout.write(`\n--- ${step.name}\n`);
  const ended = await run(step.run);
  if (step.report !== undefined) return counted(step.report, ended);
  return ended ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 };
}

const wanted = process.argv.slice(2);
const total: Tally = { passed: 0, failed: 0 };
const lines: string[] = [];
for (const step of STEPS) {
  if (wanted.length > 0 && !wanted.some((word) => step.name.includes(word))) continue;
  const began = performance.now();
  const { passed, failed } = await take(step);
  total.passed += passed;
  total.failed += failed;
  lines.push(`${failed === 0 ? "ok  " : "FAIL"} ${step.name}: ${passed} passed, ${failed} failed, ${((performance.now() - began) / 1000).toFixed(1)} s`);
}

rmSync(reports, { recursive: true, force: true });
process.stdout.write(`\n${lines.join("\n")}\n${total.passed} passed, ${total.failed} failed\n`);
process.exitCode = total.failed === 0 && total.passed > 0 ? 0 : 1;
