/**
 * Depths at which a hole is read: one spacing below the head, then every spacing down to the hole's depth.
 *
 * @param spacing    distance of the readings, m, > 0
 * @param holeDepth  depth of the hole, m, >= spacing
 * @returns          the depths, m, increasing; empty when the hole ends above the first reading
 */
export function readingDepths(spacing: number, holeDepth: number): Float64Array {
  // A depth typed as 15 m over readings typed as 0.1 m apart must give 150, not 149: rounding is forgiven.
  const readings = Math.floor((holeDepth / spacing) * (1 + 1e-9));
  return Float64Array.from({ length: readings }, (_, i) => (i + 1) * spacing);
}
