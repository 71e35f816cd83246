import { normalQuantile, studentTSurvival } from "../numerics/distributions.ts";
import { benjaminiHochbergThreshold } from "../numerics/multiple-testing.ts";
import type { RobustFit } from "../records/fits.ts";
import { RepeatKind } from "../records/repeats.ts";
import { isPossibleTemperature } from "./possible-temperature.ts";
import { type ScreenInput, thresholdOf } from "./screen-input.ts";

/** A point that is off its curve. */
export interface OffPoint {
  readonly system: number;
  readonly point: number;
  readonly z: number;
  readonly threshold: number;
  /** The temperature cannot be meant: what the curve says there is beside the point. */
  readonly impossible: boolean;
  /** True where too few points are left to be sure: told only because it is off by more than a factor 2. */
  readonly unsure: boolean;
  /** How far a bend of its series moves it, ln value, where it is off for that alone. */
  readonly bentBy?: number;
}

/** Where few points are left, only this much is worth a flag. */
const FEW_POINTS_THRESHOLD = Math.LN2;
/** Points a source must have for its own curve to judge it in a conflict. */
const LEAST_IN_CONFLICT = 5;

/**
 * Tests every point outside the blocks already found: two-sided p of the deleted z under Student's law with pooled
 * degrees of freedom, Benjamini-Hochberg over all of them, and the material threshold. In a system that cannot tell,
 * or whose sources are in conflict, a point must be off by a factor 2.
 *
 * @param blocked `SYSTEM:SOURCE` of the blocks that are off as a whole
 */
export function screenPoints(input: ScreenInput, blocked: ReadonlySet<string>): OffPoint[] {
  const q = input.settings.false_discovery_rate;
  const worthTesting = normalQuantile(1 - q / 2);
  const candidates: OffPoint[] = [];
  const pValues: number[] = [];
  let total = 0;
  for (const fit of input.fits) {
    for (let point = 0; point < fit.points.n; point++) {
      if (blocked.has(`${fit.system}:${fit.points.source[point]}`)) continue;
      const z = fit.deviation[point]! / fit.deviationSd[point]!;
      if (Number.isNaN(z)) continue;
      total++;
      if (!isPossibleTemperature(fit.points.temperatureK[point]!)) {
        pValues.push(0);
        candidates.push({ system: fit.system, point, z, ...limitsOf(input, fit, point), impossible: true });
        continue;
      }
      if (!(Math.abs(z) > worthTesting)) continue;
      const p = 2 * studentTSurvival(Math.abs(z), Math.max(1, fit.degreesOfFreedom));
      if (p > q) continue;
      pValues.push(p);
      candidates.push({ system: fit.system, point, z, ...limitsOf(input, fit, point), impossible: false });
    }
  }
  const limit = benjaminiHochbergThreshold(pValues, q, total);
  const off = candidates.filter(({ system, point, threshold, impossible }, j) => {
    return impossible || (pValues[j]! <= limit && Math.abs(input.fits[system]!.deviation[point]!) >= threshold);
  });
  return withoutSoundCopies(input, off);
}

/** A copy is off where what it repeats is off: it is the same value, though its own source may look set off from the curve. */
function withoutSoundCopies({ fits }: ScreenInput, off: readonly OffPoint[]): OffPoint[] {
  const told = new Set(off.map(({ system, point }) => `${system}:${point}`));
  return off.filter(({ system, point, impossible }) => {
    const { repeats } = fits[system]!;
    if (impossible || repeats === undefined) return true;
    if (repeats.kind[point]! < RepeatKind.copiedBlock) return true;
    return repeats.kind[point] === RepeatKind.average || told.has(`${system}:${repeats.countedAs[point]}`);
  });
}

function limitsOf(input: ScreenInput, fit: RobustFit, point: number): { threshold: number; unsure: boolean } {
  const threshold = thresholdOf(input, fit.system, point);
  if (fit.agreement === "agreed") return { threshold, unsure: false };
  if (fit.agreement === "conflict" && pointsOfSource(fit, fit.points.source[point]!) < LEAST_IN_CONFLICT)
    return { threshold: Number.POSITIVE_INFINITY, unsure: true };
  return { threshold: Math.max(threshold, FEW_POINTS_THRESHOLD), unsure: true };
}

function pointsOfSource(fit: RobustFit, source: number): number {
  let count = 0;
  for (let i = 0; i < fit.points.n; i++) if (fit.points.source[i] === source) count++;
  return count;
}
