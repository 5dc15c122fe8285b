import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { connect } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, expect, it } from "vitest";
import { THREAD_POLICY } from "../../src/build/content-policy.js";
import { servePractice, type PracticeServer } from "../../src/build/practice-server.js";

let above: string;
let folder: string;
const servers: PracticeServer[] = [];

beforeAll(() => {
  above = mkdtempSync(join(tmpdir(), "serve-"));
  folder = mkdtempSync(join(above, "page-"));
  writeFileSync(join(above, "secret.txt"), "not for the page");
  writeFileSync(join(folder, "index.html"), "<p>page</p>");
  writeFileSync(join(folder, "main.js"), "1");
});

afterAll(async () => {
  for (const server of servers) await server.close();
  rmSync(above, { recursive: true });
});

async function serve(port: number, tell?: (sentence: string) => void): Promise<PracticeServer> {
  const server = await servePractice(folder, port, tell);
  servers.push(server);
  return server;
}

it("serves the page on this machine's own address and nothing else", async () => {
  const { address } = await serve(0);
  expect(address).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/$/);
  expect(await (await fetch(address)).text()).toBe("<p>page</p>");
  expect((await fetch(`${address}main.js`)).headers.get("content-type")).toMatch(/javascript/);
  expect((await fetch(`${address}none.js`)).status).toBe(404);
  // pages carry their policy themselves; a thread has no other than that of its script's headers
  expect((await fetch(`${address}main.js`)).headers.get("content-security-policy")).toBe(THREAD_POLICY);
  expect((await fetch(address)).headers.get("content-security-policy")).toBeNull();
});

it("takes the next port where one is busy, and says so", async () => {
  const first = await serve(0);
  const port = Number(new URL(first.address).port);
  const said: string[] = [];
  const second = await serve(port, (sentence) => said.push(sentence));
  expect(Number(new URL(second.address).port)).toBeGreaterThan(port);
  expect(said[0]).toBe(`Port ${port} is in use by another program; trying ${port + 1}.`);
});

it("gives nothing from outside its folder, however the way is written", async () => {
  const { address } = await serve(0);
  for (const path of ["/../secret.txt", "/%2e%2e/secret.txt", "/..%2fsecret.txt", "/x/../../secret.txt", "/%00", "/%zz"]) {
    const reply = await raw(Number(new URL(address).port), path);
    expect(reply).toMatch(/^HTTP\/1\.1 40[04]/);
    expect(reply).not.toContain("not for the page");
  }
});

it("ends while a browser still holds a connection open", async () => {
  const server = await servePractice(folder, 0);
  const half = connect(Number(new URL(server.address).port), "127.0.0.1");
  half.on("error", () => undefined);
  await new Promise((resolve) => half.write("GET / HTTP/1.1\r\nHost: 127", resolve));
  await fetch(server.address);
  await server.close();
  await expect(fetch(server.address)).rejects.toThrow();
});

/** Asks with the path as it stands: fetch would tidy it first. */
function raw(port: number, path: string): Promise<string> {
  return new Promise((resolve, reject) => {
    const socket = connect(port, "127.0.0.1", () => socket.write(`GET ${path} HTTP/1.1\r\nHost: 127.0.0.1\r\nConnection: close\r\n\r\n`));
    let reply = "";
    socket.on("data", (bytes) => (reply += String(bytes)));
    socket.on("end", () => resolve(reply));
    socket.on("error", reject);
  });
}
