import { answerCounts } from "./answer-counts.js";
import type { CountRequest } from "./count-messages.js";

// The entry of the worker's own thread: nothing but wiring, so that everything else can be tried without one.
self.addEventListener("message", (event: MessageEvent<CountRequest>) => {
  answerCounts(event.data, (reply) => self.postMessage(reply));
});
