import { buildSync } from "esbuild";
import { availableParallelism } from "node:os";
import { fileURLToPath } from "node:url";
import { Worker, type WorkerOptions } from "node:worker_threads";
import { wordsOf } from "../../jobs/words-of-failure.js";
import type { Thread, ThreadListener, ThreadReply, Threads } from "../../jobs/threads.js";

/** More memory than any site needs; a thread that wants more is at fault and ends with a reason instead of a full machine. */
const MOST_MEGABYTES = 1_500;

/**
 * Worker threads of Node.
 *
 * @param entry      the thread's module, TypeScript or JavaScript
 * @param size       how many work at once; without it one for each core, because this thread itself only waits
 * @param megabytes  of memory that a thread may take
 * @throws {Error} a module that cannot be read
 */
export function nodeThreads(entry: URL, size = availableParallelism(), megabytes = MOST_MEGABYTES): Threads {
  const isText = entry.pathname.endsWith(".ts");
  const source = isText ? javaScriptOf(entry) : entry;
  return { size, start: (listener) => startThread(source, { eval: isText, resourceLimits: { maxOldGenerationSizeMb: megabytes } }, listener) };
}

/** A thread does not take over how its parent reads TypeScript; one bundle for all of them starts the soonest. */
function javaScriptOf(entry: URL): string {
  const { outputFiles } = buildSync({ entryPoints: [fileURLToPath(entry)], bundle: true, write: false, platform: "node", format: "cjs", target: "node20", logLevel: "silent" });
  return outputFiles[0].text;
}

function startThread(source: string | URL, options: WorkerOptions, listener: ThreadListener): Thread {
  const worker = new Worker(source, options);
  let hasEnded = false;
  const lost = (reason: string): void => {
    if (hasEnded) return;
    hasEnded = true;
    listener.lost(reason);
  };
  worker.on("message", (reply: ThreadReply) => {
    if (!hasEnded) listener.reply(reply);
  });
  worker.on("messageerror", () => lost("its answer could not be read"));
  worker.on("error", (reason) => lost(wordsOf(reason)));
  worker.on("exit", (code) => lost(`its thread ended with code ${code}`));
  return {
    post: (request) => worker.postMessage(request),
    end: () => {
      hasEnded = true;
      void worker.terminate();
    },
  };
}
