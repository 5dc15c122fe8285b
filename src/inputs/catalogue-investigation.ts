import type { InputEntry } from "./entry.js";
import { LARGEST_COUNT, LARGEST_COV } from "./limits.js";
import { METHODS, OWN_METHOD } from "./methods.js";

const FARTHEST = 1e7; // m: national grid coordinates are welcome

/** Inputs of the section Investigation: the kind of hole, its errors, its depth, where it stands, and what is made of the readings. */
export const INVESTIGATION = [
  {
    id: "method", label: "Method", section: "Investigation", kind: "choice", unit: "", zero: "refused", fallback: METHODS[0]!.name,
    choices: [
      ...METHODS.map(({ name, also }) => ({ value: name, text: name, also })),
      { value: OWN_METHOD, text: OWN_METHOD, also: ["own covs", "other"] },
    ],
    help: "Kind of investigation, from the method table (=PROBE.METHODS()): it brings the COVs of its errors and its reading spacing. Own: all three COVs are written in their rows.",
  },
  {
    id: "readingCov", label: "Reading COV", section: "Investigation", kind: "ratio", unit: "ratio", minimum: 0.001, maximum: LARGEST_COV, zero: "none", usual: "0.05 to 0.3", automatic: "from the method table", automaticWords: ["method", "from method", "from the method", "from the method table"],
    help: "Error that is new at each reading, as a COV. Left out: from the method table.",
  },
  {
    id: "holeCov", label: "Hole COV", section: "Investigation", kind: "ratio", unit: "ratio", minimum: 0.001, maximum: LARGEST_COV, zero: "none", usual: "0.05 to 0.3", automatic: "from the method table", automaticWords: ["method", "from method", "from the method", "from the method table"],
    help: "Error that all readings of one hole share (rig, crew, set-up), as a COV. Left out: from the method table.",
  },
  {
    id: "methodCov", label: "Method COV", section: "Investigation", kind: "ratio", unit: "ratio", minimum: 0.001, maximum: LARGEST_COV, zero: "none", usual: "0.1 to 0.6", automatic: "from the method table", automaticWords: ["method", "from method", "from the method", "from the method table"],
    help: "Error that all holes share (the step from what is measured to Young's modulus), as a COV. No number of holes averages it out. Left out: from the method table.",
  },
  {
    id: "readingSpacing", label: "Reading spacing", section: "Investigation", kind: "length", unit: "m", minimum: 0.05, maximum: 20, zero: "refused", automatic: "usual for the method", automaticWords: ["method", "from method", "from the method", "from the method table"],
    help: "Distance of readings in depth. Left out: usual for the method.",
  },
  {
    id: "holeDepth", label: "Hole depth", section: "Investigation", kind: "length", unit: "m", minimum: 0.5, maximum: 300, zero: "refused",
    help: "Depth of a hole below pile head level. Codes ask for several metres below the pile tips.",
  },
  {
    id: "holeList", label: "Hole list", section: "Investigation", kind: "list", unit: "", zero: "refused", automatic: "automatic positions within the footprint", maximumRows: LARGEST_COUNT,
    columns: [
      { name: "Hole", also: ["no", "number", "name"], kind: "name", unit: "", minimum: 0, maximum: 0, zero: "accepted", optional: true },
      { name: "x", also: ["easting"], kind: "length", unit: "m", minimum: -FARTHEST, maximum: FARTHEST, zero: "accepted", optional: false },
      { name: "y", also: ["northing"], kind: "length", unit: "m", minimum: -FARTHEST, maximum: FARTHEST, zero: "accepted", optional: false },
    ],
    help: "A row for each hole with x and y; a count of n uses the first n rows. A first column with its name or number is welcome. Left out: holes are placed automatically within the footprint.",
  },
  {
    id: "designRule", label: "Design rule", section: "Investigation", kind: "choice", unit: "", zero: "refused", fallback: "geometric",
    choices: [
      { value: "geometric", text: "geometric mean", also: ["geometric"] },
      { value: "arithmetic", text: "arithmetic mean", also: ["arithmetic", "mean"] },
      { value: "harmonic", text: "harmonic mean", also: ["harmonic"] },
      { value: "quartile", text: "lower quartile", also: ["quartile"] },
      { value: "lessdeviations", text: "mean less deviations", also: ["less deviations", "mean less k deviations", "mean less standard deviations"] },
    ],
    help: "How the one design value is made from all readings: geometric, arithmetic or harmonic mean, lower quartile, or mean less deviations.",
  },
  {
    id: "deviationsBelowMean", label: "Deviations below mean", section: "Investigation", kind: "number", unit: "", minimum: 0.01, maximum: 5, zero: "none", fallback: 0.5,
    help: "For the rule mean less deviations: how many standard deviations of the log readings the design value lies below their mean.",
  },
  {
    id: "regionalUpdate", label: "Regional update", section: "Investigation", kind: "choice", unit: "", zero: "refused", fallback: "yes",
    choices: [
      { value: "yes", text: "yes", also: ["true", "y", "on"] },
      { value: "no", text: "no", also: ["false", "n", "off"] },
    ],
    help: "Yes: readings and the assumed mean are weighed by how sure each is, wherever a Regional COV is given. No: the design rule takes the readings as they are.",
  },
] as const satisfies readonly InputEntry[];
