import type { Flag, RobustFit } from "../records/fits.ts";
import { inCelsius } from "../records/temperature-text.ts";
import type { OffBlock } from "./block-screen.ts";
import { competeAcrossSystems } from "./causes/across-systems.ts";
import { AS_READ } from "./causes/compete-block.ts";
import { decided, type Verdict } from "./causes/compete-point.ts";
import { middle } from "./middle.ts";
import { type ScreenInput, sourceName } from "./screen-input.ts";
import { counted, offBy } from "./wording.ts";

/** A lower block up to this factor could be a more stable solid; a larger one hardly. Common practice. */
const LARGEST_FORM_RATIO = Math.log(10);
/** Points from which a drift can be told from scatter. */
const LEAST_FOR_DRIFT = 4;
/** Enthalpies of transition between solids, hydrates included, up to 40 kJ/mol over R, K. Common practice. */
const LARGEST_DRIFT_K = 40000 / 8.314;
/** Share of the points that lie below the curve. */
const MOSTLY_BELOW = 0.75;
const MORE_STABLE_FORM =
  "Look at the solid at the end of the measurement (XRPD, Raman): the lower values may be those of a more stable form.";

/** One flag for each block that is off as a whole. */
export function blockFlags(input: ScreenInput, blocks: readonly OffBlock[]): Flag[] {
  const verdicts = blocks.map(verdictOf);
  const across = competeAcrossSystems(input, blocks);
  return blocks.map((block, j) => blockFlag(input, block, across.get(block) ?? verdicts[j]!));
}

function blockFlag(input: ScreenInput, block: OffBlock, verdict: Verdict): Flag {
  const fit = input.fits[block.system]!;
  const lower = couldBeStableForm(fit, block);
  const flag = {
    scope: "block",
    code: lower ? "possible-more-stable-form" : "block-off-curve",
    severity: "blocking",
    source: block.source,
    system: block.system,
    suspectedCause: verdict.cause ?? "no simple cause",
    evidence: evidence(input, fit, block, lower),
    lookAt: lower ? `${verdict.cause === undefined ? "" : `${verdict.lookAt} `}${MORE_STABLE_FORM}` : verdict.lookAt,
  } as const;
  return verdict.cause === undefined
    ? flag
    : { ...flag, causeDetail: verdict.detail, causeProbability: verdict.probability };
}

/** The most likely cause of an off block, its ways summed, given that the block is not sound as read. */
function verdictOf({ readings, posterior }: OffBlock): Verdict {
  // Added up, not taken from 1: where the block is hardly off, rounding would make a probability above 1.
  const off = readings.reduce((sum, { key }, r) => (key === AS_READ ? sum : sum + posterior[r]!), 0);
  const sums = new Map<string, number>();
  for (const [r, { cause }] of readings.entries())
    if (cause !== undefined) sums.set(cause, (sums.get(cause) ?? 0) + posterior[r]! / off);
  let best: Verdict | undefined;
  let bestShare = 0;
  let bestSum = 0;
  for (const [r, { cause, detail, lookAt }] of readings.entries()) {
    if (cause === undefined) continue;
    const sum = sums.get(cause)!;
    if (sum < bestSum || (sum === bestSum && posterior[r]! <= bestShare)) continue;
    bestSum = sum;
    bestShare = posterior[r]!;
    // Shares of one whole, summed: rounding may take them past 1.
    best = { cause, detail, lookAt, probability: Math.min(1, sum), proposedValue: undefined };
  }
  return decided(best, Math.min(1, bestSum));
}

/**
 * A coherent lower block: below by less than an order of magnitude, and either parallel to the curve or drifting from it
 * smoothly. Of two solids ln(ratio) is nearly linear in 1/T, with the enthalpy of transition over R as its slope.
 */
function couldBeStableForm({ points }: RobustFit, { points: own, deviations, offset, threshold }: OffBlock): boolean {
  if (offset >= 0 || offset < -LARGEST_FORM_RATIO) return false;
  if (middle(deviations.map((deviation) => Math.abs(deviation - offset))) < threshold) return true;
  const below = deviations.filter((deviation) => deviation < 0).length;
  if (own.length < LEAST_FOR_DRIFT || below < MOSTLY_BELOW * own.length) return false;
  const line = straightLine(
    own.map((point) => 1 / points.temperatureK[point]!),
    deviations,
  );
  return Math.abs(line.slope) < LARGEST_DRIFT_K && middle(line.residuals.map(Math.abs)) < threshold;
}

/** Least-squares line through a few values, with what it leaves over. */
function straightLine(x: readonly number[], y: readonly number[]) {
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  const [centre, level] = [mean(x), mean(y)];
  let [products, squares] = [0, 0];
  x.forEach((value, i) => {
    products += (value - centre) * (y[i]! - level);
    squares += (value - centre) ** 2;
  });
  const slope = squares > 0 ? products / squares : 0;
  return { slope, residuals: y.map((value, i) => value - level - slope * (x[i]! - centre)) };
}

function evidence(input: ScreenInput, fit: RobustFit, block: OffBlock, lower: boolean): string {
  const temperatures = block.points.map((point) => fit.points.temperatureK[point]!);
  const [low, high] = [Math.min(...temperatures), Math.max(...temperatures)];
  const where = low === high ? `at ${inCelsius(low)}` : `from ${inCelsius(low)} to ${inCelsius(high)}`;
  const [least, most] = [Math.min(...block.deviations), Math.max(...block.deviations)];
  const name = sourceName(input, block.source);
  const seen =
    `the ${counted(block.points.length, "point")} of ${name} ${where} lie, in the middle, ${offBy(block.offset)} ` +
    `the curve of ${counted(block.otherSources, "other source")} that agree (z = ${block.z.toFixed(1)}; ` +
    `single points ${offBy(least)} to ${offBy(most)})`;
  return lower ? `${seen}; a majority is no proof of stability: the stable form has the lower solubility` : seen;
}
