import type { Substance, SubstanceIndex } from "../../properties/substances.ts";

/** Components in the order named, with the text each was found under. */
export type NameSplit = readonly { readonly substance: Substance; readonly text: string }[];

/** What may stand between the names of two components; most of it may also stand inside a name. */
const SEPARATOR = /[/+:;,&|-]|\s(?:and|in|with)\s/g;
const SEPARATOR_OR_BLANK = /[/+:;,&|-]|\s(?:and|in|with)\s|\s+/g;
/** Never inside a name: for telling what the unknown component of a cell is. */
const CLEAR = /[/+:;&|]|\s(?:and|in|with)\s|\s-\s/;

/** Longest text and most pieces looked at: a hostile cell may have a million characters. */
const LONGEST = 240;
const MOST_PIECES = 28;
/** Components above which it only matters that there are too many. */
const MOST_COMPONENTS = 6;

/** A substance by name or identifier; spellings that are only near find none. */
export function listedSubstance(text: string, index: SubstanceIndex): Substance | undefined {
  return index.byName(text) ?? index.byCas(text) ?? index.byInchikey(text);
}

/**
 * All ways to divide a text into names of listed substances. Hyphens, commas and digits belong to many names
 * (`1,4-dioxane`, `N,N-dimethylformamide`), so every division is tried against the tables. Blanks divide only where
 * nothing else does. Empty where a part is in no table.
 *
 * @param clean takes what is no part of a name off a piece
 */
export function nameSplits(text: string, index: SubstanceIndex, clean: (piece: string) => string): NameSplit[] {
  if (text.length > LONGEST) return [];
  const marked = splitsAt(text, SEPARATOR, index, clean);
  return marked.length > 0 ? marked : splitsAt(text, SEPARATOR_OR_BLANK, index, clean);
}

function splitsAt(text: string, separator: RegExp, index: SubstanceIndex, clean: (piece: string) => string) {
  const pieces: { start: number; end: number }[] = [];
  let start = 0;
  for (const match of text.matchAll(separator)) {
    pieces.push({ start, end: match.index });
    start = match.index + match[0].length;
  }
  pieces.push({ start, end: text.length });
  if (pieces.length > MOST_PIECES) return [];

  const known = new Map<string, Substance | undefined>();
  const lookup = (piece: string): Substance | undefined => {
    const name = clean(piece);
    if (name === "") return undefined;
    if (!known.has(name)) known.set(name, listedSubstance(name, index));
    return known.get(name);
  };
  const splits = new Map<string, NameSplit>();
  const walk = (from: number, found: NameSplit) => {
    if (splits.size > 2 || found.length > MOST_COMPONENTS) return;
    let at = from;
    while (at < pieces.length && clean(text.slice(pieces[at]?.start, pieces[at]?.end)) === "") at++;
    if (at === pieces.length) {
      const key = found.map(({ substance }) => substance.name).join("\u0000");
      if (found.length > 0 && !splits.has(key)) splits.set(key, found);
      return;
    }
    // Marks without a name (a number, say) go with the piece that follows them, or with the last.
    const begin = from === at || found.length === 0 ? (pieces[from]?.start ?? 0) : (pieces[at]?.start ?? 0);
    for (let last = at; last < pieces.length; last++) {
      const piece = text.slice(begin, pieces[last]?.end);
      const substance = lookup(piece);
      if (substance !== undefined) walk(last + 1, [...found, { substance, text: piece }]);
    }
  };
  walk(0, []);
  return [...splits.values()];
}

/** The parts of a text that are in no table, and how many parts it seems to have; for a message. */
export function unknownParts(
  text: string,
  index: SubstanceIndex,
  clean: (piece: string) => string,
): { readonly unknown: readonly string[]; readonly count: number } {
  const short = text.slice(0, LONGEST);
  const clear = short
    .split(CLEAR)
    .map(clean)
    .filter((part) => part !== "");
  const parts = clear.length > 1 ? clear : hyphenated(short, index, clean);
  return { unknown: parts.filter((part) => listedSubstance(part, index) === undefined), count: parts.length };
}

/** Two parts at the hyphen or comma that leaves a listed name on one of its sides; else the text as one part. */
function hyphenated(text: string, index: SubstanceIndex, clean: (piece: string) => string): string[] {
  for (const match of text.matchAll(/[-,]/g)) {
    const sides = [text.slice(0, match.index), text.slice(match.index + 1)].map(clean);
    if (sides.every((side) => side.length > 1) && sides.some((side) => listedSubstance(side, index))) return sides;
  }
  return [clean(text)].filter((part) => part !== "");
}
