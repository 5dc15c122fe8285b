import { describe, expect, it } from "vitest";
import { holePositions, pileLengthTable } from "../../src/engine/index.js";
import { parseSite, templateRows } from "../../src/inputs/index.js";
import { answerCounts } from "../../src/jobs/answer-counts.js";
import type { CountReply } from "../../src/jobs/count-messages.js";
import { sectionOf } from "../../src/jobs/section.js";
import { numberWriter } from "../../src/pane/model/numbers.js";
import { describeSection, isInSection, SLICE_COLOURS, sliceBounds, sliceLegend } from "../../src/pane/model/slice.js";

const writer = numberWriter("en-GB");
const { problem } = parseSite(templateRows());

describe("the section through a row of piles", () => {
  const section = sectionOf(problem, 3, 0);

  it("goes through the row nearest to the middle and shows its piles at their middle length", () => {
    const ys = problem.building.piles.map(({ y }) => y as number);
    const rows = [...new Set(ys)].sort((a, b) => a - b);
    expect(section.y).toBe(rows[(rows.length - 1) / 2]);
    expect(section.piles.length).toBe(ys.filter((y) => y === section.y).length);
    // Source: identity, the engine's own table of lengths
    const { groups } = pileLengthTable(problem, 3, [50]);
    for (const { length } of section.piles) expect(groups.map(({ lengths }) => lengths[0])).toContain(length);
  });

  it("shows every hole at its place, with how far it stands from the section", () => {
    const holes = holePositions(problem, 3);
    expect(section.holes.map(({ x, off }) => [x, off])).toEqual(holes.map(({ x, y }) => [x, Math.abs(y - section.y)]));
    expect([isInSection(0.5), isInSection(1.5)]).toEqual([true, false]);
    expect(section.depth).toBeGreaterThanOrEqual(problem.investigation.holeDepth);
    expect(section.modulus.length).toBe(section.columns * section.rows);
    expect(section.from).toBeLessThan(Math.min(...holes.map(({ x }) => x)));
  });

  it("is answered by the thread, and refused in words", () => {
    const replies: CountReply[] = [];
    answerCounts({ id: 4, kind: "section", problem, count: 3, index: 0 }, (reply) => replies.push(reply));
    answerCounts({ id: 5, kind: "section", problem, count: 3, index: -1 }, (reply) => replies.push(reply));
    expect(replies[0]).toEqual({ id: 4, kind: "section", section });
    expect(replies[1]).toMatchObject({ id: 5, kind: "refused" });
  });

  it("is put into words for those who do not see it", () => {
    expect(describeSection(section, 1, writer)).toMatch(/^Ground 1, vertical section along x at y 6 m, \d+ m deep: Young\u2019s modulus [\d.]+ to [\d.]+ MPa in nine tenths of it, [\d.]+ MPa in the middle\. 4 piles of .* m, three holes\.$/);
  });
});

describe("the colours of a section", () => {
  it("grow darker with stiffness, so that no hue need be told from another", () => {
    // relative luminance of sRGB, WCAG 2.2
    const light = SLICE_COLOURS.map((colour) => [1, 3, 5].map((at) => parseInt(colour.slice(at, at + 2), 16) / 255).map((c) => (c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4)).reduce((sum, c, k) => sum + c * [0.2126, 0.7152, 0.0722][k]!, 0));
    for (let k = 1; k < light.length; k++) expect((light[k - 1]! + 0.05) / (light[k]! + 0.05)).toBeGreaterThan(1.2);
  });

  it("change at round figures spread evenly in the logarithm", () => {
    const modulus = Float64Array.from({ length: 1001 }, (_, k) => 1000 * 10 ** (k / 500));
    // 5 % and 95 % of 1 to 100 MPa are 1.26 and 79.4; five even steps of the logarithm between
    expect(sliceBounds(modulus)).toEqual([1.3, 2.9, 6.6, 15, 35, 79]);
    expect(sliceLegend([1.3, 15, 35], writer)).toEqual(["under 1.3", "1.3 to 15", "15 to 35", "over 35"]);
    expect(sliceBounds(new Float64Array(50).fill(7000))).toEqual([7]);
  });
});
