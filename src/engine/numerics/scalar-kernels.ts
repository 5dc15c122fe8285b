import type { Kernels, Room } from "./kernels.js";
import { backwardTiles, factorTiles, forwardTiles } from "./scalar-banded.js";
import { addRows, largestDistortion, settle } from "./scalar-draws.js";

/** The kernels in JavaScript. */
export function scalarKernels(): Kernels {
  let room: Room = viewsOf(new ArrayBuffer(0));
  return {
    room(doubles) {
      if (room.doubles.length >= doubles) return room;
      const before = room.doubles;
      room = viewsOf(new ArrayBuffer(8 * doubles));
      room.doubles.set(before);
      return room;
    },
    factor: (tiles, rows, tileRows) => factorTiles(room.doubles, room.ints, tiles, 2 * rows, tileRows),
    forward: (tiles, rows, tileRows, firstRow, right, columns) => forwardTiles(room.doubles, room.ints, tiles, 2 * rows, tileRows, firstRow, right, columns),
    backward: (tiles, rows, tileRows, firstRow, right, columns) => backwardTiles(room.doubles, room.ints, tiles, 2 * rows, tileRows, firstRow, right, columns),
    addRows: (out, factors, count, table, draws) => addRows(room.doubles, out, factors, count, table, draws),
    settle: (ln, settlement, numbers, places, draws) => settle(room.doubles, room.ints, ln, settlement, numbers, 2 * places, draws),
    largestDistortion: (out, settlement, pairs, count, draws) => largestDistortion(room.doubles, room.ints, out, settlement, pairs, count, draws),
  };
}

function viewsOf(bytes: ArrayBuffer): Room {
  return { doubles: new Float64Array(bytes), ints: new Int32Array(bytes) };
}
