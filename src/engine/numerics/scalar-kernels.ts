import type { Kernels, Room } from "./kernels.js";
import { backwardTiles, factorTiles, forwardTiles } from "./scalar-banded.js";

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
  };
}

function viewsOf(bytes: ArrayBuffer): Room {
  return { doubles: new Float64Array(bytes), ints: new Int32Array(bytes) };
}
