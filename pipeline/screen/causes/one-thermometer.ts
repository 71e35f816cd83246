import { counted, threeDigits } from "../wording.ts";
import { blockReadingPrior } from "./compete-block.ts";
import { type AcrossSystems, type SideBySide, soundThough } from "./side-by-side.ts";
import { BY_CONSTANT, CONSTANT_SD_K, FROM_ROOM, JACKET_SD, ROOM_K, temperatureOffset } from "./temperature-offset.ts";

/** Noise of a deviation about the pattern, and offset of a source, ln value: what an amplitude is uncertain by. */
const [NOISE_SD, OFFSET_SD] = [0.025, 0.03];
/** Errors of one thermometer in two systems agree to this, part of their usual size. */
const AGREES_TO = 0.15;

/**
 * One thermometer, or one jacket read for the solution, in all that a source measured: the deviations of every system are
 * those of one error of temperature, though the systems differ in slope.
 *
 * Computes the error of each block from its deviations and the slope of the curve, and how well they agree.
 */
function oneError(detail: string, usual: number, unit: string, by: (temperatureK: number) => number): AcrossSystems {
  const shape = ({ slope, temperatureK }: SideBySide) => temperatureK.map((T) => slope * by(T));
  const amplitude = (block: SideBySide) => {
    const g = shape(block);
    const square = g.reduce((sum, value) => sum + value * value, 0);
    const sum = g.reduce((total, value) => total + value, 0);
    const crossed = g.reduce((total, value, i) => total + value * block.deviations[i]!, 0);
    const variance = NOISE_SD ** 2 / square + (OFFSET_SD * (sum / square)) ** 2;
    return { size: crossed / square, variance };
  };
  return {
    name: temperatureOffset.name,
    lookAt: temperatureOffset.lookAt,
    readings: [[`${temperatureOffset.name}: ${detail}`, blockReadingPrior(temperatureOffset, 0.5), 1]],
    applies: ({ slope }) => Math.abs(slope) > 0,
    together: () => true,
    likelihoodRatio: (first, other) => {
      const [a, b] = [amplitude(first), amplitude(other)];
      const variance = a.variance + b.variance + (AGREES_TO * usual) ** 2;
      const same = Math.exp((-0.5 * (a.size - b.size) ** 2) / variance) / Math.sqrt(variance);
      const wide = b.variance + usual ** 2;
      return same / (Math.exp((-0.5 * b.size ** 2) / wide) / Math.sqrt(wide));
    },
    ratioIfSound: (first, other) => {
      const { size } = amplitude(first);
      const g = shape(other);
      return soundThough((size * g.reduce((sum, value) => sum + Math.abs(value), 0)) / g.length, other);
    },
    priorOdds: 0.03,
    detail: (blocks) => {
      const sizes = blocks.map((block) => threeDigits(-amplitude(block).size));
      return `${detail} in ${counted(blocks.length, "system")}: by ${sizes.join(", ")} ${unit}`;
    },
  };
}

export const oneThermometer = oneError(BY_CONSTANT, CONSTANT_SD_K, "K", () => 1);
export const oneJacket = oneError(FROM_ROOM, JACKET_SD, "K per K", (T) => T - ROOM_K);
