import { spawnSync } from "node:child_process";
import { X509Certificate } from "node:crypto";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { createServer } from "node:https";
import type { AddressInfo } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { connect } from "node:tls";
import { generateCertificates } from "office-addin-dev-certs";
import { expect, it } from "vitest";
import { certificateFor } from "../../src/build/certificates.js";
import { openInExcel, unloadFromExcel, type Machine } from "../../src/build/excel.js";
import { ROOT } from "../guards/files.js";

function machine(platform: string, broken?: keyof Machine): Machine & { readonly done: string[] } {
  const done: string[] = [];
  const step = (name: "serve" | "load" | "unload") => async (): Promise<void> => {
    done.push(name);
    if (broken === name) throw new Error(`${name} failed.`);
  };
  return { platform, serve: step("serve"), load: step("load"), unload: step("unload"), say: (words) => void done.push(words), done };
}

it.each(["win32", "darwin"])("serves before it opens Excel on %s, and says what to do next", async (platform) => {
  const here = machine(platform);
  await openInExcel(here);
  expect(here.done.filter((step) => !step.includes(" "))).toEqual(["serve", "load"]);
  expect(here.done.at(-1)).toContain("=PROBEDEV.VERSION()");
  await unloadFromExcel(here);
  expect(here.done).toContain("unload");
});

it("does not open Excel on an add-in that nobody serves", async () => {
  const here = machine("win32", "serve");
  await expect(openInExcel(here)).rejects.toThrow("serve failed.");
  expect(here.done).toEqual(["serve"]);
});

it("touches nothing on a machine without Excel", async () => {
  const here = machine("linux");
  await expect(openInExcel(here)).rejects.toThrow("not on this machine (linux)");
  await expect(unloadFromExcel(here)).rejects.toThrow("on this machine (linux)");
  expect(here.done).toEqual([]);
});

it("says on Linux in a few sentences what to do, ends with 1 and shows no stack", () => {
  // a Windows or a Mac that runs this test must not open its Excel
  const linux = 'data:text/javascript,Object.defineProperty(process,"platform",{value:"linux"})';
  for (const command of ["excel", "unload"]) {
    const { stdout, stderr, status } = spawnSync(process.execPath, ["--import", linux, "--import", "tsx", "src/build/main.ts", command], { cwd: ROOT, encoding: "utf8" });
    expect(status).toBe(1);
    expect(stdout).toBe("");
    expect(stderr).toContain("Excel on the web");
    expect(stderr).not.toMatch(/\bat .*[(:]\d|Error:|node_modules/);
    expect(stderr.trim().split("\n").length).toBeLessThan(7);
  }
});

it("makes a certificate for localhost, keeps it, and makes a new one when it is about to end", async () => {
  const folder = mkdtempSync(join(tmpdir(), "certificates-"));
  try {
    const first = await certificateFor("linux", folder);
    expect(first.trusted).toBe(false);
    expect(new X509Certificate(first.cert).checkHost("localhost")).toBe("localhost");
    expect((await certificateFor("linux", folder)).cert.equals(first.cert)).toBe(true);
    const served = createServer({ cert: first.cert, key: first.key }).listen(0, "127.0.0.1");
    await new Promise((resolve) => served.once("listening", resolve));
    const trusts = await new Promise<boolean>((resolve, reject) => {
      const client = connect({ host: "127.0.0.1", port: (served.address() as AddressInfo).port, servername: "localhost", ca: readFileSync(join(folder, "ca.crt")) }, () => {
        resolve(client.authorized);
        client.end();
      });
      client.on("error", reject);
    });
    served.close();
    expect(trusts).toBe(true);
    const [authority, cert, key] = ["ca.crt", "localhost.crt", "localhost.key"].map((name) => join(folder, name)) as [string, string, string];
    rmSync(authority); // the tool writes no file over another
    await generateCertificates(authority, cert, key, 0);
    const old = readFileSync(cert);
    expect(old.equals(first.cert)).toBe(false);
    expect((await certificateFor("linux", folder)).cert.equals(old)).toBe(false);
  } finally {
    rmSync(folder, { recursive: true });
  }
});
