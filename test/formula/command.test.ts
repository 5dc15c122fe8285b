import { spawnSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { expect, it } from "vitest";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));

function command(...words: string[]): { status: number | null; stdout: string; stderr: string } {
  const { status, stdout, stderr } = spawnSync("npm", ["run", "--silent", "formula", "--", ...words], { cwd: ROOT, encoding: "utf8", timeout: 110_000 });
  return { status, stdout, stderr };
}

// The whole way through the shell's door: the script, the streams and the exit codes.
it("prints a value, a reason and a usage sentence, each to its stream and with its exit code", () => {
  const known = command("=PROBE.CORRELATION(0,10)");
  expect(known).toEqual({ status: 0, stdout: "1\n", stderr: "" });
  const error = command("=PROBE.CORRELATION(1,0)");
  expect(error).toMatchObject({ status: 1, stdout: "" });
  expect(error.stderr).toMatch(/^#VALUE! .*Scale.*\.\n$/);
  expect(command("--book")).toEqual({ status: 2, stdout: "", stderr: "The option --book needs a file after it.\n" });
}, 120_000);
