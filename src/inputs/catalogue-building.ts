import type { InputEntry } from "./entry.js";
import { MOST_DAMAGE_ROWS, MOST_PILES } from "./limits.js";

const FARTHEST = 1e7; // m: national grid coordinates are welcome

/** Inputs of the section Building: where the piles stand, what they carry, what the building is worth and what bends it. */
export const BUILDING = [
  {
    id: "pilesAlongX", label: "Piles along x", section: "Building", kind: "number", unit: "", minimum: 1, maximum: MOST_PILES, zero: "refused", whole: true, insteadOf: "pileList",
    help: "Number of piles in a row of the grid along x. The first pile stands at (0, 0).",
  },
  {
    id: "pilesAlongY", label: "Piles along y", section: "Building", kind: "number", unit: "", minimum: 1, maximum: MOST_PILES, zero: "refused", whole: true, insteadOf: "pileList",
    help: "Number of rows of the grid along y.",
  },
  {
    id: "spacingAlongX", label: "Spacing along x", section: "Building", kind: "length", unit: "m", minimum: 0.3, maximum: 100, zero: "refused", insteadOf: "pileList",
    help: "Distance of neighbouring piles along x, centre to centre.",
  },
  {
    id: "spacingAlongY", label: "Spacing along y", section: "Building", kind: "length", unit: "m", minimum: 0.3, maximum: 100, zero: "refused", insteadOf: "pileList", automatic: "the spacing along x",
    help: "Distance of neighbouring piles along y, centre to centre. Left out: as along x.",
  },
  {
    id: "interiorLoad", label: "Interior load", section: "Building", kind: "force", unit: "kN", minimum: 1, maximum: 100000, zero: "refused", insteadOf: "pileList",
    help: "Working load of a pile inside the grid.",
  },
  {
    id: "edgeLoadShare", label: "Edge load share", section: "Building", kind: "ratio", unit: "ratio", minimum: 0.05, maximum: 5, zero: "refused", fallback: 0.75, insteadOf: "pileList",
    help: "Load of a pile on one edge of the grid over the interior load: 0.5 by plan area alone, more where the edge carries walls.",
  },
  {
    id: "cornerLoadShare", label: "Corner load share", section: "Building", kind: "ratio", unit: "ratio", minimum: 0.05, maximum: 5, zero: "refused", fallback: 0.5625, insteadOf: "pileList",
    help: "Load of a corner pile over the interior load: 0.25 by plan area alone, more where the edges carry walls.",
  },
  {
    id: "pileList", label: "Pile list", section: "Building", kind: "list", unit: "", zero: "refused", automatic: "the grid", maximumRows: MOST_PILES,
    columns: [
      { name: "Pile", also: ["no", "number", "name"], kind: "name", unit: "", minimum: 0, maximum: 0, zero: "accepted", optional: true },
      { name: "x", also: ["easting"], kind: "length", unit: "m", minimum: -FARTHEST, maximum: FARTHEST, zero: "accepted", optional: false },
      { name: "y", also: ["northing"], kind: "length", unit: "m", minimum: -FARTHEST, maximum: FARTHEST, zero: "accepted", optional: false },
      { name: "Load", also: ["working load"], kind: "force", unit: "kN", minimum: 1, maximum: 100000, zero: "refused", optional: false },
    ],
    help: "Instead of a grid: a row for each pile with x, y and working load; a first column with its name or number is welcome.",
  },
  {
    id: "footprintLength", label: "Footprint length", section: "Building", kind: "length", unit: "m", minimum: 1, maximum: 10000, zero: "refused", automatic: "outline of the piles along x and one pile spacing",
    help: "Length along x of the rectangle in which holes are placed automatically, centred on the piles. Left out: the outline of the piles and half a spacing on either side.",
  },
  {
    id: "footprintWidth", label: "Footprint width", section: "Building", kind: "length", unit: "m", minimum: 1, maximum: 10000, zero: "refused", automatic: "outline of the piles along y and one pile spacing",
    help: "Width along y of the rectangle in which holes are placed automatically, centred on the piles.",
  },
  {
    id: "buildingValue", label: "Building value", section: "Building", kind: "money", unit: "money", minimum: 0.01, maximum: 1e12, zero: "none", per: "building",
    help: "What is at stake: the value that damage takes its share of. Repair never costs more than this.",
  },
  {
    id: "damageList", label: "Damage list", section: "Building", kind: "list", unit: "", zero: "refused", automatic: "1/500: 0, 1/300: 0.10, 1/150: 1", maximumRows: MOST_DAMAGE_ROWS,
    columns: [
      { name: "Distortion", also: ["angular distortion"], kind: "distortion", unit: "", minimum: 0.00001, maximum: 0.1, zero: "refused", optional: false },
      { name: "Share", also: ["share of value", "damage", "damage share", "share of the building value"], kind: "ratio", unit: "ratio", minimum: 0, maximum: 1, zero: "accepted", optional: false },
    ],
    help: "Rows of angular distortion (1/300, 0.00333) and the share of the building value that it costs to put right, growing together; the first share is 0. Between rows the share is interpolated; beyond the last it stays.",
  },
  {
    id: "allowableSettlement", label: "Allowable settlement", section: "Building", kind: "length", unit: "mm", minimum: 1, maximum: 500, zero: "refused",
    help: "Settlement of a pile head under its working load that the design allows. The pile is made as long as this needs at the design value.",
  },
] as const satisfies readonly InputEntry[];
