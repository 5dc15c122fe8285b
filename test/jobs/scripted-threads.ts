import type { Stream } from "../../src/engine/random/stream.js";
import { threadAnswerer, type Trade } from "../../src/jobs/answer-thread.js";
import type { ThreadRequest, Threads } from "../../src/jobs/threads.js";

/**
 * Threads inside the test's own thread that answer in an order of chance and are lost by chance, so that every order of
 * events can be met.
 *
 * @param chance  decides how long each answer takes and which thread is lost
 * @param losses  share of the requests that end a thread; no piece of work more often than a run puts up with
 */
export function scriptedThreads(trade: Trade, size: number, chance: Stream, losses = 0): Threads & { readonly lost: () => number } {
  let lost = 0;
  const inARow = { rows: 0, look: 0 };
  const lostBefore = new Map<string, number>();
  const isLost = (request: ThreadRequest): boolean => {
    if (request.kind !== "rows" && request.kind !== "look") return false;
    const piece = request.kind === "rows" ? `${request.of} ${request.from}` : "look";
    const before = request.kind === "rows" ? (lostBefore.get(piece) ?? 0) : 0;
    const falls = before < 2 && inARow[request.kind] < 2 && chance.uniform() < losses;
    inARow[request.kind] = falls ? inARow[request.kind] + 1 : 0;
    lostBefore.set(piece, before + Number(falls));
    return falls;
  };
  return {
    size,
    lost: () => lost,
    start(listener) {
      let hasEnded = false;
      const answer = threadAnswerer(trade, (reply) => {
        if (!hasEnded) listener.reply(structuredClone(reply));
      });
      // one after the other, as a real thread does
      let turn = Promise.resolve();
      return {
        post(request) {
          const sent = structuredClone(request);
          turn = turn.then(async () => {
            await new Promise((resolve) => setTimeout(resolve, Math.floor(4 * chance.uniform())));
            if (hasEnded) return;
            if (!isLost(sent)) return answer(sent);
            hasEnded = true;
            lost++;
            listener.lost("it was pulled from under the run");
          });
        },
        end: () => (hasEnded = true),
      };
    },
  };
}
