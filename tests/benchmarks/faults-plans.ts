import type { RandomSource } from "../../pipeline/numerics/random.ts";

/** How often what belongs to more than one block goes wrong; shares. */
export interface PlanOptions {
  /** Of pairs of a source and a solute: the source had another solid form of it, in every solvent. */
  readonly forms: number;
  /** Of pairs of a source and an organic solvent: the bottle was wet. */
  readonly wet: number;
  /** Worlds have one source that is off everywhere. */
  readonly offEverywhere: boolean;
}

/** What is wrong with a block by more than its own bad luck: the cause, and the deviation of ln x by temperature (K). */
export interface Plan {
  readonly kind: string;
  /** Deviation given ln x by temperature. */
  readonly shift: (temperatureK: number, truth: (temperatureK: number) => number) => number;
}

/** Finds the plan of a block by its solute, solvent and source. */
export type PlanFinder = (solute: number, solvent: string, source: number) => Plan | undefined;

/**
 * Draws what is wrong in more than one block: another solid form, whose ratio is nearly one over the solvents and drifts
 * with temperature; a wet bottle, which moves one solute more than the other; a source whose thermometer, or whose
 * calibration, is off in all it measured.
 */
export function drawPlans(random: RandomSource, options: PlanOptions, solutes: number, sources: number): PlanFinder {
  const part = (from: number, to: number) => from + (to - from) * random.uniform();
  const everywhere = options.offEverywhere ? offEverywhere(random) : undefined;
  const badSource = random.integerBelow(sources);
  const forms = new Map<string, { ratio: number; drift: number }>();
  const wet = new Map<string, number>();
  for (let source = 0; source < sources; source++) {
    for (let solute = 0; solute < solutes; solute++)
      if (random.uniform() < options.forms) {
        const ratio = part(0.25, 1) * (random.uniform() < 0.7 ? 1 : -1);
        forms.set(`${solute}:${source}`, { ratio, drift: part(0.002, 0.008) });
      }
    for (const solvent of ["solvent A", "solvent B", "solvent C", "solvent D", "solvent E"])
      if (random.uniform() < options.wet) wet.set(`${solvent}:${source}`, random.uniform() < 0.7 ? 1 : -1);
  }
  return (solute, solvent, source) => {
    if (everywhere !== undefined && source === badSource) return everywhere;
    const form = forms.get(`${solute}:${source}`);
    if (form !== undefined) {
      const ratio = form.ratio + 0.01 * random.normal();
      return { kind: "another solid form", shift: (T) => ratio * (1 - form.drift * (T - 298)) };
    }
    const side = wet.get(`${solvent}:${source}`);
    if (side === undefined) return undefined;
    const by = side * part(0.1, 0.7);
    return { kind: "wet solvent", shift: () => by };
  };
}

function offEverywhere(random: RandomSource): Plan {
  const side = random.uniform() < 0.5 ? -1 : 1;
  const kind = random.integerBelow(3);
  if (kind === 0) {
    const by = side * (4 + 6 * random.uniform());
    return { kind: "temperature offset", shift: (T, truth) => truth(T + by) - truth(T) };
  }
  if (kind === 1) {
    const lag = 0.1 + 0.15 * random.uniform();
    return { kind: "temperature offset", shift: (T, truth) => truth(T - lag * (T - 295)) - truth(T) };
  }
  const by = side * (0.2 + 0.5 * random.uniform());
  return { kind: "random", shift: () => by };
}
