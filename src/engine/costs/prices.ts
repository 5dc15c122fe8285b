/** What things cost, in the person's own money; what concrete weighs in carbon. */
export interface Prices {
  /** once for any investigation (count above 0) */
  readonly mobilisation: number;
  readonly perHole: number;
  readonly perHoleMetre: number;
  readonly perReading: number;
  /** once for any investigation (count above 0) */
  readonly report: number;
  /** programme days a hole takes, and what a day of waiting costs */
  readonly daysPerHole: number;
  readonly waitingDay: number;
  /** once: piling rig to site and back */
  readonly rig: number;
  readonly perPile: number;
  readonly perPileMetre: number;
  /** kg CO2e per cubic metre of pile concrete */
  readonly carbonPerCubicMetre: number;
}

/** What a pile that turns out too short costs in time. */
export interface Delay {
  /** cost of a day of delay on site */
  readonly dayCost: number;
  /** days that one surprise takes */
  readonly daysPerSurprise: number;
  /** a pile whose needed length exceeds its design length by more than this is a surprise, m */
  readonly surpriseTolerance: number;
  /** share of the surprises that is found while piling and put right; the rest settle */
  readonly foundShare: number;
}
