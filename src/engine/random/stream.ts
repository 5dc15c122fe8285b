import tychei from "seedrandom/lib/tychei.js";
import { logarithm } from "../numerics/logarithm.js";

/** A source of random numbers, fixed by the seed and the path that made it and by how often it was asked. */
export interface Stream {
  /** uniform in the open interval (0, 1), 53 bits */
  uniform(): number;
  /** standard normal */
  normal(): number;
  /** 32 random bits as a signed whole number */
  word(): number;
}

/**
 * A stream of random numbers, the same for the same seed and path whatever else has been drawn.
 *
 * The path is a place in a tree (use, realisation, ...), so that results do not depend on how work is shared out.
 *
 * @param seed  the person's seed, any text
 * @param path  whole numbers that lead to this stream
 * @returns the stream, at its start
 * @source Neves & Araujo (2012), Fast and small nonlinear pseudorandom number generators for computer simulation
 *   (inverted Tyche); normals by the polar method, Marsaglia & Bray (1964)
 */
export function stream(seed: string, ...path: number[]): Stream {
  const generator = tychei([seed, ...path].join(":"));
  let spare = Number.NaN;
  return {
    uniform: () => generator.double(),
    word: () => generator.int32(),
    normal() {
      if (!Number.isNaN(spare)) {
        const value = spare;
        spare = Number.NaN;
        return value;
      }
      let u: number, v: number, square: number;
      do {
        u = 2 * generator.double() - 1;
        v = 2 * generator.double() - 1;
        square = u * u + v * v;
      } while (square >= 1 || square === 0);
      const scale = Math.sqrt((-2 * logarithm(square)) / square);
      spare = v * scale;
      return u * scale;
    },
  };
}
