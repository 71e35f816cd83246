import { seedOf } from "../../pipeline/fit/branches/break-bootstrap.ts";
import type { BreakPoints } from "../../pipeline/fit/branches/break-scan.ts";
import { type BranchPair, twoBranchCurves } from "../../pipeline/fit/branches/two-branch-curves.ts";
import { type SearchedBreak, searchBreaks } from "../../pipeline/fit/branches/two-branch-search.ts";
import { robustFits } from "../../pipeline/fit/robust/robust-fit.ts";
import { type RandomSource, seededRandom } from "../../pipeline/numerics/random.ts";
import type { RobustFit } from "../../pipeline/records/fits.ts";
import type { FitBasis, SystemPoints } from "../../pipeline/records/systems.ts";
import { plainSystem } from "./plain-system.ts";

/** What the search finds in one system. */
export interface Outcome {
  readonly found: SearchedBreak | undefined;
  readonly pair: BranchPair | undefined;
  readonly smooth: RobustFit;
}

/** Fits systems as one edition and looks for breaks in all of them, as for solids that are not specified. */
export function branchesOf(
  points: readonly SystemPoints[],
  sources: number,
  about: { readonly aqueousSalt: boolean; readonly water?: boolean },
  fitBasis: FitBasis = "ln x",
): Outcome[] {
  const options = { threshold: () => (about.aqueousSalt ? 0.06 : 0.12) };
  const { fits, scales, pooled } = robustFits(
    points,
    points.map(() => about),
    sources,
    options,
  );
  const seed = (system: number) => seedOf(`system ${system}`);
  const subjects = fits.flatMap(({ agreement }, system) =>
    agreement === "agreed" ? [{ system, seed: () => seed(system), knownK: [] }] : [],
  );
  const all = searchBreaks(subjects, fits, (wanted) =>
    wanted.length === 0
      ? []
      : robustFits(
          wanted.map(({ system }) => points[system]!),
          wanted.map(({ breakK }) => ({ ...about, breakK })),
          sources,
          { ...options, pooled },
        ).fits,
  );
  const context = { scales, laboratories: [], weighting: "relative" } as const;
  return fits.map((smooth, system) => {
    const found = all.get(system);
    const subject = { system: plainSystem(system, fitBasis, about.aqueousSalt) };
    const pair = found?.sense === "falls" ? twoBranchCurves(found, subject, context, seed(system)) : undefined;
    return { found, pair, smooth };
  });
}

/** What an invented edition of many systems is like. */
export interface World {
  readonly systems: number;
  readonly seed: number;
  /** Points of a system, over its sources. */
  readonly points: (random: RandomSource) => number;
  /** Fall of -d ln x/d(T0/T) at the break; 0 for smooth systems, negative for a slope that rises. */
  readonly fall: number;
}

/** Scatter within each source of the invented edition, and between sources. */
const WITHIN = [0.01, 0.015, 0.02, 0.025, 0.03, 0.02];
const BETWEEN = 0.025;

/**
 * Invented systems by one to three of six sources that scatter by 1 to 3 %, over about 274 to 335 K, with dissolution
 * enthalpies of 13 to 43 kJ/mol, curvatures of SD 6 (heat capacity over R), and a break between 288 and 318 K.
 */
export function world({ systems, seed, points, fall }: World): { points: SystemPoints[]; breakK: number[] } {
  const random = seededRandom(seed);
  const breakK: number[] = [];
  const all = Array.from({ length: systems }, () => {
    const sources = new Set<number>();
    const count = 1 + random.integerBelow(3);
    while (sources.size < count) sources.add(random.integerBelow(WITHIN.length));
    const [B, C] = [-(5 + 12 * random.uniform()), 6 * random.normal()];
    const Tb = 288 + 30 * random.uniform();
    breakK.push(Tb);
    const each = Math.max(4, Math.round(points(random) / count));
    const rows = [...sources].flatMap((source) => {
      const [offset, low, high] = [BETWEEN * random.normal(), 274 + 5 * random.uniform(), 325 + 20 * random.uniform()];
      return Array.from({ length: each }, (_, i) => {
        const T = low + ((high - low) * i) / (each - 1);
        const [u, ub] = [303 / T - 1, 303 / Tb - 1];
        const smooth = -4 + B * u + C * (u - Math.log1p(u));
        const broken = smooth - (T > Tb ? fall * (ub - u) : 0);
        return { source, T, y: broken + offset + WITHIN[source]! * random.normal() };
      });
    });
    return pointsOfRows(rows);
  });
  return { points: all, breakK };
}

/** Points of one system from rows of source, temperature (K) and ln value. */
export function pointsOfRows(
  rows: readonly { readonly source: number; readonly T: number; readonly y: number }[],
): SystemPoints {
  const n = rows.length;
  return {
    n,
    row: Int32Array.from(rows, (_, i) => i),
    temperatureK: Float64Array.from(rows, ({ T }) => T),
    temperatureU: new Float64Array(n).fill(0.1),
    lnValue: Float64Array.from(rows, ({ y }) => y),
    lnU: new Float64Array(n).fill(0.02),
    source: Int32Array.from(rows, ({ source }) => source),
    level: new Float64Array(n).fill(50),
  };
}

/** Points for the search itself: one scatter, sources numbered 0 and up. */
export function breakPointsOf(
  rows: readonly { readonly T: number; readonly y: number; readonly source?: number }[],
  sd: number,
  between = 0.025,
): BreakPoints {
  const blocks = [...new Set(rows.map(({ source = 0 }) => source))];
  return {
    n: rows.length,
    temperatureK: Float64Array.from(rows, ({ T }) => T),
    lnValue: Float64Array.from(rows, ({ y }) => y),
    variance: new Float64Array(rows.length).fill(sd * sd),
    block: Int32Array.from(rows, ({ source = 0 }) => blocks.indexOf(source)),
    nBlocks: blocks.length,
    betweenVariance: between ** 2,
  };
}
