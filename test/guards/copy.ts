import { spawnSync } from "node:child_process";
import { cpSync, mkdirSync, mkdtempSync, readFileSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { ROOT } from "./files.js";

/** A copy of the project into which violations are planted, so that a guard can be seen to refuse them. */
export interface PlantedCopy {
  readonly root: string;
  /** runs a program of node_modules in the copy; what it printed (ordinary output, then errors) and whether it ended well */
  run(program: string, ...args: string[]): { out: string; said: string; ended: boolean };
  read(path: string): string;
  write(path: string, content: string): void;
  remove(): void;
}

/**
 * Copies the project aside and plants files in it.
 *
 * @param planted  path in the project -> content
 * @param only     what is copied; node_modules is always there
 */
export function plantedCopy(planted: Readonly<Record<string, string>>, only: readonly string[] = ["package.json", "tsconfig.json", "webpack.config.js", "src", "test"]): PlantedCopy {
  const root = mkdtempSync(join(tmpdir(), "planted-"));
  for (const name of only) cpSync(join(ROOT, name), join(root, name), { recursive: true, filter: (path) => !/[/\\](fixtures|dist|node_modules)$/.test(path) });
  symlinkSync(join(ROOT, "node_modules"), join(root, "node_modules"), "junction");
  const write = (path: string, content: string): void => {
    mkdirSync(dirname(join(root, path)), { recursive: true });
    writeFileSync(join(root, path), content);
  };
  for (const [path, content] of Object.entries(planted)) write(path, content);
  return {
    root,
    write,
    read: (path) => readFileSync(join(root, path), "utf8"),
    run(program, ...args) {
      const { stdout, stderr, status } = spawnSync(process.execPath, [join(root, "node_modules", program), ...args], { cwd: root, encoding: "utf8", maxBuffer: 1e8 });
      return { out: stdout, said: stdout + stderr, ended: status === 0 };
    },
    remove: () => rmSync(root, { recursive: true, force: true }),
  };
}
