/** Correlation structures of the log stiffness; the lengths are scales of fluctuation. */
export type CorrelationName = "markov" | "ellipsoidal" | "gaussian" | "spherical" | "markov2";
