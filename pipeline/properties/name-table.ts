import { parseFormula } from "./formula.ts";
import type { Draft } from "./layered-tables.ts";
import { hillFormula } from "./molar-mass.ts";
import { nameKey } from "./name-key.ts";
import type { BareSubstance } from "./substance-from-draft.ts";

/** Names of substances; a place is an index into the list of substances. */
export interface NameTable {
  /** The one substance a text means; undefined if none or several. */
  readonly only: (text: string) => number | undefined;
  readonly all: (text: string) => readonly number[];
  /** Names that could mean several substances. */
  readonly ambiguous: ReadonlyArray<{ readonly text: string; readonly places: readonly number[] }>;
  /** Every folded spelling with the name of its substance. */
  readonly spellings: () => Iterable<readonly [key: string, name: string]>;
}

interface Entry {
  readonly text: string;
  /** 0 name, 1 synonym, 2 written formula: a lower rank wins. */
  readonly rank: number;
  readonly layer: number;
  readonly place: number;
}

/**
 * Table of names: the main name of a substance wins over a synonym of another, a synonym over a written formula, and a
 * later table over an earlier one. Spelling and case as given are compared first (`CoCl2` is not `COCl2`), then the
 * folded spelling.
 */
export function nameTable(substances: readonly BareSubstance[], drafts: readonly Draft[]): NameTable {
  const exact = new Map<string, Entry[]>();
  const folded = new Map<string, Entry[]>();
  for (const [place, substance] of substances.entries()) {
    const layer = drafts[place]?.layer ?? 0;
    for (const { text, rank } of namesOf(substance)) {
      const entry = { text, rank, layer, place };
      push(exact, text, entry);
      push(folded, nameKey(text), entry);
    }
  }
  const all = (text: string): readonly number[] => {
    const asGiven = best(exact.get(text.trim()));
    return asGiven.length > 0
      ? asGiven
      : best(folded.get(nameKey(text))?.filter((entry) => !otherFormula(text, entry)));
  };
  const only = (text: string) => {
    const places = all(text);
    return places.length === 1 ? places[0] : undefined;
  };
  return { only, all, ambiguous: ambiguousOf(exact), spellings: () => spellings(folded, substances) };
}

/** Two formulas that differ only in case are different substances: `CoCl2` and `COCl2`. */
function otherFormula(text: string, entry: Entry): boolean {
  const given = parseFormula(text);
  const known = parseFormula(entry.text);
  if ("fault" in given || "fault" in known) return false;
  return hillFormula(given.elements) !== hillFormula(known.elements);
}

function namesOf({ name, synonyms, formula, salt }: BareSubstance): { text: string; rank: number }[] {
  const names = [{ text: name, rank: 0 }, ...synonyms.map((text) => ({ text, rank: 1 }))];
  const telling = formula !== undefined && (salt !== undefined || !/C(?![a-z])/.test(formula));
  return telling ? [...names, { text: formula, rank: 2 }] : names;
}

function push(map: Map<string, Entry[]>, key: string, entry: Entry): void {
  const entries = map.get(key);
  if (entries === undefined) map.set(key, [entry]);
  else entries.push(entry);
}

/** Places of the entries that win: lowest rank, then latest layer. */
function best(entries: readonly Entry[] | undefined): number[] {
  if (entries === undefined) return [];
  const rank = Math.min(...entries.map((entry) => entry.rank));
  const ranked = entries.filter((entry) => entry.rank === rank);
  const layer = Math.max(...ranked.map((entry) => entry.layer));
  return [...new Set(ranked.filter((entry) => entry.layer === layer).map((entry) => entry.place))];
}

function ambiguousOf(exact: ReadonlyMap<string, readonly Entry[]>) {
  return [...exact]
    .filter(([, entries]) => entries.some(({ rank }) => rank < 2))
    .map(([text, entries]) => ({ text, places: best(entries) }))
    .filter(({ places }) => places.length > 1);
}

function* spellings(
  folded: ReadonlyMap<string, readonly Entry[]>,
  substances: readonly BareSubstance[],
): Iterable<readonly [key: string, name: string]> {
  for (const [key, entries] of folded) {
    for (const place of best(entries)) yield [key, substances[place]?.name ?? ""];
  }
}
