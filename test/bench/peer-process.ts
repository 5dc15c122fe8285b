import { spawn, spawnSync, type ChildProcessWithoutNullStreams } from "node:child_process";
import { createInterface } from "node:readline";
import { fileURLToPath } from "node:url";

/** True where python3 with numpy and scipy stands on this machine. */
export function peersAvailable(): boolean {
  return spawnSync("python3", ["-c", "import numpy, scipy.linalg"]).status === 0;
}

/** One process of peers.py with one case loaded, so that every timed run starts warm on both sides. */
export class PeerProcess {
  readonly #child: ChildProcessWithoutNullStreams;
  readonly #lines: AsyncIterator<string>;

  constructor() {
    // one thread, as ours has one
    const env = { ...process.env, OPENBLAS_NUM_THREADS: "1", OMP_NUM_THREADS: "1", MKL_NUM_THREADS: "1" };
    this.#child = spawn("python3", [fileURLToPath(new URL("peers.py", import.meta.url))], { env });
    this.#child.stderr.pipe(process.stderr);
    this.#lines = createInterface({ input: this.#child.stdout })[Symbol.asyncIterator]();
  }

  async load(name: string, input: Readonly<Record<string, Float64Array | number>>): Promise<void> {
    const encoded = Object.fromEntries(Object.entries(input).map(([key, value]) => [key, typeof value === "number" ? value : base64(value)]));
    await this.#ask({ load: name, input: encoded });
  }

  async time(): Promise<{ milliseconds: number; answer: Float64Array }> {
    const reply = (await this.#ask({ time: true })) as { milliseconds: number; answer: string };
    const bytes = Buffer.from(reply.answer, "base64");
    return { milliseconds: reply.milliseconds, answer: new Float64Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength)) };
  }

  end(): void {
    this.#child.stdin.end();
  }

  async #ask(request: object): Promise<unknown> {
    this.#child.stdin.write(`${JSON.stringify(request)}\n`);
    const { value, done } = await this.#lines.next();
    if (done === true) throw new Error("The peer ended without an answer.");
    return JSON.parse(value) as unknown;
  }
}

function base64(values: Float64Array): string {
  return Buffer.from(values.buffer, values.byteOffset, values.byteLength).toString("base64");
}
