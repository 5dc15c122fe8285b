import { sobolPoints, sobolNormals } from "../numerics/sobol.js";
import { stream } from "../random/stream.js";
import { totalDraws } from "./design-law.js";
import { Remembered } from "./remembered.js";

const known = new Remembered<Float64Array>(6);
/** Dimensions that the quasi-random sequence serves; the rest, the least weighty ones, are plain random numbers. */
const quasiRandom = 256;

/**
 * Numbers behind the draws of the ground, dimension by dimension: two standard normals a pile, then a uniform a pile where surprises
 * may be found. The ground's own come first, because the sequence is best there.
 *
 * @param piles    number of piles
 * @param uniforms whether the uniforms are wanted
 * @param seed     of the scrambling
 */
export function standardDraws(piles: number, uniforms: boolean, seed: string): Float64Array {
  return known.get(JSON.stringify([piles, uniforms, seed]), () => {
    const count = totalDraws;
    const dimensions = piles * (uniforms ? 3 : 2);
    const values = new Float64Array(dimensions * count);
    const normals = Math.min(2 * piles, quasiRandom);
    values.set(sobolNormals(normals, count, stream(seed, 0)));
    const rest = stream(seed, 1);
    for (let at = normals * count; at < 2 * piles * count; at++) values[at] = rest.normal();
    if (uniforms) {
      const columns = Math.min(piles, quasiRandom);
      values.set(sobolPoints(columns, count, stream(seed, 2)), 2 * piles * count);
      for (let at = (2 * piles + columns) * count; at < values.length; at++) values[at] = rest.uniform();
    }
    return values;
  });
}
