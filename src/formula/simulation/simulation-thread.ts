import { parentPort } from "node:worker_threads";
import { rowAnswerer } from "../../jobs/answer-rows.js";
import { simulationRows } from "../../jobs/simulation-rows.js";
import type { ThreadRequest } from "../../jobs/threads.js";

// The entry of a simulation thread in Node: nothing but wiring. Figures are handed over, not copied.
const answer = rowAnswerer(simulationRows, (reply) => parentPort?.postMessage(reply, reply.kind === "rows" ? [reply.values.buffer as ArrayBuffer] : []));
parentPort?.on("message", (request: ThreadRequest) => answer(request));
