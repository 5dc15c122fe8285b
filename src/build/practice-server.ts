import { createReadStream } from "node:fs";
import { stat } from "node:fs/promises";
import { createServer, type Server, type ServerResponse } from "node:http";
import type { AddressInfo } from "node:net";
import { extname, join, normalize, sep } from "node:path";
import { THREAD_POLICY } from "./content-policy.js";

const TRIES = 20;

const TYPES: Record<string, string> = {
  ".html": "text/html; charset=utf-8",
  ".js": "text/javascript; charset=utf-8",
  ".css": "text/css; charset=utf-8",
  ".json": "application/json; charset=utf-8",
  ".svg": "image/svg+xml",
  ".png": "image/png",
};

/** A server that is running. */
export interface PracticeServer {
  /** where a browser finds the page */
  readonly address: string;
  /** ends the server and what it is still sending */
  close(): Promise<void>;
}

/**
 * Serves a folder to this machine alone. A busy port is said in a sentence and the next one is taken.
 *
 * @param folder  built page
 * @param port    wanted port; 0: any free one
 * @param tell    takes the sentence about a busy port
 * @throws {Error} twenty ports in a row are busy
 */
export async function servePractice(folder: string, port: number, tell: (sentence: string) => void = console.error): Promise<PracticeServer> {
  const server = createServer((request, response) => {
    void answer(folder, request.url ?? "/", response);
  });
  for (let tried = port; tried < port + TRIES; tried++) {
    if (await listens(server, tried)) {
      return {
        address: `http://127.0.0.1:${(server.address() as AddressInfo).port}/`,
        close: () =>
          new Promise((resolve) => {
            server.close(() => resolve());
            server.closeAllConnections();
          }),
      };
    }
    tell(`Port ${tried} is in use by another program; trying ${tried + 1}.`);
  }
  throw new Error(`The ports ${port} to ${port + TRIES - 1} are all in use; end one of the programs that use them.`);
}

function listens(server: Server, port: number): Promise<boolean> {
  return new Promise((resolve, reject) => {
    const failed = (error: NodeJS.ErrnoException) => {
      if (error.code === "EADDRINUSE" || error.code === "EACCES") resolve(false);
      else reject(error);
    };
    server.once("error", failed);
    server.listen(port, "127.0.0.1", () => {
      server.off("error", failed);
      resolve(true);
    });
  });
}

async function answer(folder: string, url: string, response: ServerResponse): Promise<void> {
  const file = fileFor(folder, url);
  const size = file === undefined ? undefined : await stat(file).then((found) => (found.isFile() ? found.size : undefined), () => undefined);
  if (file === undefined || size === undefined) {
    response.writeHead(404, { "Content-Type": "text/plain; charset=utf-8" }).end("There is no such page.\n");
    return;
  }
  response.writeHead(200, {
    "Content-Type": TYPES[extname(file)] ?? "application/octet-stream",
    "Content-Length": size,
    "Cache-Control": "no-store",
    "X-Content-Type-Options": "nosniff",
    ...(extname(file) === ".js" ? { "Content-Security-Policy": THREAD_POLICY } : {}),
  });
  createReadStream(file).on("error", () => response.destroy()).pipe(response);
}

function fileFor(folder: string, url: string): string | undefined {
  let path: string;
  try {
    path = decodeURIComponent(new URL(url, "http://127.0.0.1").pathname);
  } catch {
    return undefined;
  }
  const root = normalize(folder + sep);
  const file = normalize(join(root, path.endsWith("/") ? `${path}index.html` : path));
  return file.startsWith(root) && !file.includes("\0") ? file : undefined;
}
