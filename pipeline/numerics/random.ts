import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plusFromState } from "pure-rand/generator/xoroshiro128plus";

/** A stream of random numbers that is the same for the same seed on every machine. */
export interface RandomSource {
  /** Uniform in [0, 1), 53 bits. */
  readonly uniform: () => number;
  /** Standard normal deviate. */
  readonly normal: () => number;
  /** Uniform integer in 0 to n - 1, for n up to 2^32; bias below n / 2^32. */
  readonly integerBelow: (n: number) => number;
}

/**
 * Random numbers from xoroshiro128+ started at a scrambled seed, so that neighbouring seeds give unrelated streams.
 * Normal deviates by the polar method.
 * @throws RangeError unless the seed is an integer.
 * @see Blackman and Vigna, ACM Trans. Math. Softw. 47 (2021) 36; Marsaglia and Bray, SIAM Rev. 6 (1964) 260-264.
 */
export function seededRandom(seed: number): RandomSource {
  if (!Number.isSafeInteger(seed)) throw new RangeError(`random: the seed must be an integer, not ${seed}`);
  const low = seed | 0;
  const high = Math.floor(seed / 2 ** 32) | 0;
  const generator = xoroshiro128plusFromState([
    scramble(low ^ 0x9e3779b9),
    scramble(high + 0x3c6ef372),
    scramble(low + 0x1b873593),
    scramble(high ^ scramble(low)),
  ]);
  const uniform = () => uniformFloat64(generator);
  let spare = Number.NaN;
  const normal = () => {
    if (!Number.isNaN(spare)) {
      const value = spare;
      spare = Number.NaN;
      return value;
    }
    for (;;) {
      const x = 2 * uniform() - 1;
      const y = 2 * uniform() - 1;
      const square = x * x + y * y;
      if (square > 0 && square < 1) {
        const radius = Math.sqrt((-2 * Math.log(square)) / square);
        spare = y * radius;
        return x * radius;
      }
    }
  };
  return { uniform, normal, integerBelow: (n) => Math.floor(((generator.next() >>> 0) / 2 ** 32) * n) };
}

/** Mixes 32 bits so that each input bit reaches every output bit (finaliser of MurmurHash3). */
function scramble(word: number): number {
  let mixed = word | 0;
  mixed = Math.imul(mixed ^ (mixed >>> 16), 0x85ebca6b);
  mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
  return mixed ^ (mixed >>> 16);
}
