/** One block in ascending order of temperature, as causes that bend a series see it. */
export interface BlockSeries {
  readonly temperatureK: readonly number[];
  readonly lnValue: readonly number[];
  /** d ln value/dT of the curve of the other sources, 1/K; undefined where there is no other source. */
  readonly slope: readonly number[] | undefined;
  /** ln value of that curve at a temperature (K), where there is one. */
  readonly curve: ((temperatureK: number) => number) | undefined;
  /** Method as stated; "" where none. */
  readonly method: string;
}

/** A way in which a cause bends a whole series. */
export type Pattern =
  | {
      /** The deviation of point i is a times `shape[i]`; a is normal about 0 with `sd`, kept to the side of `sign` (0: both). */
      readonly kind: "growing";
      readonly detail: string;
      /** Share of this way among the ways of its cause; they add up to at most 1. */
      readonly weight: number;
      readonly shape: readonly number[];
      /** The shape at an amplitude, where the deviation is not quite in proportion to it. */
      readonly shapeAt?: (amplitude: number) => readonly number[];
      readonly sd: number;
      /** Standard deviation of each point about the shape, part of `sd` times its shape: no bend is quite regular. */
      readonly irregular: number;
      readonly sign: -1 | 0 | 1;
    }
  | {
      /** From point `from` on the values are one and the same. */
      readonly kind: "level";
      readonly detail: string;
      readonly weight: number;
      readonly from: number;
    };

/** Deviation, ln value, that a growing pattern typically reaches at its end. Common practice. */
const USUAL_AT_END = 0.5;
/** How far a bend strays from the straight growth, part of its size at the end. Common practice. */
const IRREGULAR = 0.12;
/** Deviations grow in proportion to the distance from where they start, or faster. */
const POWERS = [1, 1.7] as const;
/** Points that a pattern leaves alone at the other end, at least. */
const LEFT_ALONE = 1;

/**
 * Deviations that start at some temperature and grow with the distance from it: to the hot end (`end` 1) or
 * the cold end (-1), with the sign given. One pattern for each temperature of the series at which it may start.
 */
export function growing(
  { temperatureK }: Pick<BlockSeries, "temperatureK">,
  end: -1 | 1,
  sign: -1 | 1,
  detail: string,
): Pattern[] {
  const n = temperatureK.length;
  const last = end === 1 ? temperatureK[n - 1]! : temperatureK[0]!;
  const starts = [...new Set(temperatureK.filter((T) => T !== last))];
  const used = starts.filter((_, j) => (end === 1 ? j >= LEFT_ALONE - 1 : j <= starts.length - LEFT_ALONE));
  return used.flatMap((start) =>
    POWERS.map((power) => ({
      kind: "growing",
      detail,
      weight: 1 / (used.length * POWERS.length),
      shape: temperatureK.map((T) => Math.max(0, (T - start) / (last - start)) ** power),
      sd: USUAL_AT_END,
      irregular: IRREGULAR,
      sign,
    })),
  );
}
