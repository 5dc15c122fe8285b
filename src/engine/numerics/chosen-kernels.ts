import type { Kernels } from "./kernels.js";
import { scalarKernels } from "./scalar-kernels.js";
import { vectorKernels } from "./vector-kernels.js";

let chosen: Kernels | undefined;

/** The kernels of these surroundings: WebAssembly where it is there and allowed, JavaScript elsewhere. */
export function kernels(): Kernels {
  return (chosen ??= vectorKernels() ?? scalarKernels());
}
