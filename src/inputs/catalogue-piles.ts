import type { InputEntry } from "./entry.js";

/** Inputs of the section Piles. */
export const PILES = [
  {
    id: "pileDiameter", label: "Pile diameter", section: "Piles", kind: "length", unit: "m", minimum: 0.1, maximum: 4, zero: "refused",
    help: "Diameter of the solid round pile; for another section, that of a circle of equal perimeter.",
  },
  {
    id: "pileModulus", label: "Pile modulus", section: "Piles", kind: "pressure", unit: "GPa", minimum: 1, maximum: 300, zero: "refused", fallback: 30,
    help: "Young's modulus of the pile as a solid section: about 30 GPa for concrete.",
  },
  {
    id: "shortestLength", label: "Shortest length", section: "Piles", kind: "length", unit: "m", minimum: 1, maximum: 150, zero: "refused",
    help: "No pile is made shorter than this, however stiff the ground seems.",
  },
  {
    id: "longestLength", label: "Longest length", section: "Piles", kind: "length", unit: "m", minimum: 1.1, maximum: 150, zero: "refused",
    help: "Reach of the rig. A design that would need more stays at this length and is counted as too short.",
  },
  {
    id: "lengthStep", label: "Length step", section: "Piles", kind: "length", unit: "m", minimum: 0, maximum: 20, zero: "accepted", fallback: 0,
    help: "Lengths are rounded up to steps of this above the shortest. Blank or 0: any length.",
  },
  {
    id: "lengthRule", label: "Length rule", section: "Piles", kind: "choice", unit: "", zero: "refused", fallback: "load",
    choices: [
      { value: "one", text: "one for all", also: ["one", "one length", "same"] },
      { value: "load", text: "one per load", also: ["load", "by load", "per load"] },
      { value: "nearest", text: "nearest hole", also: ["nearest", "by nearest hole"] },
    ],
    help: "Which piles share a length: one for all (as the heaviest needs), one per load, or each by the readings of the hole nearest to it.",
  },
  {
    id: "groupInteraction", label: "Group interaction", section: "Piles", kind: "choice", unit: "", zero: "refused", fallback: "off",
    choices: [
      { value: "off", text: "off", also: ["no", "n", "false", "none"] },
      { value: "on", text: "on", also: ["yes", "y", "true"] },
    ],
    help: "On: a pile also settles by its neighbours' loads (interaction factors), and the building bends by both. Lengths stay those of single piles; to design for the group, divide the allowable settlement by its settlement ratio.",
  },
] as const satisfies readonly InputEntry[];
