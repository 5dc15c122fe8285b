import { outcomeColumns } from "./outcome.js";
import type { SimulationTask } from "./task.js";

/** How many of each kind. */
export interface Totals {
  readonly elements: number;
  readonly form: number;
}

/**
 * Bytes that the figures of a run may take, by kind. All realisations are kept, because tables depend on their order and percentiles on
 * each of them; the thread that makes the tables holds half as much again while it looks, and stays below 300 MB.
 */
const room: Totals = { elements: 64 * 1048576, form: 96 * 1048576 };

/** Bytes about the figures of a realisation: what an array weighs by itself. */
const aboutRow = 200;

/** Realisations of each kind that a run may keep. They depend on the task alone, so that every machine ends at the same ones. */
export function mostRealisations({ variants, counts }: SimulationTask): Totals {
  const figures = variants.length * counts.length * outcomeColumns.length * Float64Array.BYTES_PER_ELEMENT;
  // One by elements has the form's figures beside its own.
  return { elements: Math.floor(room.elements / (2 * figures + aboutRow)), form: Math.floor(room.form / (figures + aboutRow)) };
}
