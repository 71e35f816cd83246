import type { Cause } from "./cause.ts";

/** What a salt weighs more than its acid or base, g/mol: HCl added; Na or K in place of H. */
const COUNTERPARTS: readonly (readonly [name: string, mass: number, share: number])[] = [
  ["hydrochloride", 36.46, 0.5],
  ["sodium salt", 21.98, 0.35],
  ["potassium salt", 38.09, 0.15],
];

/**
 * The mass is that of the salt and was read as that of the free acid or base, or the reverse: one factor for the series.
 *
 * Computes the value times M/(M + m) and its reciprocal for the hydrochloride and the sodium and potassium salts.
 * Known limitation: other counter-ions, di-salts and factors within the scatter between sources are not seen; whether the
 * solute has such a salt is not known here.
 */
export const saltOrFreeBase: Cause = {
  name: "salt or free base",
  pointPrior: 0.002,
  blockPrior: 0.012,
  lookAt: "Look at what was weighed or calibrated: the free acid or base, or its salt.",
  explanations: ({ soluteMolarMass: M }) =>
    !(M > 0)
      ? []
      : COUNTERPARTS.flatMap(([name, mass, share]) => [
          {
            detail: `mass is that of the ${name}`,
            weight: share / 2,
            change: () => ({ kind: "factor", factor: M / (M + mass) }) as const,
          },
          {
            detail: `mass is that of the free acid or base of the ${name}`,
            weight: share / 2,
            change: () => ({ kind: "factor", factor: (M + mass) / M }) as const,
          },
        ]),
};
