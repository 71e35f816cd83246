/** Temperatures that agree to this (K) are the same: one round number, in whatever scale. */
export const SAME_TEMPERATURE_K = 0.011;
