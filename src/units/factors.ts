/**
 * The exact numbers from which every conversion of the project follows. All are exact by definition, not measured.
 *
 * @source international yard and pound agreement (1959): 1 ft = 0.3048 m, 1 in = 0.0254 m, 1 lb = 0.453 592 37 kg;
 *   standard gravity 9.806 65 m/s2 (3rd General Conference on Weights and Measures, 1901); as printed in
 *   NIST Special Publication 811 (2008), Guide for the Use of the International System of Units, Appendix B
 */
export const METRES_PER_FOOT = 0.3048;
export const METRES_PER_INCH = 0.0254;
export const KILOGRAMS_PER_POUND = 0.45359237;

/** Pound-force, N: 0.453 592 37 kg x 9.806 65 m/s2, written out because the product is exact in decimal. */
export const NEWTONS_PER_POUND_FORCE = 4.4482216152605;

/** Kilogram-force, N. */
export const NEWTONS_PER_KILOGRAM_FORCE = 9.80665;
