import { robustFits } from "../../pipeline/fit/robust-fit.ts";
import type { Flag } from "../../pipeline/records/fits.ts";
import { DEFAULT_SETTINGS } from "../../pipeline/records/generated/collection.ts";
import { materialThreshold } from "../../pipeline/screen/material-threshold.ts";
import { screen } from "../../pipeline/screen/screen.ts";
import { makeWorld, USUAL, type World, type WorldOptions } from "./faults-world.ts";

/** Runs the whole screening on a world of known faults. */
export function screenWorld(world: World): Flag[] {
  const about = world.systems.map(({ identity }) => ({ aqueousSalt: false, water: identity.solvent === "water" }));
  const threshold = (system: number, point: number) => {
    const { level, lnU } = world.points[system]!;
    return materialThreshold(level[point]!, lnU[point]!, "general", DEFAULT_SETTINGS);
  };
  const { fits, scales } = robustFits(world.points, about, world.sourceNames.length, { threshold });
  return screen({
    ...world,
    fits,
    scales,
    about: world.systems.map(() => ({ kind: "general", boilingPointK: Number.NaN, freezingPointK: Number.NaN })),
    settings: DEFAULT_SETTINGS,
  });
}

/** A count of hits among cases. */
class Tally {
  hits = 0;
  cases = 0;
  add(hit: boolean): void {
    this.cases++;
    if (hit) this.hits++;
  }
  toString(): string {
    return `${this.hits} of ${this.cases} (${((100 * this.hits) / Math.max(1, this.cases)).toFixed(2)} %)`;
  }
}

export type Score = Map<string, Tally>;

