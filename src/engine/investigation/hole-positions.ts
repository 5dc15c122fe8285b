import { requireDomain } from "../numerics/domain-error.js";
import { metres, type Metres } from "../../units/quantities.js";

/** A place in plan, m. */
export interface Point {
  readonly x: Metres;
  readonly y: Metres;
}

/** A rectangle in plan, sides along the axes, m. */
export interface Rectangle {
  readonly centre: Point;
  /** side along x */
  readonly length: Metres;
  /** side along y */
  readonly width: Metres;
}

/**
 * Holes spread over a rectangle in rows, each hole in the middle of its own cell, all cells of equal area.
 *
 * Of all ways to share the holes among rows (along x or along y) the one is taken whose farthest point of the
 * rectangle lies nearest to a hole; where two are alike, the one with the smaller mean square distance. The rule is ours: codes give
 * spacings, not positions. One hole stands in the centre, four in the cells of a 2 x 2 grid, nine of a 3 x 3 grid.
 *
 * @param rectangle  where holes may stand, sides > 0, m
 * @param count      number of holes, integer, 0 to 400
 * @returns          the positions, row by row, m
 * @throws {DomainError} an argument is outside the range above
 */
export function automaticHoles(rectangle: Rectangle, count: number): Point[] {
  requireDomain(Number.isInteger(count) && count >= 0 && count <= 400, "number of holes", count, "a whole number from 0 to 400");
  requireDomain(rectangle.length > 0 && rectangle.width > 0, "footprint", `${rectangle.length} m x ${rectangle.width} m`, "above 0 m both ways");
  let best: Point[] = [];
  let bestFarthest = Infinity;
  let bestMean = Infinity;
  for (const alongX of [true, false]) {
    for (let rows = 1; rows <= Math.min(count, 40); rows++) {
      const points = inRows(rectangle, shared(count, rows), alongX);
      const { farthest, meanSquare } = coverage(rectangle, points);
      const closer = farthest < bestFarthest * (1 - 1e-9);
      const alike = farthest < bestFarthest * (1 + 1e-9);
      if (closer || (alike && meanSquare < bestMean * (1 - 1e-9))) {
        best = points;
        bestFarthest = farthest;
        bestMean = meanSquare;
      }
    }
  }
  return best;
}

/** Shares the holes among rows as evenly as whole numbers allow, mirrored about the middle row. */
function shared(count: number, rows: number): number[] {
  const small = Math.floor(count / rows);
  const extra = count - small * rows;
  const row = new Array<number>(rows).fill(small);
  // Outer rows take the odd holes first, which keeps five holes a quincunx and the edges covered.
  for (let i = 0; i < extra; i++) {
    const at = i % 2 === 0 ? i / 2 : rows - 1 - (i - 1) / 2;
    row[at] += 1;
  }
  return row;
}

/** Rows of equal cell area: a row's height is its share of the holes. */
function inRows(rectangle: Rectangle, rowCounts: readonly number[], alongX: boolean): Point[] {
  const along = alongX ? rectangle.length : rectangle.width;
  const across = alongX ? rectangle.width : rectangle.length;
  const total = rowCounts.reduce((sum, n) => sum + n, 0);
  const points: Point[] = [];
  let edge = -across / 2;
  for (const n of rowCounts) {
    const height = (across * n) / total;
    for (let i = 0; i < n; i++) {
      const u = ((i + 0.5) / n - 0.5) * along;
      const v = edge + height / 2;
      points.push({ x: metres(rectangle.centre.x + (alongX ? u : v)), y: metres(rectangle.centre.y + (alongX ? v : u)) });
    }
    edge += height;
  }
  return points;
}

/** Farthest and mean square distance from a point of the rectangle to its nearest hole, on a grid of 21 x 21 points. */
function coverage(rectangle: Rectangle, points: readonly Point[]): { farthest: number; meanSquare: number } {
  const side = 21;
  let farthest = 0;
  let sum = 0;
  for (let i = 0; i < side; i++) {
    for (let j = 0; j < side; j++) {
      const x = rectangle.centre.x + (i / (side - 1) - 0.5) * rectangle.length;
      const y = rectangle.centre.y + (j / (side - 1) - 0.5) * rectangle.width;
      let nearest = Infinity;
      for (const p of points) nearest = Math.min(nearest, (p.x - x) ** 2 + (p.y - y) ** 2);
      farthest = Math.max(farthest, nearest);
      sum += nearest;
    }
  }
  return { farthest: Math.sqrt(farthest), meanSquare: sum / (side * side) };
}
