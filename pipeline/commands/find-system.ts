import { nameKey } from "../properties/name-key.ts";
import { nearNames } from "../properties/near-names.ts";
import type { SubstanceIndex } from "../properties/substances.ts";
import type { System } from "../records/systems.ts";

/** The system that was meant, or those that it could be: several that fit, or names that are close. */
export type FoundSystem =
  | { readonly system: System }
  | { readonly system?: undefined; readonly fitting: readonly System[]; readonly near: readonly System[] };

/** Longest text looked for; a longer one can be no system. */
const LONGEST = 400;

/** `solute in solvent` as it is compared: case, blanks and dashes folded. */
function titleKey({ identity: { solute, solvent } }: System): string {
  return `${nameKey(solute)} in ${nameKey(solvent)}`;
}

/** Names as the tables know them: a synonym becomes the name of its substance, others stay. */
function inTableNames(wanted: string, index: SubstanceIndex): string | undefined {
  const [, solute, solvent] = /^(.+?)\s+in\s+(.+)$/i.exec(wanted) ?? [];
  if (solute === undefined || solvent === undefined) return undefined;
  const name = (text: string) => index.resolve(text)?.substance.name ?? index.byName(text)?.name ?? text;
  return `${nameKey(name(solute))} in ${nameKey(name(solvent))}`;
}

/**
 * Finds a system by its id, by `solute in solvent` (synonyms of the tables included), or by a part of its id or title
 * that fits one system alone. Nothing is guessed: where several fit, all of them are given back.
 */
export function findSystem(systems: readonly System[], text: string, index: SubstanceIndex): FoundSystem {
  const wanted = text.slice(0, LONGEST).trim();
  const exact = systems.find(({ id }) => id === wanted);
  if (exact !== undefined) return { system: exact };
  const title = inTableNames(wanted, index);
  const titled = title === undefined ? [] : systems.filter((system) => titleKey(system) === title);
  const part = nameKey(index.byName(wanted)?.name ?? wanted);
  const parts =
    part === ""
      ? []
      : systems.filter((system) => system.id.includes(wanted.toLowerCase()) || plainTitle(system).includes(part));
  const fitting = titled.length > 0 ? titled : parts;
  const [only] = fitting;
  if (only !== undefined && fitting.length === 1) return { system: only };
  return { fitting, near: fitting.length > 0 ? [] : nearSystems(systems, title ?? wanted) };
}

const plainTitle = ({ identity: { solute, solidForm, solvent, composition, medium } }: System): string =>
  nameKey(`${solute} in ${[solvent, composition, medium, solidForm].join(" ")}`);

/** Systems whose title is close to a text. */
function nearSystems(systems: readonly System[], wanted: string): System[] {
  const titles = systems.map((system) => [nameKey(titleKey(system)), system.id] as const);
  const near = new Set(nearNames(wanted, titles, 5));
  return systems.filter(({ id }) => near.has(id));
}
