import { otherNumeral } from "../properties/form-name.ts";
import { nameKey, racemateKeys, unlistedName } from "../properties/name-key.ts";
import type { SubstanceIndex } from "../properties/substances.ts";
import type { Identity } from "../records/systems.ts";
import { skeletonOf } from "./identifier-agreement.ts";
import type { RegisteredSolute } from "./registered-solutes.ts";

/** Keys that may stand for one substance, and why. */
export interface PossibleDuplicate {
  readonly keys: readonly string[];
  readonly found: string;
  /** They share the skeleton but not the stereochemistry. */
  readonly stereo: boolean;
}

/** Spelling that blanks, hyphens and the prefix of a racemate leave. */
function barest(name: string): string {
  const [racemic] = racemateKeys(name);
  return (racemic ?? nameKey(name)).replace(/[-,]/g, "");
}

const skeletonIn = (text: string): string => skeletonOf(text.replace(/^InChIKey=/i, ""));

/**
 * Values that tell a solute, each with the words to say what is shared. A name of the tables is none: an unlisted solute
 * that bears one contradicts it, which is told at the row.
 */
function marksOf({ key, spellings }: RegisteredSolute, index: SubstanceIndex): [mark: string, words: string][] {
  return [...spellings.values()].flatMap(({ solute, cas, inchikey }): [string, string][] => [
    ...(solute === "" || (key !== unlistedName(solute) && index.resolve(solute) !== undefined)
      ? []
      : [[`name ${barest(solute)}`, `the name "${solute}"`] as [string, string]]),
    ...(cas === "" ? [] : [[`number ${cas.replace(/\D/g, "")}`, `the registry number ${cas}`] as [string, string]]),
    ...(inchikey === ""
      ? []
      : [[`skeleton ${skeletonIn(inchikey)}`, `the skeleton ${skeletonIn(inchikey)}`] as [string, string]]),
  ]);
}

/**
 * Solutes under different keys that share a name (but for case, blanks, hyphens or the prefix of a racemate), a registry
 * number or the first block of an InChIKey. They stay apart; at least one of each group is in no table.
 */
export function duplicateSolutes(
  solutes: ReadonlyMap<string, RegisteredSolute>,
  index: SubstanceIndex,
): PossibleDuplicate[] {
  const sharing = new Map<string, { words: string; keys: Set<string> }>();
  const add = (mark: string, words: string, key: string) => {
    const group = sharing.get(mark) ?? { words, keys: new Set() };
    sharing.set(mark, group);
    group.keys.add(key);
  };
  for (const solute of solutes.values())
    for (const [mark, words] of marksOf(solute, index)) add(mark, words, solute.key);
  for (const { name, inchikey } of index.substances) {
    const mark = inchikey === undefined ? "" : `skeleton ${skeletonOf(inchikey)}`;
    if (sharing.has(mark)) add(mark, "", index.resolve(name)?.substance.name ?? name);
  }
  const unlisted = (key: string) => solutes.get(key)?.substance === undefined && solutes.has(key);
  const told = new Set<string>();
  return [...sharing]
    .map(([mark, { words, keys }]) => ({ mark, words, keys: [...keys].sort() }))
    .filter(
      ({ keys }) => keys.length > 1 && keys.some(unlisted) && !told.has(keys.join("\n")) && told.add(keys.join("\n")),
    )
    .map(({ mark, words, keys }) => ({
      keys,
      stereo: mark.startsWith("skeleton"),
      found: `${keys.map((key) => `"${key}"`).join(" and ")} share ${words}`,
    }));
}

/** Forms of one solute that differ in the kind of numeral only (`form 1` and `form I`): they stay apart. */
export function duplicateForms(identities: readonly Identity[]): string[] {
  const formsOf = new Map<string, Set<string>>();
  for (const { solute, solidForm } of identities)
    formsOf.set(solute, (formsOf.get(solute) ?? new Set()).add(solidForm));
  return [...formsOf].flatMap(([solute, forms]) =>
    [...forms]
      .filter((form) => /\d$/.test(form) && forms.has(otherNumeral(form) ?? ""))
      .sort()
      .map((form) => `${solute} ${form} and ${solute} ${otherNumeral(form)}`),
  );
}

/** Systems told apart by a statement of stereochemistry whose stereoisomer is listed as a substance of its own. */
export function duplicateStereoisomers(identities: readonly Identity[], index: SubstanceIndex): string[] {
  const found = identities.flatMap(({ solute, medium }) => {
    const word = /(?:^|; )(\([RS+-]\)|[DL])$/.exec(medium)?.[1];
    const isomer = word === undefined ? undefined : index.resolve(`${word}-${solute}`)?.substance.name;
    return isomer === undefined || isomer === solute ? [] : [`${solute} with stereochemistry ${word} and ${isomer}`];
  });
  return [...new Set(found)].sort();
}
