import type { InputEntry } from "./entry.js";
import { LARGEST_COUNT } from "./limits.js";

const DEAREST = 1e12;

/** Inputs of the section Prices. Money is the person's own: any currency, the same in all rows. */
export const PRICES = [
  {
    id: "mobilisation", label: "Mobilisation", section: "Prices", kind: "money", unit: "money", minimum: 0.01, maximum: DEAREST, zero: "none", fallback: 0, per: "visit",
    help: "Paid once for any investigation at all: bringing the drilling rig and taking it away.",
  },
  {
    id: "pricePerHole", label: "Price per hole", section: "Prices", kind: "money", unit: "money", minimum: 0.01, maximum: DEAREST, zero: "none", per: "hole",
    help: "Paid for each hole whatever its depth: setting up, permits, backfilling. The word none: nothing.",
  },
  {
    id: "pricePerMetreOfHole", label: "Price per metre of hole", section: "Prices", kind: "moneyPerLength", unit: "money/m", minimum: 0.01, maximum: DEAREST, zero: "none",
    help: "Paid for each metre drilled or pushed; money per foot is read too, by its unit. The word none: nothing.",
  },
  {
    id: "pricePerReading", label: "Price per reading", section: "Prices", kind: "money", unit: "money", minimum: 0.0001, maximum: DEAREST, zero: "none", fallback: 0, per: "reading",
    help: "Paid for each reading: a sample and its laboratory test, a test in the hole.",
  },
  {
    id: "report", label: "Report", section: "Prices", kind: "money", unit: "money", minimum: 0.01, maximum: DEAREST, zero: "none", fallback: 0, per: "report",
    help: "Paid once for any investigation at all: supervision, interpretation and the report.",
  },
  {
    id: "daysPerHole", label: "Days per hole", section: "Prices", kind: "days", unit: "days", minimum: 0.001, maximum: 1000, zero: "none", fallback: 0,
    help: "Days by which one more hole holds up the programme.",
  },
  {
    id: "waitingDayPrice", label: "Price of a waiting day", section: "Prices", kind: "money", unit: "money", minimum: 0.01, maximum: DEAREST, zero: "none", fallback: 0, per: "day",
    help: "Cost of each day that the job waits for the investigation.",
  },
  {
    id: "rig", label: "Piling rig", section: "Prices", kind: "money", unit: "money", minimum: 0.01, maximum: DEAREST, zero: "none", fallback: 0, per: "visit",
    help: "Paid once: bringing the piling rig and taking it away.",
  },
  {
    id: "pricePerPile", label: "Price per pile", section: "Prices", kind: "money", unit: "money", minimum: 0.01, maximum: DEAREST, zero: "none", fallback: 0, per: "pile",
    help: "Paid for each pile whatever its length: setting up, trimming, testing.",
  },
  {
    id: "pricePerMetreOfPile", label: "Price per metre of pile", section: "Prices", kind: "moneyPerLength", unit: "money/m", minimum: 0.01, maximum: DEAREST, zero: "none",
    help: "Paid for each metre of pile; money per foot is read too, by its unit. The word none: nothing.",
  },
  {
    id: "concreteCarbon", label: "Carbon of concrete", section: "Prices", kind: "massPerVolume", unit: "kg/m3", minimum: 1, maximum: 2000, zero: "none", fallback: 250,
    help: "Embodied carbon of a cubic metre of pile concrete, CO2 equivalent: 150 to 350 kg covers most structural concrete before reinforcement.",
  },
] as const satisfies readonly InputEntry[];

/** Inputs of the section Delay: what a pile that turns out too short costs in time. */
export const DELAY = [
  {
    id: "delayDayPrice", label: "Price of a delay day", section: "Delay", kind: "money", unit: "money", minimum: 0.01, maximum: DEAREST, zero: "none", fallback: 0, per: "day",
    help: "Cost of each day that piling is held up by a surprise: crew, rig, damages to the client.",
  },
  {
    id: "daysPerSurprise", label: "Days per surprise", section: "Delay", kind: "days", unit: "days", minimum: 0.001, maximum: 1000, zero: "none", fallback: 1,
    help: "Days that one surprise takes to settle.",
  },
  {
    id: "surpriseTolerance", label: "Surprise tolerance", section: "Delay", kind: "length", unit: "m", minimum: 0.01, maximum: 50, zero: "none", fallback: 1,
    help: "A pile is a surprise where the length that it needs exceeds its design length by more than this.",
  },
  {
    id: "foundShare", label: "Share found on site", section: "Delay", kind: "ratio", unit: "ratio", minimum: 0.001, maximum: 1, zero: "accepted", fallback: 0,
    help: "Chance that surprises are noticed while piling: then all of them are put right by longer piles, else all settle. Blank or 0: none is noticed.",
  },
] as const satisfies readonly InputEntry[];

/** Inputs of the section Run. */
export const RUN = [
  {
    id: "seed", label: "Seed", section: "Run", kind: "seed", unit: "", zero: "refused", fallback: "1",
    help: "Number or word that fixes the quasi-random numbers: the same seed gives the same figures.",
  },
  {
    id: "counts", label: "Counts", section: "Run", kind: "counts", unit: "", minimum: 1, maximum: LARGEST_COUNT, zero: "refused", automatic: "0 to 12, or as many as the hole list holds",
    help: "Numbers of holes that a cost table compares: the largest one (12), from and to (0 to 12), or all of them (0, 1, 2, 4, 8).",
  },
  {
    id: "resultUnits", label: "Units of results", section: "Run", kind: "choice", unit: "", zero: "refused", fallback: "SI",
    choices: [
      { value: "SI", text: "SI", also: ["metric", "si units"] },
      { value: "US", text: "US customary", also: ["us", "customary", "us units", "ft"] },
    ],
    help: "Units of lengths and carbon that functions give back: SI (m, kg) or US customary (ft, lb). Inputs are read in whatever unit stands beside them.",
  },
] as const satisfies readonly InputEntry[];