/** Adds one world to the score. */
export function scoreWorld(world: World, score: Score, misses?: string[]): void {
  const flags = screenWorld(world);
  const add = (name: string, hit: boolean) => {
    const tally = score.get(name) ?? new Tally();
    score.set(name, tally);
    tally.add(hit);
  };
  const ofRow = new Map(flags.filter((f) => f.code === "off-curve").map((f) => [f.row!, f]));
  const ofBlock = new Map(
    flags.filter((f) => f.scope === "block" && f.severity === "blocking").map((f) => [`${f.system}:${f.source}`, f]),
  );
  const conflicts = new Set(flags.filter((f) => f.code === "sources-disagree").map((f) => f.system!));
  for (const system of world.systems) {
    const rows = [...system.rows].filter((row) => world.table.state[row] === 0);
    const sources = [...new Set(rows.map((row) => world.table.source[row]!))];
    const sound = sources.filter((source) => !world.faultOfBlock.has(`${system.index}:${source}`));
    const majority = sound.length >= 1 && sound.length * 2 > sources.length;
    for (const source of sources) {
      const block = rows.filter((row) => world.table.source[row] === source);
      const kind = world.faultOfBlock.get(`${system.index}:${source}`);
      const key = `${system.index}:${source}`;
      if (kind !== undefined) {
        const visible = block.filter((row) => isVisible(world, row)).length * 2 > block.length;
        if (!visible || block.length < 2) continue;
        if (sources.length === 2) add("two-source conflicts reported", conflicts.has(system.index));
        if (!majority || sources.length < 2) continue;
        const flag = ofBlock.get(key);
        const found = flag !== undefined || block.filter((row) => ofRow.has(row)).length * 2 > block.length;
        add("recall, blocks", found);
        add(`  block ${kind}`, found);
        if (!found)
          misses?.push(
            `block ${kind} ${system.index}:${source} conflict ${conflicts.has(system.index)} shift ${block.map((r) => world.shiftOfRow[r]!.toFixed(2))}`,
          );
        if (flag === undefined) continue;
        if (kind === "random") add("cause given to random faults", flag.suspectedCause !== "no simple cause");
        else add("cause right", flag.suspectedCause === kind);
        if (kind !== "random" && flag.suspectedCause !== kind)
          misses?.push(`block cause ${kind} named ${flag.suspectedCause} ${flag.causeDetail}`);
        continue;
      }
      for (const row of block) {
        const fault = world.faultOfRow[row]!;
        const flag = ofRow.get(row);
        if (fault === "") {
          const kindOf = world.transitionSystems.has(system.index)
            ? "false flags, transition rows"
            : "false flags, clean rows";
          add(kindOf, flag !== undefined || ofBlock.has(key));
          add("clean rows given a cause", flag !== undefined && flag.suspectedCause !== "no simple cause");
          if (flag !== undefined || ofBlock.has(key))
            misses?.push(
              `false ${kindOf} ${system.index}:${source} shift ${world.shiftOfRow[row]!.toFixed(3)} ${flag?.evidence ?? ofBlock.get(key)?.evidence}`,
            );
          continue;
        }
        if (!isVisible(world, row)) continue;
        if (majority && sources.length >= 2) {
          add("recall, points", flag !== undefined || ofBlock.has(key));
          if (flag === undefined)
            misses?.push(
              `point ${fault} ${system.index}:${source} shift ${world.shiftOfRow[row]!.toFixed(2)} conflict ${conflicts.has(system.index)} level ${world.table.massConcentration[row]!.toFixed(2)} block of ${block.length}`,
            );
        } else add("recall, points, one source or no majority", flag !== undefined);
        if (flag === undefined) continue;
        if (fault === "random") {
          add("cause given to random faults", flag.suspectedCause !== "no simple cause");
          if (flag.suspectedCause !== "no simple cause")
            misses?.push(
              `random named ${flag.suspectedCause} ${flag.causeDetail} p ${flag.causeProbability?.toFixed(2)} shift ${world.shiftOfRow[row]!.toFixed(2)}`,
            );
          continue;
        }
        add("cause right", flag.suspectedCause === fault);
        add(`  point cause ${fault}`, flag.suspectedCause === fault);
        if (flag.suspectedCause !== fault)
          misses?.push(
            `cause ${fault} named ${flag.suspectedCause} ${flag.causeDetail} p ${flag.causeProbability?.toFixed(2)} shift ${world.shiftOfRow[row]!.toFixed(2)}`,
          );
        if (flag.proposedValue !== undefined)
          add("proposed value within 5 %", Math.abs(flag.proposedValue / world.trueReported[row]! - 1) < 0.05);
      }
    }
  }
}

/** Whether a fault moves the row by more than 0.2 in ln x and by more than its material threshold. */
function isVisible(world: World, row: number): boolean {
  const { table } = world;
  const material = materialThreshold(table.massConcentration[row]!, table.relativeU[row]!, "general", DEFAULT_SETTINGS);
  return Math.abs(world.shiftOfRow[row]!) > Math.max(0.2, material);
}

const SCENES: Readonly<Record<string, Partial<WorldOptions>>> = {
  usual: {},
  "between sources 8 %": { between: 0.08 },
  "steep curves": { steepest: 90 },
  "few points": { temperatures: [2, 4] },
  "four sources": { sources: [3, 5] },
};

const seeds = Number(process.argv[2] ?? 5);
const verbose = process.argv.includes("--misses");
const only = process.argv[3];
for (const [name, scene] of Object.entries(SCENES)) {
  if (only !== undefined && !only.startsWith("--") && !name.startsWith(only)) continue;
  const score: Score = new Map();
  const misses: string[] = [];
  for (let seed = 1; seed <= seeds; seed++)
    scoreWorld(makeWorld({ ...USUAL, ...scene, seed }), score, verbose ? misses : undefined);
  console.log(`\n${name} (${seeds} seeds)`);
  for (const [line, tally] of [...score].sort((a, b) => (a[0] < b[0] ? -1 : 1))) console.log(`${line}: ${tally}`);
  for (const miss of misses) console.log(`- ${miss}`);
}
