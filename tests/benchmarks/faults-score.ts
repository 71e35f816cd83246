import { robustFits } from "../../pipeline/fit/robust/robust-fit.ts";
import type { Flag } from "../../pipeline/records/fits.ts";
import { DEFAULT_SETTINGS } from "../../pipeline/records/generated/collection.ts";
import { materialThreshold } from "../../pipeline/screen/material-threshold.ts";
import { screen } from "../../pipeline/screen/screen.ts";
import type { World } from "./faults-world.ts";

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
    curves: [],
    about: world.systems.map(() => ({ kind: "general", boilingPointK: Number.NaN, freezingPointK: Number.NaN })),
    settings: DEFAULT_SETTINGS,
  });
}

/** Hits among cases. */
export interface Tally {
  hits: number;
  cases: number;
}

export type Score = Map<string, Tally>;

/** A system as the score sees it. */
interface Scored {
  readonly world: World;
  readonly add: (name: string, hit: boolean) => void;
  readonly miss: (text: string) => void;
  readonly ofRow: ReadonlyMap<number, Flag>;
  readonly ofBlock: ReadonlyMap<string, Flag>;
  /** Blocks whose cause has been scored. */
  readonly toldBlocks: Set<string>;
  readonly conflict: boolean;
  readonly system: number;
  readonly sources: number;
  /** At least two sources, more than half of them without a fault of the whole block. */
  readonly majority: boolean;
}

/** Faults that bend a series; its rows are clean as long as they are bent by less than can be seen. */
const BENT: ReadonlySet<string> = new Set([
  ...["everything dissolved", "loss on filtration", "solvent lost", "not at equilibrium", "temperature offset"],
]);
const NO_CAUSE = "no simple cause";

/** Adds one world to the score; what went wrong is told in `misses`. */
export function scoreWorld(world: World, score: Score, misses: string[] = []): void {
  const flags = screenWorld(world);
  const add = (name: string, hit: boolean) => {
    const tally = score.get(name) ?? { hits: 0, cases: 0 };
    score.set(name, tally);
    tally.cases++;
    if (hit) tally.hits++;
  };
  const ofRow = new Map(flags.filter((f) => f.code === "off-curve").map((f) => [f.row!, f]));
  const blocks = flags.filter((f) => f.scope === "block" && f.severity === "blocking");
  const ofBlock = new Map(blocks.map((f) => [`${f.system}:${f.source}`, f]));
  const conflicts = new Set(flags.filter((f) => f.code === "sources-disagree").map((f) => f.system!));
  for (const { index, rows } of world.systems) {
    const points = [...rows].filter((row) => world.table.state[row] === 0);
    const sources = [...new Set(points.map((row) => world.table.source[row]!))];
    const bent = new Set(
      points.filter((row) => BENT.has(world.faultOfRow[row]!)).map((row) => world.table.source[row]!),
    );
    const sound = sources.filter((source) => !world.faultOfBlock.has(`${index}:${source}`) && !bent.has(source));
    const majority = sources.length >= 2 && sound.length * 2 > sources.length;
    const of: Scored = {
      ...{ world, add, ofRow, ofBlock, majority },
      miss: (text) => misses.push(text),
      toldBlocks: new Set(),
      conflict: conflicts.has(index),
      system: index,
      sources: sources.length,
    };
    if (sources.length >= 2 && sound.length === sources.length) {
      add("conflicts without a faulty block", of.conflict);
      if (of.conflict) of.miss(`false conflict in ${index}`);
    }
    for (const source of sources) {
      const block = points.filter((row) => world.table.source[row] === source);
      const kind = world.faultOfBlock.get(`${index}:${source}`);
      if (kind !== undefined) scoreBlock(of, source, block, kind);
      else for (const row of block) scoreRow(of, source, row);
    }
  }
}

