/**
 * Scalars that cross modules carry their unit in their type, so that a length cannot be passed where a
 * modulus is meant. Inside the engine everything is SI with metres, kilopascals and kilonewtons.
 */
declare const metre: unique symbol;
declare const kilopascal: unique symbol;
declare const kilonewton: unique symbol;

/** A length in metres. */
export type Metres = number & { readonly [metre]: true };
/** A modulus, strength or pressure in kilopascals (kN/m2). */
export type Kilopascals = number & { readonly [kilopascal]: true };
/** A force in kilonewtons. */
export type Kilonewtons = number & { readonly [kilonewton]: true };

/** Marks a plain number as metres; no conversion, no check. */
export const metres = (value: number): Metres => value as Metres;
/** Marks a plain number as kilopascals; no conversion, no check. */
export const kilopascals = (value: number): Kilopascals => value as Kilopascals;
/** Marks a plain number as kilonewtons; no conversion, no check. */
export const kilonewtons = (value: number): Kilonewtons => value as Kilonewtons;
