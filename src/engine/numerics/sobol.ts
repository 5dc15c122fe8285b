import type { Stream } from "../random/stream.js";
import { requireDomain } from "./domain-error.js";
import { JOE_KUO } from "./joe-kuo.js";
import { normalQuantile } from "./normal.js";

/**
 * Points of the Sobol sequence in the unit cube, from its start.
 *
 * With a stream the points are scrambled: every node of the binary tree of each dimension is turned over or not at random
 * (nested uniform scrambling), which keeps the evenness of the sequence and makes each single point uniform. A dimension's
 * numbers do not depend on how many dimensions follow it.
 *
 * @param dimensions  1 to 256
 * @param count  number of points, 1 to 2^20; a power of 2 is best
 * @param random  stream that scrambles; without it the plain sequence, whose first point is 0
 * @returns coordinates, dimensions x count, one dimension's points contiguous; scrambled ones lie in the open interval (0, 1)
 * @throws {DomainError} an argument is out of range
 * @source Joe & Kuo (2008), SIAM J. Sci. Comput. 30(5); Owen (1995), Randomly permuted (t,m,s)-nets and (t,s)-sequences
 */
export function sobolPoints(dimensions: number, count: number, random?: Stream): Float64Array {
  requireDomain(Number.isInteger(dimensions) && dimensions >= 1 && dimensions <= 256, "Number of dimensions", dimensions, "a whole number from 1 to 256");
  requireDomain(Number.isInteger(count) && count >= 1 && count <= 1048576, "Number of points", count, "a whole number from 1 to 2^20");
  const bits = 32 - Math.clz32(count - 1);
  const size = 1 << bits;
  const points = new Float64Array(dimensions * count);
  for (let dimension = 0; dimension < dimensions; dimension++) {
    const directions = directionNumbers(dimension, bits);
    const turned = random === undefined ? undefined : randomTree(bits, random);
    let place = 0;
    for (let i = 0, p = dimension * count; i < count; i++, p++) {
      if (i > 0) place ^= directions[31 - Math.clz32(i & -i)];
      // Below the last level of the tree each point has its own branch, so the remaining digits are independent.
      points[p] = (random === undefined ? place : turned![place] + ((random.word() >>> 0) + 0.5) / 4294967296) / size;
    }
  }
  return points;
}

/**
 * Scrambled Sobol points mapped to independent standard normal variates.
 *
 * @param dimensions  1 to 256
 * @param count  number of points, 1 to 2^20; a power of 2 is best
 * @param random  stream that scrambles
 * @returns variates, dimensions x count, one dimension's values contiguous
 * @throws {DomainError} an argument is out of range
 */
export function sobolNormals(dimensions: number, count: number, random: Stream): Float64Array {
  const points = sobolPoints(dimensions, count, random);
  for (let i = 0; i < points.length; i++) points[i] = normalQuantile(points[i]);
  return points;
}

/** Direction numbers as whole numbers of `bits` binary digits. */
function directionNumbers(dimension: number, bits: number): Int32Array {
  const directions = new Int32Array(bits);
  if (dimension === 0) return directions.map((_, k) => 1 << (bits - 1 - k));
  const [polynomial, ...initial] = JOE_KUO[dimension - 1];
  const degree = initial.length;
  // v_k = m_k 2^(30 - k) in 31 digits, cut to `bits` at the end.
  const full = new Int32Array(Math.max(bits, degree));
  for (let k = 0; k < full.length; k++) {
    if (k < degree) full[k] = initial[k] << (30 - k);
    else {
      full[k] = full[k - degree] ^ (full[k - degree] >> degree);
      for (let c = 1; c < degree; c++) if ((polynomial >> (degree - c)) & 1) full[k] ^= full[k - c];
    }
  }
  return directions.map((_, k) => full[k] >> (31 - bits));
}

/** Where each of the 2^bits places of an interval goes when every node of the binary tree above them is turned over at random. */
function randomTree(bits: number, random: Stream): Int32Array {
  const places = new Int32Array(1 << bits);
  for (let level = 0; level < bits; level++) {
    let word = 0;
    // Highest first, so that a node is read before its first child overwrites it.
    for (let node = (1 << level) - 1; node >= 0; node--) {
      if ((((1 << level) - 1 - node) & 31) === 0) word = random.word();
      const turn = word & 1;
      word >>>= 1;
      const place = places[node] * 2;
      places[2 * node] = place + turn;
      places[2 * node + 1] = place + 1 - turn;
    }
  }
  return places;
}
