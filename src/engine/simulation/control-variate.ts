/** Fewer realisations than this say too little of the coefficient: the form then stands for the elements as it is. */
const fewest = 12;
/** The same where few realisations carry the form's variance: one damaged building in thirty says nothing of how form and elements compare. */
const fewestCarrying = 8;

/** A mean by finite elements with the second-order form as control variate. */
export interface ControlledMean {
  readonly mean: number;
  /** standard error of the mean */
  readonly error: number;
  /** the mean is that of (elements - coefficient x form in the same ground) plus coefficient x the form's own mean */
  readonly coefficient: number;
  /** least-squares slope of elements on the form, before shrinking: what the coefficient becomes with very many by the form alone */
  readonly slope: number;
  /** of elements and form in the same ground, -1 to 1; undefined where one of them never varied */
  readonly correlation: number | undefined;
}

/**
 * Mean of a quantity from few realisations by finite elements, each with the form in the same ground beside it, and many by the form alone.
 *
 * The coefficient is that of least squares, shrunk by N / (n + N) because the form's mean is known no better than that. Where there
 * are few elements, or few among them vary, it is that of a form which is right (1 before shrinking): then nothing is fitted and the mean
 * has no bias.
 *
 * @param elements  by finite elements, n
 * @param beside    by the form in the same realisations, n
 * @param alone     by the form in others, N; n or N is at least 2
 * @returns         with fewer than 2 elements the form's own mean; with fewer than 2 of the form alone the plain mean
 * @source control variates with an estimated control mean: Pasupathy, Schmeiser, Taaffe & Wang (2012), IIE Trans. 44 (method only)
 */
export function controlledMean(elements: Float64Array, beside: Float64Array, alone: Float64Array): ControlledMean {
  const n = elements.length;
  const many = alone.length;
  if (n < 2) return { mean: meanOf(alone), error: Math.sqrt(covarianceOf(alone, alone) / many), coefficient: 1, slope: 1, correlation: undefined };
  const [own, form, joint] = [covarianceOf(elements, elements), covarianceOf(beside, beside), covarianceOf(elements, beside)];
  const correlation = own > 0 && form > 0 ? Math.max(-1, Math.min(1, joint / Math.sqrt(own * form))) : undefined;
  const isFitted = n >= fewest && own > 0 && carrying(beside) >= fewestCarrying;
  const slope = isFitted ? joint / form : 1;
  if (many < 2) return { mean: meanOf(elements), error: Math.sqrt((own * caution(n, 1)) / n), coefficient: 0, slope, correlation };
  const coefficient = (slope * many) / (n + many);
  const residual = own - 2 * coefficient * joint + coefficient ** 2 * form;
  const variance = (Math.max(residual, 0) * caution(n, isFitted ? 2 : 1)) / n + (coefficient ** 2 * covarianceOf(alone, alone)) / many;
  return { mean: meanOf(elements) + coefficient * (meanOf(alone) - meanOf(beside)), error: Math.sqrt(variance), coefficient, slope, correlation };
}

/** How many of the values carry their variance: a third of them where they are normal, one where all but one are equal, 0 where all are. */
function carrying(values: Float64Array): number {
  const mean = meanOf(values);
  let square = 0;
  let fourth = 0;
  for (let i = 0; i < values.length; i++) {
    const d = (values[i] - mean) ** 2;
    square += d;
    fourth += d * d;
  }
  return fourth > 0 ? (square * square) / fourth : 0;
}

/**
 * Factor on a residual variance (divisor n - 1) for what is not known of it: the divisor that the fitted numbers leave, and the wider
 * tails of a mean whose variance is estimated from few values (variance of Student's t).
 *
 * @param n       number of values, at least 2
 * @param fitted  numbers fitted to them: 1 for the mean, 2 with a coefficient
 */
export function caution(n: number, fitted: number): number {
  const free = n - fitted;
  return ((n - 1) / Math.max(free, 1)) * (free > 2 ? free / (free - 2) : 10);
}

/** Mean, summed in order; 0 of nothing. */
export function meanOf(values: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += values[i];
  return values.length === 0 ? 0 : sum / values.length;
}

/** Covariance with divisor n - 1; 0 for fewer than 2 values. */
export function covarianceOf(a: Float64Array, b: Float64Array): number {
  const n = a.length;
  if (n < 2) return 0;
  const meanA = meanOf(a);
  const meanB = meanOf(b);
  let sum = 0;
  for (let i = 0; i < n; i++) sum += (a[i] - meanA) * (b[i] - meanB);
  return sum / (n - 1);
}
