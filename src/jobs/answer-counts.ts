import { assess, assessCounts, DomainError, pileLengthTable } from "../engine/index.js";
import type { CountReply, CountRequest } from "./count-messages.js";
import { sectionOf } from "./section.js";

/**
 * Answers one request, one reply as soon as each is known. The one catch of the worker: the reason of every failure
 * leaves it in words.
 *
 * @param request  what the page asks
 * @param reply    takes each reply in turn; the last one is "priced", "lengths", "section", "refused" or "failed"
 */
export function answerCounts(request: CountRequest, reply: (reply: CountReply) => void): void {
  const { id } = request;
  try {
    if (request.kind === "lengths") {
      reply({ id, kind: "lengths", count: request.count, table: pileLengthTable(request.problem, request.count, [...request.percentiles]) });
      return;
    }
    if (request.kind === "section") {
      reply({ id, kind: "section", section: sectionOf(request.problem, request.count, request.index) });
      return;
    }
    // One by one first, for the progress; the engine remembers them, so the comparison afterwards costs next to nothing.
    request.counts.forEach((count, k) => {
      const row = assess(request.problem, count);
      reply({ id, kind: "priced-one", row, done: k + 1, of: request.counts.length });
    });
    reply({ id, kind: "priced", rows: assessCounts(request.problem, request.counts) });
  } catch (reason) {
    if (reason instanceof DomainError) reply({ id, kind: "refused", message: reason.message });
    else reply({ id, kind: "failed", message: reason instanceof Error ? reason.message : String(reason) });
  }
}
