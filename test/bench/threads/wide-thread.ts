import { parentPort } from "node:worker_threads";
import { threadAnswerer } from "../../../src/jobs/answer-thread.js";
import type { ThreadRequest } from "../../../src/jobs/threads.js";

// Rows as wide as those of 13 counts, without the work: for the memory of a long run. The job's target is the number of rows.
const answer = threadAnswerer(
  {
    prepare: () => (kind, index) => Float64Array.from({ length: kind === "elements" ? 208 : 104 }, (_, k) => index + k / 1000),
    lookAt: ({ target }) => (elements) => ({ table: elements.length, next: elements.length >= (target as number) ? "enough" : { elements: target as number, form: 4 * (target as number) }, projected: undefined }),
  },
  (reply) => parentPort?.postMessage(reply, reply.kind === "rows" ? [reply.values.buffer as ArrayBuffer] : []),
);
parentPort?.on("message", (request: ThreadRequest) => answer(request));
