import type { Flag } from "../records/fits.ts";
import type { LeftOutPrediction, MixtureMember } from "../records/mixtures.ts";
import { offBy } from "./wording.ts";

/** What probably happened to a composition that lies off the others. */
export interface CompositionCause {
  readonly named: Pick<Flag, "suspectedCause" | "causeDetail" | "causeProbability">;
  /** What speaks for it, in words with figures; "" where nothing does. */
  readonly words: string;
  readonly lookAt: string;
}

/** Odds before the data, common practice: as the causes of blocks have them elsewhere. */
const [MIX_UP_PRIOR, TEN_PRIOR] = [0.15, 0.1];
/** Powers of ten tried, either way. */
const POWERS = [-3, -2, -1, 1, 2, 3] as const;
/** Standard deviation, ln value, of a deviation that no simple cause explains. */
const UNEXPLAINED_SD = 1;
/** A cause must leave the composition within so many standard deviations, and reach this probability. */
const [WITHIN, NAMED_FROM] = [2, 0.5];

/**
 * The two solvents exchanged, or a power of ten, against no simple cause: prior times normal density of what each leaves
 * over.
 */
export function compositionCause(
  { fraction, reversed }: MixtureMember,
  { meanDeviation, meanSd }: LeftOutPrediction,
): CompositionCause {
  const ten = POWERS.reduce((best, power) => (left(power) < left(best) ? power : best));
  function left(power: number): number {
    return Math.abs(meanDeviation - power * Math.LN10);
  }
  const weights = reversed.map(
    ({ meanDeviation: left, meanSd: sd }) => (MIX_UP_PRIOR / reversed.length) * density(left, sd),
  );
  const mixUpWeight = weights.reduce((sum, weight) => sum + weight, 0);
  const likeliest = reversed[weights.indexOf(Math.max(...weights))];
  const tenWeight = TEN_PRIOR * density(meanDeviation - ten * Math.LN10, meanSd);
  const none = (1 - MIX_UP_PRIOR - TEN_PRIOR) * density(meanDeviation, UNEXPLAINED_SD);
  const total = mixUpWeight + tenWeight + none;
  if (
    likeliest !== undefined &&
    mixUpWeight > NAMED_FROM * total &&
    Math.abs(likeliest.meanDeviation) < WITHIN * likeliest.meanSd
  ) {
    const turned = `${percent(likeliest.fraction)}:${percent(1 - likeliest.fraction)} w/w`;
    return {
      named: {
        suspectedCause: "composition mix-up",
        causeDetail: `the ${likeliest.of} of the two solvents exchanged: ${turned} instead of ${percent(fraction)}:${percent(1 - fraction)} w/w`,
        causeProbability: mixUpWeight / total,
      },
      words: `read as ${turned} it lies ${offBy(likeliest.meanDeviation)} them`,
      lookAt: "Look at the proportion of the solvents: which of the two it counts.",
    };
  }
  if (tenWeight > NAMED_FROM * total && left(ten) < WITHIN * meanSd)
    return {
      named: {
        suspectedCause: "power of ten",
        causeDetail: `values are 10^${ten} of what they should be`,
        causeProbability: tenWeight / total,
      },
      words: `divided by 10^${ten} it lies ${offBy(meanDeviation - ten * Math.LN10)} them`,
      lookAt: "Look at the unit and the decimal point of the whole series.",
    };
  return {
    named: { suspectedCause: "no simple cause" },
    words: "",
    lookAt:
      "Look at the composition, the unit and the solid of this series; a second source, or a composition beside it, " +
      "would decide.",
  };
}

function density(deviation: number, sd: number): number {
  return Math.exp(-0.5 * (deviation / sd) ** 2) / sd;
}

function percent(fraction: number): string {
  return String(Number((100 * fraction).toFixed(1)));
}
