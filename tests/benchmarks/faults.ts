import { type Score, scoreWorld } from "./faults-score.ts";
import { makeWorld, USUAL, type WorldOptions } from "./faults-world.ts";

/**
 * Prints what screening finds in invented worlds of known faults: `tsx faults.ts [SEEDS] [SCENE] [FIRST SEED] [--misses]`.
 * The same seeds give the same figures on every machine.
 */
const SCENES: Readonly<Record<string, Partial<WorldOptions>>> = {
  usual: {},
  "between sources 8 %": { between: 0.08 },
  "steep curves": { steepest: 90 },
  "few points": { temperatures: [2, 4] },
  "three to five sources": { sources: [3, 5] },
  "many faulty blocks": { sources: [3, 5], blockFaults: 0.15, singleFaults: 0.01 },
};

const [seeds = "5", only = "", from = "1"] = process.argv.slice(2).filter((argument) => !argument.startsWith("--"));
const verbose = process.argv.includes("--misses");
for (const [name, scene] of Object.entries(SCENES)) {
  if (!name.startsWith(only)) continue;
  const score: Score = new Map();
  const misses: string[] = [];
  const last = Number(from) + Number(seeds) - 1;
  for (let seed = Number(from); seed <= last; seed++)
    scoreWorld(makeWorld({ ...USUAL, ...scene, seed }), score, misses);
  console.log(`\n${name} (seeds ${from} to ${last})`);
  for (const [line, { hits, cases }] of [...score].sort((a, b) => (a[0] < b[0] ? -1 : 1)))
    console.log(`${line}: ${hits} of ${cases} (${((100 * hits) / Math.max(1, cases)).toFixed(2)} %)`);
  if (verbose) for (const miss of misses) console.log(`- ${miss}`);
}
