import type { RisingKink } from "../../records/fits.ts";
import { breakSide } from "./break-carried.ts";
import { type BreakPoints, distinctTemperatures } from "./break-scan.ts";
import type { FoundBreak } from "./two-branch-fit.ts";

/** A break as a kink with the slopes (1/K) of straight lines through the three nearest temperatures on either side. */
export function kinkOf(points: BreakPoints, { breakK, probability }: FoundBreak): RisingKink {
  const distinct = distinctTemperatures(points);
  const cold = distinct.filter(({ lowK }) => lowK <= breakK).slice(-breakSide);
  const warm = distinct.filter(({ lowK }) => lowK > breakK).slice(0, breakSide);
  const slope = (side: typeof distinct) => slopeBetween(points, side[0]!.lowK, side.at(-1)!.highK);
  return { temperatureK: breakK, probability, slopeBelow: slope(cold), slopeAbove: slope(warm) };
}

/** Least-squares slope d ln value/dT of the points between two temperatures, sources apart by their own means, 1/K. */
function slopeBetween({ n, temperatureK, lnValue, block, nBlocks }: BreakPoints, lowK: number, highK: number): number {
  const inside = Array.from({ length: n }, (_, i) => i).filter(
    (i) => temperatureK[i]! >= lowK && temperatureK[i]! <= highK,
  );
  let [products, squares] = [0, 0];
  for (let b = 0; b < nBlocks; b++) {
    const own = inside.filter((i) => block[i] === b);
    const mean = (values: Float64Array) => own.reduce((sum, i) => sum + values[i]!, 0) / own.length;
    const [T0, y0] = [mean(temperatureK), mean(lnValue)];
    for (const i of own) {
      products += (temperatureK[i]! - T0) * (lnValue[i]! - y0);
      squares += (temperatureK[i]! - T0) ** 2;
    }
  }
  return squares > 0 ? products / squares : 0;
}
