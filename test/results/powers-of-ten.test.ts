import { expect, it } from "vitest";
import { decade, powerOfTen } from "../../src/results/powers-of-ten.js";

// Identity: whole powers up to 10^22 are exact in binary, and so a quotient of 1 and one of them is the double nearest to its reciprocal.
it("gives powers of ten as products of tens", () => {
  for (let k = 0, product = 1; k <= 22; k++, product *= 10) {
    expect(powerOfTen(k)).toBe(product);
    expect(powerOfTen(-k)).toBe(1 / product);
  }
});

// Identity: the decimal form of a number holds its place.
it("knows the first digit's place on both sides of every power of ten", () => {
  for (let k = -300; k <= 300; k++) for (const first of ["1", "1.000000000000001", "9.99999999999999"]) expect(decade(Number(`${first}e${k}`)), `${first}e${k}`).toBe(k);
  expect(decade(-250)).toBe(2);
});
