import { fQuantile } from "../../pipeline/numerics/distributions.ts";
import { type Score, scoreWorld, type Tally } from "./faults-score.ts";
import { makeWorld, USUAL, type WorldOptions } from "./faults-world.ts";

/**
 * Prints what screening finds in invented worlds of known faults, scene by scene and in all:
 * `tsx faults.ts [SEEDS] [SCENE] [FIRST SEED] [--misses] [--pooled]`. The same seeds give the same figures on every machine.
 */
const SCENES: Readonly<Record<string, Partial<WorldOptions>>> = {
  usual: {},
  "between sources 8 %": { between: 0.08 },
  "steep curves": { steepest: 90 },
  "few points": { temperatures: [2, 4] },
  "three to five sources": { sources: [3, 5] },
  "many faulty blocks": { sources: [3, 5], blockFaults: 0.15, singleFaults: 0.01 },
  "forms, bottles, days": { sources: [2, 4], blockFaults: 0.05, rareKinds: true, forms: 0.06, wet: 0.08 },
  "a source off everywhere": { sources: [2, 4], blockFaults: 0.02, offEverywhere: true },
  mixtures: { sources: [2, 4], solutes: 15, mixtures: true },
};

const [seeds = "5", only = "", from = "1"] = process.argv.slice(2).filter((argument) => !argument.startsWith("--"));
const verbose = process.argv.includes("--misses");
const pooledOnly = process.argv.includes("--pooled");
const all: Score = new Map();
for (const [name, scene] of Object.entries(SCENES)) {
  if (!name.startsWith(only)) continue;
  const score: Score = new Map();
  const misses: string[] = [];
  const last = Number(from) + Number(seeds) - 1;
  for (let seed = Number(from); seed <= last; seed++)
    scoreWorld(makeWorld({ ...USUAL, ...scene, seed }), score, misses);
  if (!pooledOnly) print(`${name} (seeds ${from} to ${last})`, score);
  for (const [line, { hits, cases }] of score) {
    const tally = all.get(line) ?? { hits: 0, cases: 0 };
    all.set(line, { hits: tally.hits + hits, cases: tally.cases + cases });
  }
  if (verbose) for (const miss of misses) console.log(`- ${miss}`);
}
print("all scenes", all);

function print(name: string, score: Score): void {
  console.log(`\n${name}`);
  for (const [line, tally] of [...score].sort((a, b) => (a[0] < b[0] ? -1 : 1))) console.log(`${line}: ${told(tally)}`);
}

/** `97 of 100 (97.00 %, 91.48 to 99.38)`: share with its 95 % limits by Clopper and Pearson. */
function told({ hits, cases }: Tally): string {
  const percent = (share: number) => (100 * share).toFixed(2);
  const [low, high] = clopperPearson(hits, cases);
  return `${hits} of ${cases} (${percent(hits / cases)} %, ${percent(low)} to ${percent(high)})`;
}

/** Exact 95 % limits of a share, from F quantiles. */
function clopperPearson(hits: number, cases: number): [low: number, high: number] {
  const misses = cases - hits;
  const below = hits === 0 ? 0 : hits / (hits + (misses + 1) * fQuantile(0.975, 2 * (misses + 1), 2 * hits));
  const odds = misses === 0 ? 1 : (hits + 1) * fQuantile(0.975, 2 * (hits + 1), 2 * misses);
  return [below, misses === 0 ? 1 : odds / (misses + odds)];
}
