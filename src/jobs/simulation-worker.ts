import { threadAnswerer } from "./answer-thread.js";
import { simulationTrade } from "./simulation-trade.js";
import type { ThreadRequest } from "./threads.js";

// The entry of a page's simulation thread: nothing but wiring. Figures are handed over, not copied.
const answer = threadAnswerer(simulationTrade, (reply) => self.postMessage(reply, { transfer: reply.kind === "rows" ? [reply.values.buffer] : [] }));
self.addEventListener("message", (event: MessageEvent<ThreadRequest>) => answer(event.data));
