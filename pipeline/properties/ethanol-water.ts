import type { PropertyValue } from "./property-value.ts";

/** Coefficients of the general formula, p as mass fraction (0 to 1), t in °C (IPTS-68), rho in kg/m3. */
const A = [
  998.20123, -192.9769495, 389.1238958, -1668.103923, 13522.15441, -88292.78388, 306287.4042, -613838.1234, 747017.2998,
  -547846.1354, 223446.0334, -39032.85426,
];
const B = [-0.20618513, -0.0052682542, 3.6130013e-5, -3.8957702e-7, 7.169354e-9, -9.9739231e-11];
const C = [
  [
    0.1693443461530087, -10.46914743455169, 71.96353469546523, -704.7478054272792, 3924.090430035045,
    -12101.64659068747, 22486.46550400788, -26055.62982188164, 18523.73922069467, -7420.201433430137, 1285.617841998974,
  ],
  [
    -0.0119301300505701, 0.2517399633803461, -2.170575700536993, 13.53034988843029, -50.29988758547014,
    109.635566657757, -142.2753946421155, 108.043594285623, -44.14153236817392, 7.442971530188783,
  ],
  [
    -0.0006802995733503803, 0.01876837790289664, -0.2002561813734156, 1.02299296671922, -2.895696483903638,
    4.810060584300675, -4.672147440794683, 2.458043105903461, -0.5411227621436812,
  ],
  [4.075376675622027e-6, -8.76305857347111e-6, 6.515031360099368e-6, -1.51578483698721e-6],
  [-2.788074354782409e-8, 1.345612883493354e-8],
];

const horner = (coefficients: readonly number[], x: number): number =>
  coefficients.reduceRight((sum, coefficient) => sum * x + coefficient, 0);

/**
 * Density of ethanol + water [kg/m3] by the general formula of the International Alcoholometric Tables:
 * rho(p, t) = A1 + sum A_k p^(k-1) + sum B_k (t-20)^k + sum sum C_ik p^k (t-20)^i
 *
 * - p  mass fraction of ethanol [1], 0 to 1        - t  temperature [°C], -20 to 40
 *
 * Below 0 °C only above the freezing curve of the mixture. Its water (998.2012 kg/m3 at 20 °C) is not that of the CIPM
 * (998.2067): never mix the two in one contraction.
 * @throws RangeError outside these ranges.
 * @see OIML R 22, International Alcoholometric Tables (1975).
 */
export function ethanolWaterDensity(massFraction: number, t: number): number {
  if (!(massFraction >= 0 && massFraction <= 1)) {
    throw new RangeError(`ethanolWaterDensity: mass fraction ${massFraction} is outside 0 to 1`);
  }
  if (!(t >= -20 && t <= 40)) throw new RangeError(`ethanolWaterDensity: t = ${t} °C is outside -20 to 40 °C`);
  const dt = t - 20;
  let rho = horner(A, massFraction) + dt * horner(B, dt);
  for (const [index, row] of C.entries()) rho += massFraction * horner(row, massFraction) * dt ** (index + 1);
  return rho;
}

/** Density of ethanol at 20 °C [kg/m3] by which the alcoholic strength by volume is defined: 789.239 by the formula. */
const ETHANOL_20 = ethanolWaterDensity(1, 20);

/**
 * Alcoholic strength by volume at 20 °C [1] of a mass fraction p of ethanol: q = p rho(p, 20 °C) / rho(1, 20 °C).
 *
 * @example alcoholByVolume(0.92408) // 0.95
 * @see OIML R 22.
 */
export function alcoholByVolume(massFraction: number): number {
  return (massFraction * ethanolWaterDensity(massFraction, 20)) / ETHANOL_20;
}

/**
 * Mass fraction of ethanol [1] of an alcoholic strength by volume at 20 °C [1]: the inverse of {@link alcoholByVolume}.
 *
 * @example massFractionFromAlcoholByVolume(0.95) // 0.9241
 * @throws RangeError outside 0 to 1.
 */
export function massFractionFromAlcoholByVolume(volumeFraction: number): number {
  if (!(volumeFraction >= 0 && volumeFraction <= 1)) {
    throw new RangeError(`massFractionFromAlcoholByVolume: strength ${volumeFraction} is outside 0 to 1`);
  }
  let low = 0;
  let high = 1;
  // q(p) rises strictly from 0 to 1, so halving the bracket ends at the double nearest to the root.
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (alcoholByVolume(middle) < volumeFraction) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/**
 * Density of ethanol + water [kg/m3] with its uncertainty at a temperature in K; undefined outside 273.15 to 313.15 K
 * or outside the mass fractions 0 to 1. u = 0.1 kg/m3 covers the scatter of published measurements, u = 0.3 kg/m3 away
 * from 20 °C.
 */
export function ethanolWaterDensityAt(massFraction: number, temperatureK: number): PropertyValue | undefined {
  const t = temperatureK - 273.15;
  if (!(t >= 0 && t <= 40 && massFraction >= 0 && massFraction <= 1)) return undefined;
  return {
    value: ethanolWaterDensity(massFraction, t),
    standardUncertainty: Math.abs(t - 20) <= 5 ? 0.1 : 0.3,
    reference: "OIML R 22 (1975), International Alcoholometric Tables",
  };
}
