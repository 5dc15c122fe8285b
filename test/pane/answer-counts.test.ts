import { describe, expect, it } from "vitest";
import { assessCounts, pileLengthTable, type Problem } from "../../src/engine/index.js";
import { parseSite, templateRows } from "../../src/inputs/index.js";
import { answerCounts } from "../../src/jobs/answer-counts.js";
import type { CountReply, CountRequest } from "../../src/jobs/count-messages.js";

function replies(request: CountRequest): CountReply[] {
  const heard: CountReply[] = [];
  answerCounts(request, (reply) => heard.push(structuredClone(reply)));
  return heard;
}

const { problem } = parseSite(templateRows());

// Identity: the worker gives what the engine gives in the same thread.
describe("the worker's answers", () => {
  it("come one by one, then all together, and survive the way between threads", () => {
    const heard = replies({ id: 7, kind: "price", problem: structuredClone(problem), counts: [0, 2] });
    const rows = assessCounts(problem, [0, 2]);
    expect(heard.map((reply) => [reply.id, reply.kind])).toEqual([[7, "priced-one"], [7, "priced-one"], [7, "priced"]]);
    expect(heard[0]).toMatchObject({ done: 1, of: 2, row: { count: 0, total: rows[0]!.total } });
    expect(heard[2]).toEqual({ id: 7, kind: "priced", rows });
  });

  it("hold the lengths of one count", () => {
    expect(replies({ id: 8, kind: "lengths", problem, count: 2, percentiles: [5, 95] })).toEqual([{ id: 8, kind: "lengths", count: 2, table: pileLengthTable(problem, 2, [5, 95]) }]);
  });

  it("tell a refusal of the engine from a fault of the program, each with its reason", () => {
    expect(replies({ id: 9, kind: "price", problem, counts: [-1] })).toEqual([{ id: 9, kind: "refused", message: expect.stringMatching(/-1/) as string }]);
    const broken = { ...problem, ground: undefined } as unknown as Problem;
    expect(replies({ id: 10, kind: "price", problem: broken, counts: [1] })).toEqual([{ id: 10, kind: "failed", message: expect.any(String) as string }]);
  });
});
