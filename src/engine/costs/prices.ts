import { requireDomain } from "../numerics/domain-error.js";

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
  /** chance that surprises are noticed while piling: then all of them are put right, else all settle */
  readonly foundShare: number;
}

/**
 * Price of an investigation, with the days that its holes hold up the programme.
 *
 * @param prices  the price list
 * @param count  number of holes, >= 0; with none nothing is mobilised and nothing reported
 * @param holeDepth  depth of each hole, m, >= 0
 * @param readingsPerHole  number of readings in each hole, >= 0
 * @returns money
 * @throws {DomainError} an argument is negative or not finite
 */
export function investigationCost(prices: Prices, count: number, holeDepth: number, readingsPerHole: number): number {
  requireDomain(Number.isInteger(count) && count >= 0, "Number of holes", count, "a whole number, 0 or above");
  requireDomain(holeDepth >= 0 && holeDepth < Infinity, "Depth of a hole", holeDepth, "0 m or above");
  requireDomain(readingsPerHole >= 0 && readingsPerHole < Infinity, "Number of readings in a hole", readingsPerHole, "0 or above");
  if (count === 0) return 0;
  const hole = prices.perHole + prices.perHoleMetre * holeDepth + prices.perReading * readingsPerHole + prices.daysPerHole * prices.waitingDay;
  return prices.mobilisation + count * hole + prices.report;
}

/**
 * Price of the piles.
 *
 * @param prices  the price list
 * @param pileCount  number of piles, >= 0; with none no rig comes
 * @param totalMetres  length of all piles together, m, >= 0
 * @returns money
 * @throws {DomainError} an argument is negative or not finite
 */
export function foundationCost(prices: Prices, pileCount: number, totalMetres: number): number {
  requireDomain(Number.isInteger(pileCount) && pileCount >= 0, "Number of piles", pileCount, "a whole number, 0 or above");
  requireDomain(totalMetres >= 0 && totalMetres < Infinity, "Metres of pile", totalMetres, "0 m or above");
  return pileCount === 0 ? 0 : prices.rig + pileCount * prices.perPile + totalMetres * prices.perPileMetre;
}

/**
 * Carbon of the concrete of solid round piles.
 *
 * @param prices  the price list, of which the carbon of a cubic metre is used
 * @param diameter  of the piles, m, > 0
 * @param totalMetres  length of all piles together, m, >= 0
 * @returns kg CO2e
 * @throws {DomainError} an argument is out of range
 */
export function concreteCarbon(prices: Prices, diameter: number, totalMetres: number): number {
  requireDomain(diameter > 0 && diameter < Infinity, "Pile diameter", diameter, "above 0 m");
  requireDomain(totalMetres >= 0 && totalMetres < Infinity, "Metres of pile", totalMetres, "0 m or above");
  return prices.carbonPerCubicMetre * (Math.PI / 4) * diameter ** 2 * totalMetres;
}
