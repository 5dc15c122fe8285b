import { kernelCode } from "./kernel-code.js";
import type { Kernels, Room } from "./kernels.js";

/** The little that is needed of a global that not all surroundings have. */
declare const WebAssembly: { readonly Module: new (code: Uint8Array) => object; readonly Instance: new (module: object) => { readonly exports: unknown } } | undefined;

/** What the module gives: the kernels, but for their room. */
interface Exports extends Omit<Kernels, "room"> {
  readonly memory: { readonly buffer: ArrayBuffer; grow(pages: number): number };
}

const PAGE = 65536;

/**
 * The kernels in WebAssembly, two results at a time.
 *
 * @returns undefined where there is no WebAssembly, where it lacks 128-bit vectors, or where a content security policy refuses it
 */
export function vectorKernels(): Kernels | undefined {
  if (typeof WebAssembly === "undefined") return undefined;
  let exports: Exports;
  try {
    exports = new WebAssembly.Instance(new WebAssembly.Module(bytesOf(kernelCode))).exports as Exports;
  } catch {
    return undefined; // refused or not understood: JavaScript gives the same answers
  }
  const { memory, ...loops } = exports;
  let room: Room = viewsOf(memory.buffer);
  return {
    room(doubles) {
      if (room.doubles.length >= doubles) return room;
      memory.grow(Math.ceil((8 * (doubles - room.doubles.length)) / PAGE)); // takes the bytes from all earlier views
      return (room = viewsOf(memory.buffer));
    },
    ...loops,
  };
}

function viewsOf(bytes: ArrayBuffer): Room {
  return { doubles: new Float64Array(bytes), ints: new Int32Array(bytes) };
}

const SIGNS = "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";

/** Bytes of base64 without line breaks; written out, because the engine knows the language and nothing else. */
function bytesOf(text: string): Uint8Array {
  const signs = text.replace(/=+$/, "");
  const bytes = new Uint8Array((signs.length * 3) >> 2);
  let bits = 0;
  for (let k = 0, at = 0; k < signs.length; k++) {
    bits = (bits << 6) | SIGNS.indexOf(signs[k]);
    if (k % 4 > 0) bytes[at++] = bits >> (6 - 2 * (k % 4));
  }
  return bytes;
}
