import { sobolPoints, sobolNormals } from "../numerics/sobol.js";
import { stream } from "../random/stream.js";
import { totalDraws } from "./design-law.js";
import { Remembered } from "./remembered.js";

const known = new Remembered<Float64Array>(6);
/** Dimensions that the quasi-random sequence serves; the rest, the least weighty ones, are plain random numbers. */
const quasiRandom = 256;

/**
 * Numbers behind the draws of the ground, block after block, in each block dimension by dimension: two standard normals a pile, then a
 * uniform a pile where surprises may be found. The ground's own come first, because the sequence is best there.
 *
 * @param piles    number of piles
 * @param uniforms whether the uniforms are wanted
 * @param block    draws a block; divides the number of draws
 * @param seed     of the scrambling
 * @returns        (draws / block) x dimensions x block
 */
export function standardDraws(piles: number, uniforms: boolean, block: number, seed: string): Float64Array {
  return known.get(JSON.stringify([piles, uniforms, block, seed]), () => {
    const dimensions = piles * (uniforms ? 3 : 2);
    const values = new Float64Array(dimensions * totalDraws);
    const put = (columns: Float64Array, first: number): void => {
      for (let at = 0; at < columns.length; at++) {
        const draw = at % totalDraws;
        values[(Math.floor(draw / block) * dimensions + first + Math.floor(at / totalDraws)) * block + (draw % block)] = columns[at];
      }
    };
    const normals = Math.min(2 * piles, quasiRandom);
    put(sobolNormals(normals, totalDraws, stream(seed, 0)), 0);
    const rest = stream(seed, 1);
    put(Float64Array.from({ length: (2 * piles - normals) * totalDraws }, () => rest.normal()), normals);
    if (uniforms) {
      const columns = Math.min(piles, quasiRandom);
      put(sobolPoints(columns, totalDraws, stream(seed, 2)), 2 * piles);
      put(Float64Array.from({ length: (piles - columns) * totalDraws }, () => rest.uniform()), 2 * piles + columns);
    }
    return values;
  });
}
