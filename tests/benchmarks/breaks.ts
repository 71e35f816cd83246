/**
 * How often a change of the solid is found where there is one and where there is none, and how often the limits of its
 * temperature hold the true one, on invented systems by one to three sources that scatter by 1 to 3 %.
 *
 * npx tsx tests/benchmarks/breaks.ts [SYSTEMS] [FIRST SEED]
 */
import type { RandomSource } from "../../pipeline/numerics/random.ts";
import { branchesOf, world } from "../fit/branch-support.ts";

const systems = Number(process.argv[2] ?? 2000);
const seed = Number(process.argv[3] ?? 1001);
const sizes: readonly (readonly [string, (random: RandomSource) => number])[] = [
  ["6", () => 6],
  ["8", () => 8],
  ["12", () => 12],
  ["20", () => 20],
  ["6 to 20", (random) => 6 + random.integerBelow(15)],
];
/** Fall of the dissolution enthalpy at the break over R times 303 K: 0, 20, 35 and 60 kJ/mol. */
const falls = [0, 8, 14, 24] as const;

console.log(
  "| points | fall, kJ/mol | two branches, % | rising, % | limits hold, % | median error, K | CPU ms a system |",
);
console.log("| --- | --- | --- | --- | --- | --- | --- |");
for (const [name, points] of sizes) {
  for (const fall of falls) {
    const count = fall === 0 ? systems : Math.ceil(systems / 5);
    const made = world({ systems: count, seed, points, fall });
    const start = process.cpuUsage();
    const outcomes = branchesOf(made.points, 6, { aqueousSalt: false });
    const used = process.cpuUsage(start).user / 1000 / count;
    const pairs = outcomes.flatMap(({ pair }, i) =>
      pair === undefined
        ? []
        : [{ ...pair.transition, error: Math.abs(pair.transition.temperatureK - made.breakK[i]!) }],
    );
    const held = pairs.filter(({ low, high }, i) => {
      const trueK = outcomes.flatMap(({ pair }, k) => (pair === undefined ? [] : [made.breakK[k]!]))[i]!;
      return low <= trueK && trueK <= high;
    });
    const errors = pairs.map(({ error }) => error).sort((a, b) => a - b);
    const rising = outcomes.filter(({ found }) => found?.sense === "rises").length;
    const percent = (part: number, whole: number) =>
      whole === 0 ? "" : ((100 * part) / whole).toFixed(part === whole ? 0 : 2);
    const kilojoule = ((fall * 8.314462618 * 303) / 1000).toFixed(0);
    console.log(
      `| ${name} | ${kilojoule} | ${percent(pairs.length, count)} | ${percent(rising, count)} | ${fall === 0 ? "" : percent(held.length, pairs.length)} | ${fall === 0 ? "" : (errors[errors.length >> 1]?.toFixed(2) ?? "")} | ${used.toFixed(2)} |`,
    );
  }
}
