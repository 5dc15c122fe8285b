import { sobolNormals } from "../numerics/sobol.js";
import { stream } from "../random/stream.js";
import { totalDraws } from "./design-law.js";
import { Remembered } from "./remembered.js";

const known = new Remembered<Float64Array>(6);
/** Dimensions that the quasi-random sequence serves; the rest, the least weighty ones, are plain random numbers. */
const quasiRandom = 256;

/**
 * Numbers behind the draws of the ground, block after block, in each block dimension by dimension: two standard normals a pile. The
 * ground's own come first, because the sequence is best there.
 *
 * @param piles    number of piles
 * @param block    draws a block; divides the number of draws
 * @param seed     of the scrambling
 * @returns        (draws / block) x dimensions x block
 */
export function standardDraws(piles: number, block: number, seed: string): Float64Array {
  return known.get(JSON.stringify([piles, block, seed]), () => {
    const dimensions = 2 * piles;
    const quasi = Math.min(dimensions, quasiRandom);
    const points = sobolNormals(quasi, totalDraws, stream(seed, 0));
    const rest = stream(seed, 1);
    const values = new Float64Array(dimensions * totalDraws);
    for (let d = 0; d < dimensions; d++) {
      for (let draw = 0; draw < totalDraws; draw++) {
        values[(Math.floor(draw / block) * dimensions + d) * block + (draw % block)] = d < quasi ? points[d * totalDraws + draw] : rest.normal();
      }
    }
    return values;
  });
}
