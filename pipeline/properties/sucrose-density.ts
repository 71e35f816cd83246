import { waterDensityKellRecast } from "./water-density.ts";

const COEFFICIENTS = [
  [385.1761, 135.3705, 40.9299, -3.9643, 13.4853, -17.289],
  [-46.272, -7.172, 1.1597, 5.1126, 17.5254],
  [59.7712, 7.2491, 12.363, -35.4791],
  [-47.2207, -21.6977, 27.6301],
  [18.3184, 12.3081],
];

/**
 * Density of sucrose in water [kg/m3]: rho = rho_water(t) + sum_j sum_k c_jk w^k T^j with T = (t - 20)/100 and
 * rho_water by Kell recast to ITS-90.
 *
 * - w  mass fraction of sucrose [1], 0 to 0.85      - t  temperature [°C], 0 to 100
 *
 * Within 0.5 kg/m3 of handbook values at 20 °C up to w = 0.8.
 * @throws RangeError outside these ranges.
 * @see Z. Bubník, P. Kadlec, D. Urban, M. Bruhns, Sugar Technologists Manual, Bartens, Berlin 1995, p. 164 (ICUMSA).
 */
export function sucroseSolutionDensity(w: number, t: number): number {
  if (!(w >= 0 && w <= 0.85)) throw new RangeError(`sucroseSolutionDensity: mass fraction ${w} is outside 0 to 0.85`);
  if (!(t >= 0 && t <= 100)) throw new RangeError(`sucroseSolutionDensity: t = ${t} °C is outside 0 to 100 °C`);
  const scaled = (t - 20) / 100;
  let excess = 0;
  for (let j = COEFFICIENTS.length - 1; j >= 0; j--) {
    const row = COEFFICIENTS[j] as readonly number[];
    excess = excess * scaled + row.reduceRight((sum, c) => sum * w + c, 0) * w;
  }
  return waterDensityKellRecast(t) + excess;
}
