import type { Flag, RobustFit } from "../../records/fits.ts";
import { inCelsius } from "../../records/temperature-text.ts";
import { noticeOn } from "../block-notice.ts";
import { blocksOf } from "../block-screen.ts";
import { middle } from "../middle.ts";
import { type ScreenInput, sourceName } from "../screen-input.ts";
import { counted, threeDigits } from "../wording.ts";

/** Measured density and estimate may differ by this, relative, and by as much more per mass fraction of solute. */
const [ALWAYS, PER_MASS_FRACTION] = [0.03, 0.5];
/** Densities from which a series shows what runs smoothly. */
const LEAST_POINTS = 7;
/** A density is off its neighbours beyond so many times the usual roughness, and by this part. Common practice. */
const [ROUGH_TIMES, ROUGH_PART] = [8, 0.0015];
/** Neighbours further apart than this, K, say nothing of what lies between. */
const NEIGHBOURS_K = 12;

/**
 * Notices of measured solution densities that do not go with the rest: far from what solvent and solute let expect, or
 * off the straight line between the neighbouring temperatures where the other densities of the series lie on it.
 */
export function densityFlags(input: ScreenInput): Flag[] {
  const measured = input.table.solutionDensity;
  return input.fits.flatMap((fit) =>
    [...blocksOf(fit)].flatMap(([source, block]) => {
      const points = block.filter((i) => measured[fit.points.row[i]!]! > 0);
      return points.length === 0
        ? []
        : [...unlikeEstimate(input, fit, source, points), ...rough(input, fit, source, points)];
    }),
  );
}

function unlikeEstimate(input: ScreenInput, fit: RobustFit, source: number, points: readonly number[]): Flag[] {
  const { table } = input;
  const liquor = input.about[fit.system]?.liquor;
  if (liquor === undefined) return [];
  const off = points.filter((i) => {
    const row = fit.points.row[i]!;
    const r = table.massRatio[row]!;
    const w = r / (1 + r);
    const estimate = liquor.massConcentration(r, fit.points.temperatureK[i]!) / w;
    return Math.abs(table.solutionDensity[row]! / estimate - 1) > ALWAYS + PER_MASS_FRACTION * w;
  });
  if (off.length === 0) return [];
  const row = fit.points.row[off[0]!]!;
  const r = table.massRatio[row]!;
  const estimate = (liquor.massConcentration(r, fit.points.temperatureK[off[0]!]!) * (1 + r)) / r;
  return [
    noticeOn(fit, source, off, {
      code: "unlikely-density",
      evidence:
        `the solution density of ${counted(off.length, "row")} of ${sourceName(input, source)} is not that of such a ` +
        `solution: ${threeDigits(table.solutionDensity[row]!)} kg/m3 at ${inCelsius(table.temperatureK[row]!)}, ` +
        `expected about ${threeDigits(estimate)}`,
      lookAt: "Look at the unit of the density, and at whether it is that of the solvent or the solid.",
    }),
  ];
}

/** The density of a series that lies furthest off its neighbours, where the rest runs smoothly. */
function rough(input: ScreenInput, fit: RobustFit, source: number, points: readonly number[]): Flag[] {
  if (points.length < LEAST_POINTS) return [];
  const { temperatureK, row } = fit.points;
  const density = (i: number) => input.table.solutionDensity[row[i]!]!;
  const sorted = [...points].sort((a, b) => temperatureK[a]! - temperatureK[b]!);
  const bends = sorted.slice(1, -1).flatMap((i, k) => {
    const [before, after] = [sorted[k]!, sorted[k + 2]!];
    const span = temperatureK[after]! - temperatureK[before]!;
    if (!(span > 0) || span > 2 * NEIGHBOURS_K) return [];
    const share = (temperatureK[i]! - temperatureK[before]!) / span;
    return [{ point: i, off: density(i) - (1 - share) * density(before) - share * density(after) }];
  });
  if (bends.length < LEAST_POINTS - 2) return [];
  const usual = middle(bends.map(({ off }) => Math.abs(off)));
  const worst = bends.reduce((a, b) => (Math.abs(b.off) > Math.abs(a.off) ? b : a));
  if (Math.abs(worst.off) < Math.max(ROUGH_TIMES * usual, ROUGH_PART * density(worst.point))) return [];
  return [
    noticeOn(fit, source, [worst.point], {
      code: "rough-density",
      evidence:
        `the solution density ${density(worst.point)} kg/m3 at ${inCelsius(temperatureK[worst.point]!)} lies ` +
        `${threeDigits(Math.abs(worst.off))} kg/m3 ${worst.off > 0 ? "above" : "below"} the line between its neighbours; ` +
        `half of the others within ${threeDigits(usual)}`,
      lookAt: "Look at this density and those beside it in the original: one may be misprinted.",
    }),
  ];
}
