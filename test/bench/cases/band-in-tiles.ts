import { bandEnvelope, placeInEnvelope, type BandEnvelope } from "../../../src/engine/numerics/band-envelope.js";

/** A band given row by row (columns i - half ... i), in the places that ours has for it. */
export function bandInTiles(band: Float64Array, n: number, half: number): { envelope: BandEnvelope; tiles: Float64Array } {
  const envelope = bandEnvelope(Int32Array.from({ length: n }, (_, i) => Math.max(0, i - half)));
  const tiles = new Float64Array(envelope.size);
  for (let i = 0; i < n; i++) for (let j = Math.max(0, i - half); j <= i; j++) tiles[placeInEnvelope(envelope, i, j)] = band[i * half + half + j];
  return { envelope, tiles };
}
