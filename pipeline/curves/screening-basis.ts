import type { GroupedModel } from "../numerics/grouped-model.ts";

/**
 * The flexible temperature curve behind screening, centred at T0 (K), with u = T0/T - 1:
 *
 *   ln s = b0 + b1 u + b2 (ln(T/T0) + u) + b3 max(0, uBreak - u) + b4 bend
 *
 * b1 = -(dissolution enthalpy at T0)/(R T0); b2 = (heat-capacity term)/R; b3 < 0 lowers the slope above a transition
 * of the solid on heating; b4 changes b2 there: bend is the b2 term less its tangent at the break, 0 below it.
 * The priors keep the ends of a short series honest without choosing a number of parameters.
 */
export const SCREENING_STRIDE = 5;

/**
 * Number of coefficients without a break, with one that only protects points from being called outliers (no b4: such a
 * break is not sure), and with one that was tested; and the place of the change of slope.
 */
export const [SMOOTH_COEFFICIENTS, HINGED_COEFFICIENTS, BROKEN_COEFFICIENTS, SLOPE_CHANGE] = [3, 4, 5, 3] as const;

/**
 * Standard deviations before the data of b0 (centred values), b1, b2, b3 and b4. b2: common practice, about 50 J/(mol K);
 * b4: the difference of two such.
 */
const PRIOR_SD = [100, 15, 6, 30, 6 * Math.SQRT2] as const;

/** Writes the basis of one temperature (K) at `at`; the break is left out where `breakK` is NaN. */
export function writeScreeningBasis(
  temperatureK: number,
  centreK: number,
  breakK: number,
  design: Float64Array,
  at: number,
): void {
  const u = centreK / temperatureK - 1;
  design[at] = 1;
  design[at + 1] = u;
  design[at + 2] = u - Math.log1p(u);
  const above = temperatureK > breakK;
  const uBreak = centreK / breakK - 1;
  design[at + 3] = above ? uBreak - u : 0;
  design[at + 4] = above ? u - uBreak - Math.log(breakK / temperatureK) - ((u - uBreak) * uBreak) / (1 + uBreak) : 0;
}

/** d ln s/dT (1/K) of a slope b1 and a heat-capacity term b2. */
export function screeningSlope(b1: number, b2: number, temperatureK: number, centreK: number): number {
  return -(b1 * centreK) / temperatureK ** 2 + b2 * (1 / temperatureK - centreK / temperatureK ** 2);
}

/** Sets the prior of a model with 3 (smooth), 4 or 5 (with a break) coefficients. */
export function setScreeningPrior(model: GroupedModel): void {
  model.prior.fill(0);
  for (let j = 0; j < model.p; j++) model.prior[j * model.p + j] = (PRIOR_SD[j] as number) ** -2;
}