function scoreBlock(of: Scored, source: number, block: readonly number[], kind: string): void {
  const { world, add, miss, ofRow } = of;
  if (block.length < 2 || block.filter((row) => isVisible(world, row)).length * 2 <= block.length) return;
  if (of.sources === 2) {
    add("two-source conflicts reported", of.conflict);
    if (!of.conflict)
      miss(`conflict ${kind} ${of.system}:${source}, ${block.map((r) => world.shiftOfRow[r]!.toFixed(2))}`);
  }
  if (!of.majority) return;
  const key = `${of.system}:${source}`;
  const flag = of.ofBlock.get(key);
  const found = flag !== undefined || block.filter((row) => ofRow.has(row)).length * 2 > block.length;
  add("recall, blocks", found);
  add(`  block ${kind}`, found);
  if (!found) miss(`block ${kind} ${key} not found, conflict ${of.conflict}`);
  if (flag === undefined) return;
  scoreCause(of, flag, kind, "block");
}

function scoreRow(of: Scored, source: number, row: number): void {
  const { world, add, miss } = of;
  const key = `${of.system}:${source}`;
  const fault = world.faultOfRow[row]!;
  const flag = of.ofRow.get(row);
  const flagged = flag !== undefined || of.ofBlock.has(key);
  const shift = world.shiftOfRow[row]!.toFixed(3);
  if (fault === "") {
    const name = world.transitionSystems.has(of.system) ? "transition" : "clean";
    add(`false flags, ${name} rows`, flagged);
    add("clean rows given a cause", flag !== undefined && flag.suspectedCause !== NO_CAUSE);
    const told = flag ?? of.ofBlock.get(key);
    if (told !== undefined) miss(`false, ${name} row ${key} shift ${shift}, ${told.suspectedCause}: ${told.evidence}`);
    return;
  }
  if (!isVisible(world, row)) return;
  const bent = BENT.has(fault);
  if (bent) {
    if (of.majority) add("recall, bent series", flagged);
    if (of.majority && !flagged)
      miss(`bent ${fault} ${key} shift ${shift} not found, ${of.sources} sources, conflict ${of.conflict}`);
    // A flag on the whole block is one case, not one a row.
    const told = flag ?? (of.toldBlocks.has(key) ? undefined : of.ofBlock.get(key));
    if (flag === undefined) of.toldBlocks.add(key);
    if (of.majority && told !== undefined) scoreCause(of, told, fault, "series");
    return;
  }
  add(of.majority ? "recall, points" : "recall, points, one source or no majority", flagged);
  if (!flagged && of.majority) miss(`point ${fault} ${key} shift ${shift} not found, conflict ${of.conflict}`);
  if (flag !== undefined) scoreCause(of, flag, fault, "point");
}

function scoreCause({ world, add, miss }: Scored, flag: Flag, fault: string, level: string): void {
  if (fault === "random") {
    add("cause given to random faults", flag.suspectedCause !== NO_CAUSE);
    add(`  cause given to random faults, ${level}s`, flag.suspectedCause !== NO_CAUSE);
    if (flag.suspectedCause !== NO_CAUSE)
      miss(`random ${level} named ${flag.suspectedCause}: ${flag.causeDetail} ${flag.causeProbability}`);
    return;
  }
  const right = flag.suspectedCause === fault;
  add("cause right", right);
  add(`  ${level} cause ${fault}`, right);
  const off =
    flag.row === undefined ? "" : ` (ln x off by ${world.shiftOfRow[flag.row]!.toFixed(2)}; ${flag.evidence})`;
  if (!right) miss(`${level} ${fault} named ${flag.suspectedCause}: ${flag.causeDetail}${off}`);
  if (flag.proposedValue === undefined || flag.row === undefined) return;
  add("proposed value within 5 %", Math.abs(flag.proposedValue / world.trueReported[flag.row]! - 1) < 0.05);
}

/** Whether a fault moves the row by more than 0.2 in ln x and by more than its material threshold. */
function isVisible(world: World, row: number): boolean {
  const { table } = world;
  const material = materialThreshold(table.massConcentration[row]!, table.relativeU[row]!, "general", DEFAULT_SETTINGS);
  return Math.abs(world.shiftOfRow[row]!) > Math.max(0.2, material);
}
