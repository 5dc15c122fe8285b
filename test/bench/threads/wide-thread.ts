import { parentPort } from "node:worker_threads";
import { estimate, outcomeColumns } from "../../../src/engine/index.js";
import { threadAnswerer } from "../../../src/jobs/answer-thread.js";
import type { ThreadRequest } from "../../../src/jobs/threads.js";
import { MOST, TASK } from "./demonstration-task.js";

// Rows as wide as those of the demonstration, without the work of making them, but looked at as a real run is: for the memory of a long
// run. The job's target is the number of realisations by elements.
const width = TASK.counts.length * outcomeColumns.length;
const answer = threadAnswerer(
  {
    prepare: () => (kind, index) => Float64Array.from({ length: kind === "elements" ? 2 * width : width }, (_, k) => index + k / 1000),
    lookAt: ({ target }) => (elements, form) => ({
      table: elements.length < 2 ? undefined : estimate(TASK, elements, form).rows.length,
      next: elements.length >= (target as number) ? "enough" : { elements: target as number, form: Math.floor(((target as number) * MOST.form) / MOST.elements) },
      projected: undefined,
    }),
  },
  (reply) => parentPort?.postMessage(reply, reply.kind === "rows" ? [reply.values.buffer as ArrayBuffer] : []),
);
parentPort?.on("message", (request: ThreadRequest) => answer(request));
