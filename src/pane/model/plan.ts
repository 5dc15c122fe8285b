import type { PilePoint, Point } from "../../engine/index.js";
import { holesInWords, joinWords, type NumberWriter } from "./numbers.js";

/** The rectangle that the plan shows, m, and the size at which it is drawn, pixels. */
export interface PlanFrame {
  readonly x: readonly [number, number];
  readonly y: readonly [number, number];
  readonly width: number;
  readonly height: number;
}

/** Room around the drawing for axis labels, pixels. */
export const PLAN_MARGIN = { left: 34, right: 10, top: 20, bottom: 32 } as const;

/**
 * Chooses frame and size of a plan so that a metre is as long in x as in y.
 *
 * @param points   everything that must be inside: piles, holes, corners of the footprint, m
 * @param width    width of the whole picture with its margins, pixels
 * @param tallest  largest height of the whole picture, pixels
 * @returns        the frame; the side that is too short for its pixels is widened about its centre
 */
export function planFrame(points: readonly { readonly x: number; readonly y: number }[], width: number, tallest: number): PlanFrame {
  const xs = points.map((point) => point.x);
  const ys = points.map((point) => point.y);
  const [x0, x1] = padded(Math.min(...xs), Math.max(...xs));
  const [y0, y1] = padded(Math.min(...ys), Math.max(...ys));
  const innerWidth = width - PLAN_MARGIN.left - PLAN_MARGIN.right;
  const highest = tallest - PLAN_MARGIN.top - PLAN_MARGIN.bottom;
  const innerHeight = Math.min(highest, Math.max(innerWidth * 0.4, (innerWidth * (y1 - y0)) / (x1 - x0)));
  const metresPerPixel = Math.max((x1 - x0) / innerWidth, (y1 - y0) / innerHeight);
  const across = (metresPerPixel * innerWidth) / 2;
  const along = (metresPerPixel * innerHeight) / 2;
  const [cx, cy] = [(x0 + x1) / 2, (y0 + y1) / 2];
  return { x: [cx - across, cx + across], y: [cy - along, cy + along], width, height: innerHeight + PLAN_MARGIN.top + PLAN_MARGIN.bottom };
}

/**
 * Corners of the rectangle in which holes are placed, about the centre of the piles' bounding box.
 *
 * @param piles      the piles, at least one
 * @param footprint  its sides, m
 * @returns          lower left and upper right corner, m
 */
export function footprintCorners(piles: readonly PilePoint[], footprint: { readonly length: number; readonly width: number }): [{ x: number; y: number }, { x: number; y: number }] {
  const xs = piles.map((pile) => pile.x as number);
  const ys = piles.map((pile) => pile.y as number);
  const cx = (Math.min(...xs) + Math.max(...xs)) / 2;
  const cy = (Math.min(...ys) + Math.max(...ys)) / 2;
  const [half, depth] = [footprint.length / 2, footprint.width / 2];
  return [{ x: cx - half, y: cy - depth }, { x: cx + half, y: cy + depth }];
}

/**
 * Radius of a pile's dot: area in proportion to the load, so that the eye compares rightly.
 *
 * @param load     load of the pile, kN
 * @param largest  largest load on the plan, kN
 * @returns        pixels, 2.5 to 6
 */
export function pileRadius(load: number, largest: number): number {
  return largest > 0 ? Math.max(2.5, 6 * Math.sqrt(Math.max(0, load) / largest)) : 4;
}

/**
 * Says what the plan shows, for a person who does not see it.
 *
 * @param piles      the piles
 * @param holes      the holes of the count shown
 * @param automatic  whether the positions are our own
 * @param writer     writes the numbers
 * @returns          sentences
 */
export function describePlan(piles: readonly PilePoint[], holes: readonly Point[], automatic: boolean, writer: NumberWriter): string {
  const loads = piles.map((pile) => pile.load as number);
  const [least, most] = [Math.min(...loads), Math.max(...loads)];
  const kilonewtons = least === most ? `${writer.plain(most, 0)} kN each` : `${writer.plain(least, 0)} to ${writer.plain(most, 0)} kN`;
  const pileWords = `${piles.length} ${piles.length === 1 ? "pile" : "piles"}, ${kilonewtons}`;
  if (holes.length === 0) return `Plan: ${pileWords}; ${holesInWords(0)}.`;
  const places = holes.slice(0, 12).map((hole) => `(${writer.plain(hole.x, 2)}; ${writer.plain(hole.y, 2)})`);
  const more = holes.length > places.length ? [`${holes.length - places.length} more`] : [];
  const source = automatic ? "placed automatically" : "from the hole list";
  return `Plan: ${pileWords}; ${holesInWords(holes.length)} ${source}, in metres at ${joinWords([...places, ...more])}.`;
}

function padded(low: number, high: number): [number, number] {
  const margin = Math.max((high - low) * 0.06, 0.5);
  return [low - margin, high + margin];
}
