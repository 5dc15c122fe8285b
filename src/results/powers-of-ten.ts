// `Math.log10` and powers of 10 may be off in the last digit, and not alike in every engine; a number's decimal form is exact everywhere.

/**
 * Exponent of a number's first digit: 3 from 1000 to below 10,000.
 *
 * @param value  finite, not 0
 */
export function decade(value: number): number {
  return Number(value.toExponential().split("e")[1]);
}

/**
 * Ten to a whole power.
 *
 * @param exponent  whole
 */
export function powerOfTen(exponent: number): number {
  return Number(`1e${exponent}`);
}
