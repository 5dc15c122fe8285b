import { spawn } from "node:child_process";
import { filesBelow, ROOT } from "./files.js";

// One compilation a runtime: a file that names a global of another runtime fails here.
const projects = [...filesBelow(ROOT, "src"), ...filesBelow(ROOT, "test")].filter((path) => path.endsWith("/tsconfig.json"));
const compiler = `${ROOT}/node_modules/typescript/bin/tsc`;

function check(project: string): Promise<boolean> {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [compiler, "-p", project, "--noEmit", "--pretty", "false"], { cwd: ROOT });
    let said = "";
    child.stdout.on("data", (part) => (said += String(part)));
    child.stderr.on("data", (part) => (said += String(part)));
    child.on("close", (code) => {
      process.stdout.write(`${code === 0 ? "ok  " : "FAIL"} ${project}\n${said}`);
      resolve(code === 0);
    });
  });
}

const queue = [...projects];
const answers: boolean[] = [];
const worker = async (): Promise<void> => {
  for (let next = queue.shift(); next !== undefined; next = queue.shift()) answers.push(await check(next));
};
await Promise.all([worker(), worker()]);
process.exitCode = answers.every(Boolean) ? 0 : 1;
