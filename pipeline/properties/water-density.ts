import type { PropertyValue } from "./property-value.ts";

const CELSIUS_ZERO = 273.15;

/** Numerator a0 to a5 and denominator b of Kell's rational form; t in °C, rho in kg/m3. */
interface KellCoefficients {
  readonly a: readonly [number, number, number, number, number, number];
  readonly b: number;
}

/**
 * G. S. Kell, J. Chem. Eng. Data 20 (1975) 97-105, t in °C on IPTS-68. The denominator 16.879850e-3 circulates with two
 * digits exchanged (16.897850e-3), which makes water 0.32 kg/m3 too light at 25 °C.
 */
const kell1975: KellCoefficients = {
  a: [999.83952, 16.945176, -7.9870401e-3, -46.170461e-6, 105.56302e-9, -280.54253e-12],
  b: 16.87985e-3,
};

/** The same equation recast to ITS-90: F. E. Jones, G. L. Harris, J. Res. NIST 97 (1992) 335-340. */
const kellRecast: KellCoefficients = {
  a: [999.83952, 16.952577, -7.9905127e-3, -46.241757e-6, 105.84601e-9, -281.03006e-12],
  b: 16.887236e-3,
};

function kell({ a, b }: KellCoefficients, t: number): number {
  return (a[0] + t * (a[1] + t * (a[2] + t * (a[3] + t * (a[4] + t * a[5]))))) / (1 + b * t);
}

/**
 * Density of air-free water [kg/m3] at 101.325 kPa by the formula recommended by the CIPM:
 * rho = a5 (1 - (t + a1)^2 (t + a2) / (a3 (t + a4)))
 *
 * - t  temperature [°C, ITS-90], 0 to 40
 *
 * Expanded uncertainty about 0.001 kg/m3.
 * @see M. Tanaka et al., Metrologia 38 (2001) 301-309.
 */
export function waterDensityTanaka(t: number): number {
  return 999.97495 * (1 - ((t - 3.983035) ** 2 * (t + 301.797)) / (522528.9 * (t + 69.34881)));
}

/**
 * Density of air-free water [kg/m3] at 101.325 kPa: a rational function of t [°C, IPTS-68], 0 to 150 (above 100 °C
 * superheated). Lies about 0.003 kg/m3 below {@link waterDensityTanaka}, because its density maximum is an older one.
 *
 * @see G. S. Kell, J. Chem. Eng. Data 20 (1975) 97-105.
 */
export function waterDensityKell1975(t: number): number {
  return kell(kell1975, t);
}

/**
 * Density of air-free water [kg/m3] at 101.325 kPa: Kell's equation recast to t [°C, ITS-90], 0 to 100.
 *
 * @see F. E. Jones, G. L. Harris, J. Res. NIST 97 (1992) 335-340.
 */
export function waterDensityKellRecast(t: number): number {
  return kell(kellRecast, t);
}

const TANAKA = "Tanaka et al., Metrologia 38 (2001) 301";
const KELL_RECAST = "Kell 1975 recast to ITS-90, Jones and Harris, J. Res. NIST 97 (1992) 335";
const KELL_1975 = "Kell, J. Chem. Eng. Data 20 (1975) 97 (superheated water; IPTS-68)";

/**
 * Density of water [kg/m3] at a temperature in K: Tanaka from 0 to 40 °C, Kell recast to ITS-90 to 100 °C, Kell 1975 to
 * 150 °C. The step where one formula hands over is 0.003 kg/m3. Undefined outside 273.15 to 423.15 K.
 */
export function waterDensity(temperatureK: number): PropertyValue | undefined {
  const t = temperatureK - CELSIUS_ZERO;
  if (!(t >= 0 && t <= 150)) return undefined;
  if (t <= 40) return { value: waterDensityTanaka(t), standardUncertainty: 0.001, reference: TANAKA };
  if (t <= 100) return { value: waterDensityKellRecast(t), standardUncertainty: 0.01, reference: KELL_RECAST };
  return { value: waterDensityKell1975(t), standardUncertainty: 0.05, reference: KELL_1975 };
}
