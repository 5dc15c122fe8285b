import {
  KILOGRAMS_PER_POUND, METRES_PER_FOOT, METRES_PER_INCH, NEWTONS_PER_KILOGRAM_FORCE, NEWTONS_PER_POUND_FORCE,
} from "./factors.js";

/** What a unit measures. Money is free text and has its own reader. */
export type UnitKind = "length" | "pressure" | "force" | "pressurePerLength" | "ratio" | "days" | "massPerVolume" | "number";

/**
 * One unit: value x multiply / divide is the value in the inner unit of its kind (m, kPa, kN, kPa/m, ratio, days, kg/m3).
 * Two numbers, because x / 1000 is rounded once and x * 0.001 twice: 9 mm must be the very number 0.009.
 */
export interface Unit {
  readonly kind: UnitKind;
  /** as shown to people */
  readonly symbol: string;
  readonly multiply: number;
  readonly divide: number;
  /** other spellings, in lower case without spaces */
  readonly spellings: readonly string[];
  /** offered in lists of accepted units; the rest are read but not advertised */
  readonly common: boolean;
}

const unit = (kind: UnitKind, symbol: string, multiply: number, divide: number, spellings: readonly string[] = [], common = true): Unit =>
  ({ kind, symbol, multiply, divide, spellings, common });

const SQUARE_FOOT = METRES_PER_FOOT ** 2;
const SQUARE_INCH = METRES_PER_INCH ** 2;
const KIP = NEWTONS_PER_POUND_FORCE; // kN, because a kip is a thousand pounds-force

/** The order is the order in which units are offered. */
const LENGTHS = [
  unit("length", "m", 1, 1, ["metre", "metres", "meter", "meters"]),
  unit("length", "mm", 1, 1000, ["millimetre", "millimetres", "millimeter", "millimeters"]),
  unit("length", "cm", 1, 100, ["centimetre", "centimetres", "centimeter", "centimeters"]),
  unit("length", "ft", METRES_PER_FOOT, 1, ["foot", "feet", "'"]),
  unit("length", "in", METRES_PER_INCH, 1, ["inch", "inches", '"']),
];

const PRESSURES = [
  unit("pressure", "kPa", 1, 1, ["kn/m2"]),
  unit("pressure", "MPa", 1000, 1, ["n/mm2", "mn/m2"]),
  unit("pressure", "GPa", 1e6, 1, ["kn/mm2", "gn/m2"]),
  unit("pressure", "Pa", 1, 1000, ["n/m2"]),
  unit("pressure", "psf", NEWTONS_PER_POUND_FORCE, 1000 * SQUARE_FOOT, ["lb/ft2", "lbf/ft2"]),
  unit("pressure", "ksf", KIP, SQUARE_FOOT, ["kip/ft2", "kips/ft2"]),
  unit("pressure", "psi", NEWTONS_PER_POUND_FORCE, 1000 * SQUARE_INCH, ["lb/in2", "lbf/in2"]),
  unit("pressure", "ksi", KIP, SQUARE_INCH, ["kip/in2", "kips/in2"]),
  unit("pressure", "tsf", 2 * KIP, SQUARE_FOOT, ["tonf/ft2"]), // the ton of tsf is the US (short) ton of 2,000 lbf
];

const FORCES = [
  unit("force", "kN", 1, 1, ["kilonewton", "kilonewtons"]),
  unit("force", "MN", 1000, 1, ["meganewton", "meganewtons"]),
  unit("force", "N", 1, 1000, ["newton", "newtons"]),
  unit("force", "kip", KIP, 1, ["kips"]),
  unit("force", "lbf", NEWTONS_PER_POUND_FORCE, 1000, ["lb", "lbs"]),
  unit("force", "tonf US", 2 * KIP, 1, ["tonf", "tonsf", "ustonf", "tonfshort", "shorttonf"]), // 2,000 lbf
  unit("force", "tonf UK", 2.24 * KIP, 1, ["uktonf", "tonflong", "longtonf"]), // 2,240 lbf
  unit("force", "tf", NEWTONS_PER_KILOGRAM_FORCE, 1, ["tonfmetric", "metrictonf", "tonnef"]), // 1,000 kgf
];

const RATIOS = [
  unit("ratio", "ratio", 1, 1, ["-", "1", "fraction", "none", "share"]),
  unit("ratio", "%", 1, 100, ["percent", "percentage", "pct"]),
];

const DAYS = [unit("days", "days", 1, 1, ["day", "d", "days/hole", "day/hole", "days/surprise", "day/surprise", "days/pile", "day/pile"])];

const MASSES_PER_VOLUME = [
  unit("massPerVolume", "kg/m3", 1, 1, []),
  unit("massPerVolume", "t/m3", 1000, 1, ["tonne/m3", "tonnes/m3"], false),
  unit("massPerVolume", "lb/ft3", KILOGRAMS_PER_POUND, METRES_PER_FOOT * SQUARE_FOOT, ["pcf"]),
  unit("massPerVolume", "lb/yd3", KILOGRAMS_PER_POUND, 27 * METRES_PER_FOOT * SQUARE_FOOT, []),
];

/** Growth of stiffness with depth: each pressure over each depth, because logs print all of them. */
const PRESSURES_PER_LENGTH = PRESSURES.flatMap((pressure) =>
  LENGTHS.filter(({ symbol }) => symbol === "m" || symbol === "ft").map((length) => {
    const tops = [pressure.symbol.toLowerCase(), ...pressure.spellings];
    const bottoms = [length.symbol, ...length.spellings.slice(0, 4)];
    const familiar = length.symbol === "m" ? /^[kM]Pa$/ : /^[pkt]sf$/;
    return unit("pressurePerLength", `${pressure.symbol}/${length.symbol}`, pressure.multiply, pressure.divide * length.multiply,
      tops.flatMap((top) => bottoms.map((bottom) => `${top}/${bottom}`)), familiar.test(pressure.symbol));
  }));

/** Every unit of the project that is not money. */
export const UNITS: readonly Unit[] = [
  ...LENGTHS, ...PRESSURES, ...FORCES, ...PRESSURES_PER_LENGTH, ...RATIOS, ...DAYS, ...MASSES_PER_VOLUME,
];
