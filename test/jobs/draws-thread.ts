import { parentPort } from "node:worker_threads";
import { threadAnswerer } from "../../src/jobs/answer-thread.js";
import type { ThreadRequest } from "../../src/jobs/threads.js";
import { drawsTrade } from "./draws.js";

// The entry of a test's own thread: a small job, and the faults that a task asks for.
const answer = threadAnswerer(drawsTrade, (reply) => parentPort!.postMessage(reply));
parentPort!.on("message", (request: ThreadRequest) => answer(request));
