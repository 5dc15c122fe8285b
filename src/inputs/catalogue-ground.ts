import type { InputEntry } from "./entry.js";
import { LARGEST_COV, MOST_LAYERS } from "./limits.js";

/** Inputs of the section Ground. Stiffness is Young's modulus, drained or undrained, whichever the settlement is to be. */
export const GROUND = [
  {
    id: "meanStiffness", label: "Mean stiffness", section: "Ground", kind: "pressure", unit: "MPa", minimum: 0.05, maximum: 20000, zero: "refused", insteadOf: "layerList",
    help: "Mean Young's modulus of the ground at pile head level, before any hole is drilled: drained for long-term settlement, undrained for what comes at once.",
  },
  {
    id: "stiffnessCov", label: "Stiffness COV", section: "Ground", kind: "ratio", unit: "ratio", minimum: 0.01, maximum: LARGEST_COV, zero: "none", usual: "0.1 to 1", insteadOf: "layerList",
    help: "Coefficient of variation of the modulus from place to place about its mean: standard deviation over mean. Published values run from 0.1 to 0.7.",
  },
  {
    id: "stiffnessIncrease", label: "Increase with depth", section: "Ground", kind: "pressurePerLength", unit: "MPa/m", minimum: 0, maximum: 1000, zero: "accepted", fallback: 0, insteadOf: "layerList",
    help: "How much the mean modulus grows with each metre of depth. Blank or 0: it does not grow.",
  },
  {
    id: "horizontalScale", label: "Horizontal scale", section: "Ground", kind: "length", unit: "m", minimum: 0.5, maximum: 10000, zero: "refused",
    help: "Scale of fluctuation along the ground: within about this distance two places are alike. It is twice the integral scale, and for the Markov form twice the autocorrelation distance.",
  },
  {
    id: "verticalScale", label: "Vertical scale", section: "Ground", kind: "length", unit: "m", minimum: 0.1, maximum: 1000, zero: "refused",
    help: "Scale of fluctuation with depth. Published means run from 0.3 m to 6 m; it is mostly far shorter than the horizontal one.",
  },
  {
    id: "correlation", label: "Correlation", section: "Ground", kind: "choice", unit: "", zero: "refused", fallback: "markov",
    choices: [
      { value: "markov", text: "separable Markov", also: ["markov", "separable", "exponential", "separable exponential"] },
      { value: "ellipsoidal", text: "ellipsoidal Markov", also: ["ellipsoidal", "ellipsoidal exponential"] },
      { value: "gaussian", text: "Gaussian", also: ["squared exponential"] },
      { value: "spherical", text: "spherical", also: [] },
      { value: "markov2", text: "second-order Markov", also: ["markov2", "second order markov"] },
    ],
    help: "How likeness fades with distance: separable Markov (the default), ellipsoidal Markov, Gaussian, spherical or second-order Markov.",
  },
  {
    id: "regionalCov", label: "Regional COV", section: "Ground", kind: "ratio", unit: "ratio", minimum: 0.01, maximum: LARGEST_COV, zero: "accepted", usual: "0.1 to 0.6", fallback: 0,
    help: "How far the mean of this very site may lie from the assumed mean before any hole is drilled, as a COV. Blank or 0: the mean is taken as known, so the first hole is worth less.",
  },
  {
    id: "poissonRatio", label: "Poisson's ratio", section: "Ground", kind: "ratio", unit: "ratio", minimum: 0.01, maximum: 0.49, zero: "refused", fallback: 0.3,
    help: "Poisson's ratio of the ground: 0.2 to 0.35 drained, 0.49 undrained.",
  },
  {
    id: "layerList", label: "Layer list", section: "Ground", kind: "list", unit: "", zero: "refused", automatic: "one layer, from Mean stiffness, Stiffness COV and Increase with depth", maximumRows: MOST_LAYERS,
    columns: [
      { name: "Top", also: ["top depth", "depth", "depth of top"], kind: "length", unit: "m", minimum: 0, maximum: 500, zero: "accepted", optional: false },
      { name: "Mean", also: ["mean stiffness", "stiffness", "modulus"], kind: "pressure", unit: "MPa", minimum: 0.05, maximum: 20000, zero: "refused", optional: false },
      { name: "Increase", also: ["increase with depth"], kind: "pressurePerLength", unit: "MPa/m", minimum: 0, maximum: 1000, zero: "accepted", optional: true },
      { name: "COV", also: ["stiffness cov"], kind: "ratio", unit: "ratio", minimum: 0.01, maximum: LARGEST_COV, zero: "accepted", optional: true },
    ],
    help: "Instead of one mean: a row for each layer, downwards, the first with its top at 0. Columns: top depth, mean modulus at the top, its increase with depth, its COV. A layer whose COV is blank takes Stiffness COV.",
  },
] as const satisfies readonly InputEntry[];
