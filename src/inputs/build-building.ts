import { hypotenuse, type Building, type DamagePoint, type PilePoint } from "../engine/index.js";
import { kilonewtons, metres } from "../units/quantities.js";
import { amount } from "./cells.js";
import { InputError } from "./input-error.js";
import { MOST_PILES } from "./limits.js";
import { refusal, rowPlace, rowWords } from "./place.js";
import type { Values } from "./values.js";

/** Damage where no list is given. @source Skempton & MacDonald (1956), The allowable settlements of buildings, Proc. ICE: 1/500 design, 1/300 first cracking, 1/150 structural damage (from memory); the shares are our own */
export const DEFAULT_DAMAGE: readonly DamagePoint[] = [{ distortion: 1 / 500, share: 0 }, { distortion: 1 / 300, share: 0.1 }, { distortion: 1 / 150, share: 1 }];

/**
 * The piles of the problem, from the list or from the grid.
 *
 * @param values  the values in force
 * @returns       places and loads, SI; the grid's first pile stands at (0, 0)
 * @throws {InputError} a single pile, too many, or two that stand in each other
 */
export function buildPiles(values: Values): PilePoint[] {
  const list = values.list("pileList");
  const piles = list === undefined ? gridPiles(values) : list.rows.map(({ values: [, x, y, load] }) => ({ x: metres(x!), y: metres(y!), load: kilonewtons(load!) }));
  const source = list === undefined ? `${values.named("pilesAlongX")} and ${values.named("pilesAlongY")} give` : `${values.named("pileList")} has`;
  if (piles.length === 1) {
    throw new InputError(`${source} a single pile: it has no neighbour, so no angular distortion and no cost of failure can be computed; give at least two piles of the foundation.`);
  }
  if (piles.length > MOST_PILES) throw new InputError(`${source} ${piles.length} piles; at most ${MOST_PILES} are priced at once, so give a typical part of the foundation.`);
  const diameter = values.number("pileDiameter");
  for (let i = 0; i < piles.length; i++) {
    for (let j = 0; j < i; j++) {
      const apart = hypotenuse(piles[i]!.x - piles[j]!.x, piles[i]!.y - piles[j]!.y);
      if (apart >= diameter * (1 - 1e-9)) continue; // piles that touch are walls, and allowed
      const names = list === undefined ? `piles ${j + 1} and ${i + 1} of the grid` : `piles ${j + 1} and ${i + 1} of the pile list (rows ${list.rows[j]!.row} and ${list.rows[i]!.row} of the site block)`;
      throw new InputError(apart === 0 ? `${sentence(names)} stand in one place; give each pile its own.`
        : `${sentence(names)} stand ${amount(apart)} m apart, less than ${values.named("pileDiameter")} of ${amount(diameter)} m; move them apart or make them thinner.`);
    }
  }
  return piles;
}

/**
 * The building of the problem.
 *
 * @param values  the values in force
 * @param piles   its piles
 * @returns       piles, footprint, value, damage and allowable settlement, SI
 * @throws {InputError} a damage list that does not grow
 */
export function buildBuilding(values: Values, piles: readonly PilePoint[]): Building {
  return {
    piles,
    footprint: buildFootprint(values, piles),
    value: values.number("buildingValue"),
    damage: buildDamage(values),
    allowableSettlement: metres(values.number("allowableSettlement")),
  };
}

function gridPiles(values: Values): PilePoint[] {
  const alongX = values.number("pilesAlongX");
  const alongY = values.number("pilesAlongY");
  const spacingX = values.number("spacingAlongX");
  const spacingY = values.optional("spacingAlongY") ?? spacingX;
  const interior = values.number("interiorLoad");
  const edge = interior * values.number("edgeLoadShare");
  const corner = interior * values.number("cornerLoadShare");
  const piles: PilePoint[] = [];
  for (let j = 0; j < alongY; j++) {
    for (let i = 0; i < alongX; i++) {
      const edges = Number(alongX > 1 && (i === 0 || i === alongX - 1)) + Number(alongY > 1 && (j === 0 || j === alongY - 1));
      piles.push({ x: metres(i * spacingX), y: metres(j * spacingY), load: kilonewtons([interior, edge, corner][edges]!) });
    }
  }
  return piles;
}

/** Outline of the piles and half a spacing on either side; the spacing is the middle one of the distances to the nearest pile. */
function buildFootprint(values: Values, piles: readonly PilePoint[]): Building["footprint"] {
  const margin = middleSpacing(piles);
  const along = (pick: (pile: PilePoint) => number) => Math.max(1, Math.max(...piles.map(pick)) - Math.min(...piles.map(pick)) + margin);
  return {
    length: metres(values.optional("footprintLength") ?? along(({ x }) => x)),
    width: metres(values.optional("footprintWidth") ?? along(({ y }) => y)),
  };
}

function middleSpacing(piles: readonly PilePoint[]): number {
  const nearest = piles.map((pile) => {
    let least = Infinity;
    for (const other of piles) if (other !== pile) least = Math.min(least, (other.x - pile.x) ** 2 + (other.y - pile.y) ** 2);
    return least;
  }).sort((a, b) => a - b);
  return Math.sqrt(nearest[nearest.length >> 1]!);
}

function buildDamage(values: Values): readonly DamagePoint[] {
  const list = values.list("damageList");
  if (list === undefined) return DEFAULT_DAMAGE;
  const points = list.rows.map(({ values: [distortion, share] }) => ({ distortion: distortion!, share: share! }));
  if (points.length < 2) throw refusal(values.place("damageList"), "has one row; at least two are needed: where damage begins (share 0), and a larger distortion with its share");
  list.rows.forEach(({ row }, index) => {
    const { distortion, share } = points[index]!;
    if (index === 0) {
      if (share !== 0) throw refusal(rowPlace("Damage list, Share", row), `is ${amount(share)}; the first row says where damage begins, so its share is 0`);
      return;
    }
    const before = points[index - 1]!;
    if (!(distortion > before.distortion)) throw refusal(rowPlace("Damage list, Distortion", row), `is ${fraction(distortion)}, no larger than ${fraction(before.distortion)} in ${rowWords(list.rows[index - 1]!.row)}; distortions grow from row to row`);
    if (share < before.share) throw refusal(rowPlace("Damage list, Share", row), `is ${amount(share)}, less than ${amount(before.share)} in ${rowWords(list.rows[index - 1]!.row)}; shares grow from row to row`);
  });
  return points;
}

function fraction(distortion: number): string {
  return `1/${amount(1 / distortion)}`;
}

function sentence(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
