import { wordsOf } from "./words-of-failure.js";
import type { Thread, ThreadListener, ThreadReply, Threads } from "./threads.js";

/** The part of a web worker that is used; a test hands in one of its own making. */
export interface PageWorker {
  postMessage(message: unknown): void;
  terminate(): void;
  onmessage: ((event: MessageEvent) => unknown) | null;
  onmessageerror: ((event: MessageEvent) => unknown) | null;
  onerror: ((event: ErrorEvent) => unknown) | null;
}

const MOST_THREADS = 4;

/**
 * Web workers of a page: as many as the machine has cores, less one for the page itself, at most four.
 *
 * @param startWorker  starts one, from the entry simulation-worker
 * @param cores        of the machine; undefined where the browser does not tell
 * @param wanted       how many the person asks for; without it as many as there may be
 */
export function webThreads(startWorker: () => PageWorker, cores: number | undefined, wanted = MOST_THREADS): Threads {
  const size = Math.max(1, Math.min(MOST_THREADS, (cores ?? 2) - 1, wanted));
  return { size, start: (listener) => startThread(startWorker, listener) };
}

function startThread(startWorker: () => PageWorker, listener: ThreadListener): Thread {
  const worker = startWorker();
  worker.onmessage = (event) => listener.reply(event.data as ThreadReply);
  worker.onmessageerror = () => listener.lost("its answer could not be read");
  worker.onerror = (event) => listener.lost(wordsOf(new Error(event.message || "its thread could not be started")));
  return {
    post: (request) => worker.postMessage(request),
    end: () => {
      worker.onmessage = worker.onmessageerror = worker.onerror = null;
      worker.terminate();
    },
  };
}
