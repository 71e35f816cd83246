import { KEY_STEP } from "../../bases/compositions.ts";
import { type Problem, problem } from "../../problems/catalogue.ts";
import type { Identity } from "../../records/systems.ts";
import type { IdentityRegister } from "../source.ts";

type Fractions = ReadonlyMap<string, number>;

/** Compositions nearer than this in every mass fraction are neighbours. */
const NEIGHBOURING = KEY_STEP / 2;
const ROUNDING = 1e-9;

/** Largest difference of two compositions in a mass fraction, over the components of both. */
function distance(a: Fractions, b: Fractions): number {
  let most = 0;
  for (const name of new Set([...a.keys(), ...b.keys()])) {
    most = Math.max(most, Math.abs((a.get(name) ?? 0) - (b.get(name) ?? 0)));
  }
  return most;
}

/** The nearest pair of compositions of two identities, where it is a pair of neighbours. */
function neighbours(a: Iterable<Fractions>, b: readonly Fractions[]): readonly [Fractions, Fractions] | undefined {
  let best: readonly [Fractions, Fractions] | undefined;
  let least = NEIGHBOURING + ROUNDING;
  for (const one of a) {
    for (const other of b) {
      const apart = distance(one, other);
      if (apart >= least) continue;
      least = apart;
      best = [one, other];
    }
  }
  return best;
}

const shown = (fractions: Fractions): string =>
  [...fractions].map(([name, w]) => `${Number((100 * w).toFixed(3))} wt % ${name}`).join(", ");

const nameOf = ({ solvent, composition }: Identity): string =>
  composition === "" ? `plain ${solvent}` : `${solvent} ${composition}`;

/**
 * Notices of compositions of one solute that differ by at most 0.0025 in mass fraction and yet have different composition
 * keys, so that they are different systems: one notice a pair of systems, with the nearest two compositions.
 */
export function compositionNotices({ identities, compositions }: IdentityRegister): Problem[] {
  const groups = new Map<string, number[]>();
  for (const index of [...compositions.keys()].sort((a, b) => a - b)) {
    const { solute, solidForm, medium, solventComponents } = identities[index] as Identity;
    // Neighbours have their main component in common, or nearly the same two in equal parts.
    const components = [...(compositions.get(index)?.values() ?? [])].flatMap((one) => [...one.keys()]);
    const key = JSON.stringify([solute, solidForm, medium, [...new Set(components)].sort()]);
    if (solventComponents.length > 0) groups.set(key, [...(groups.get(key) ?? []), index]);
  }
  const notices: Problem[] = [];
  for (const group of groups.values()) {
    group.forEach((a, i) => {
      for (const b of group.slice(i + 1)) {
        const others = [...(compositions.get(b)?.values() ?? [])];
        const pair = neighbours(compositions.get(a)?.values() ?? [], others);
        if (pair === undefined) continue;
        const [one, other] = [identities[a], identities[b]] as [Identity, Identity];
        const found = `${one.solute}: ${shown(pair[0])} (${nameOf(one)}) and ${shown(pair[1])} (${nameOf(other)})`;
        notices.push(problem("nearby-compositions", { file: "sources" }, { found }));
      }
    });
  }
  return notices;
}
