import { designLength, randolphWrothSettlement } from "../engine/index.js";
import { InputError } from "../inputs/index.js";
import { kilonewtons, kilopascals, metres } from "../units/quantities.js";
import { fromInner, readUnit, toInner } from "../units/read-unit.js";
import type { Unit, UnitKind } from "../units/unit-table.js";
import { answer, NoAnswer } from "./answer.js";
import { above0, numberFrom, optionalNumberFrom } from "./arguments.js";

/**
 * Settlement in mm of one floating pile in uniform ground under its load (Randolph and Wroth 1978, compressible pile).
 * @customfunction SETTLEMENT
 * @param load_kN Load at the head, kN.
 * @param length_m Length of the pile, m.
 * @param diameter_m Diameter of the pile, m.
 * @param soil_MPa Young's modulus of the ground, MPa.
 * @param pile_GPa Young's modulus of the pile, GPa.
 * @param [poisson] Poisson's ratio of the ground, 0 to below 0.5; 0.3 if left out.
 * @source Randolph & Wroth (1978), Analysis of deformation of vertically loaded piles, ASCE J. Geotech. Engng Div. 104 (GT12).
 */
export function pileSettlement(load_kN: any, length_m: any, diameter_m: any, soil_MPa: any, pile_GPa: any, poisson?: any): number {
  return answer(() => {
    const settlement = randolphWrothSettlement(
      kilonewtons(numberFrom(load_kN, "Load", above0("load", "kN"))),
      metres(numberFrom(length_m, "Length", above0("length", "m"))),
      metres(numberFrom(diameter_m, "Diameter", above0("diameter", "m"))),
      kilopascals(toInner(numberFrom(soil_MPa, "Soil modulus", above0("Young's modulus", "MPa")), MEGAPASCAL)),
      kilopascals(toInner(numberFrom(pile_GPa, "Pile modulus", above0("Young's modulus", "GPa")), GIGAPASCAL)),
      optionalNumberFrom(poisson, "Poisson's ratio", POISSON) ?? 0.3,
    );
    return fromInner(settlement, MILLIMETRE);
  });
}

/**
 * Shortest pile in m whose settlement in uniform ground is allowable (Randolph and Wroth 1978); #N/A if even the longest is not.
 * @customfunction DESIGNLENGTH
 * @param load_kN Load at the head, kN.
 * @param diameter_m Diameter of the pile, m.
 * @param soil_MPa Young's modulus of the ground, MPa.
 * @param pile_GPa Young's modulus of the pile, GPa.
 * @param allowable_mm Allowable settlement, mm.
 * @param [poisson] Poisson's ratio of the ground, 0 to below 0.5; 0.3 if left out.
 * @param [shortest_m] Shortest pile considered, m; 3 if left out.
 * @param [longest_m] Longest pile considered, m; 60 if left out.
 * @source Randolph & Wroth (1978), Analysis of deformation of vertically loaded piles, ASCE J. Geotech. Engng Div. 104 (GT12), solved for the length.
 */
export function settlementLength(load_kN: any, diameter_m: any, soil_MPa: any, pile_GPa: any, allowable_mm: any, poisson?: any, shortest_m?: any, longest_m?: any): number {
  return answer(() => {
    const allowed = numberFrom(allowable_mm, "Allowable settlement", above0("settlement", "mm"));
    const shortest = optionalNumberFrom(shortest_m, "Shortest length", above0("length", "m")) ?? 3;
    const longest = optionalNumberFrom(longest_m, "Longest length", above0("length", "m")) ?? 60;
    if (longest < shortest) throw new InputError(`Longest length is ${longest} m, below the shortest of ${shortest} m.`);
    const design = designLength({
      load: kilonewtons(numberFrom(load_kN, "Load", above0("load", "kN"))),
      diameter: metres(numberFrom(diameter_m, "Diameter", above0("diameter", "m"))),
      soilModulus: kilopascals(toInner(numberFrom(soil_MPa, "Soil modulus", above0("Young's modulus", "MPa")), MEGAPASCAL)),
      pileModulus: kilopascals(toInner(numberFrom(pile_GPa, "Pile modulus", above0("Young's modulus", "GPa")), GIGAPASCAL)),
      allowable: metres(toInner(allowed, MILLIMETRE)),
      poisson: optionalNumberFrom(poisson, "Poisson's ratio", POISSON) ?? 0.3,
      shortest: metres(shortest),
      longest: metres(longest),
    });
    if (!design.allowable) throw new NoAnswer(`No pile from ${shortest} to ${longest} m settles ${allowed} mm or less under this load.`);
    return design.length;
  });
}

const POISSON = { words: "a ratio from 0 to below 0.5", holds: (value: number) => value >= 0 && value < 0.5 };
const MEGAPASCAL = unit("MPa", "pressure");
const GIGAPASCAL = unit("GPa", "pressure");
const MILLIMETRE = unit("mm", "length");

function unit(symbol: string, kind: UnitKind): Unit {
  return readUnit(symbol, kind) as Unit;
}
