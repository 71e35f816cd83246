import type { FitBasis } from "../records/systems.ts";
import { inCelsius } from "../records/temperature-text.ts";
import type { Candidate } from "./candidate.ts";
import type { KeptPoints } from "./kept-points.ts";

/** A turn is believed where the rise beside it is at least this many standard errors on both sides. */
const BELIEVED_RISE = 2;

/** A mole fraction at most this far above 1 (relative) is put down to rounding. */
const ROUNDING = 1e-9;

/**
 * Why a fitted curve cannot be a solubility: a mole fraction above 1 inside the data, or a turn inside the data that
 * the points do not show.
 *
 * A curve that turns is no fault in itself (gypsum in water does); it is passed over where the rise on one side of the
 * turn is within twice its standard error, because a richer model then only follows the scatter.
 */
export function physicalVeto(candidate: Candidate, points: KeptPoints, basis: FitBasis): string | undefined {
  const { lowK, highK } = points;
  const turnK = turningPoint(candidate, lowK, highK);
  const places = turnK === undefined ? [lowK, highK] : [lowK, turnK, highK];
  const values = places.map(candidate.lnValue);
  if (values.some((value) => !Number.isFinite(value))) return "gives no number inside the data";
  const highest = Math.max(...values);
  if (basis === "ln x" && highest > ROUNDING)
    return `reaches a mole fraction of ${Math.exp(highest).toPrecision(4)}, above 1, inside the data`;
  if (turnK === undefined) return undefined;
  const rises = [lowK, highK].map((endK) => {
    const rise = Math.abs(candidate.lnValue(endK) - candidate.lnValue(turnK));
    return { rise, believed: rise >= BELIEVED_RISE * candidate.standardErrorOfRise(turnK, endK) };
  });
  const doubted = rises.filter(({ believed }) => !believed).sort((a, b) => a.rise - b.rise)[0];
  if (doubted !== undefined)
    return `turns at ${inCelsius(turnK)} inside the data, a change of ${(100 * doubted.rise).toFixed(1)} % that the scatter explains`;
  return undefined;
}

/** Temperature (K) inside the range where the slope changes sign; the models here have at most one. */
function turningPoint(candidate: Candidate, lowK: number, highK: number): number | undefined {
  const atLow = candidate.slope(lowK);
  if (!(atLow * candidate.slope(highK) < 0)) return undefined;
  let [low, high] = [lowK, highK];
  for (let halving = 0; halving < 40; halving++) {
    const middle = (low + high) / 2;
    if (candidate.slope(middle) * atLow > 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
