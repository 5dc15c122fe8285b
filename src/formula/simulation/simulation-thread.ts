import { parentPort } from "node:worker_threads";
import { threadAnswerer } from "../../jobs/answer-thread.js";
import { simulationTrade } from "../../jobs/simulation-trade.js";
import type { ThreadRequest } from "../../jobs/threads.js";

// The entry of a simulation thread in Node: nothing but wiring. Figures are handed over, not copied.
const answer = threadAnswerer(simulationTrade, (reply) => parentPort?.postMessage(reply, reply.kind === "rows" ? [reply.values.buffer as ArrayBuffer] : []));
parentPort?.on("message", (request: ThreadRequest) => answer(request));
