import type { CompositionBasis } from "../../bases/compositions.ts";

/** What words say of a composition; what they leave open is undefined. */
export interface BasisWords {
  readonly basis: CompositionBasis | undefined;
  /** True where two different bases are named. */
  readonly contradictory: boolean;
  /** Numbers are percent or fractions of 1. */
  readonly scale: "percent" | "fraction" | undefined;
  /** The fractions count the solute, or say that they do not. */
  readonly solute: "counted" | "free" | undefined;
  /** The text without the words. */
  readonly rest: string;
}

/**
 * Spellings of the bases, in the order in which they are looked for: `% vol` is alcoholometric, `vol %` is not. Every
 * pattern is a plain alternation without nested repetition, so a hostile cell costs linear time.
 */
const SPELLINGS: readonly (readonly [basis: CompositionBasis, spelling: RegExp])[] = [
  [
    "alcoholometric volume",
    /%\s?(?:abv|alc\.?\s?\/?\s?vol\.?|vol(?:\.|ume)?)(?![\w/%]|\s?(?:\/|%|before))|\ba\.?b\.?v\b\.?|\balcoholometric(?: volume| strength| degree)?|\balcohol by volume/gi,
  ],
  ["volume before mixing", /\bv(?:\s?[/:]\s?v){1,2}\b|\bvol\.?\s?[/:]\s?vol\b\.?|\bvol(?:\.|ume)?\s?-?(?=\s?%)/gi],
  [
    "volume before mixing",
    /\bby vol(?:ume|\.)?|\bvolume fractions?|\bvolumes? before mixing|\bvolumes?\b|\bvol\b\.?/gi,
  ],
  [
    "mass",
    /\b(?:w(?:\s?[/:]\s?w){1,2}|m(?:\s?[/:]\s?m){1,2})\b|\bwt\.?\s?[/:]\s?wt\b\.?|\b(?:mass|weight|wt)\.?\s?-?(?=\s?%)/gi,
  ],
  ["mass", /\bby (?:mass|weight|wt)\b|\b(?:mass|weight) fractions?|\b(?:mass|weight|wt)\b\.?/gi],
  ["mole", /\bmol(?:e|ar)?s?\s?[/:]\s?mol(?:e|ar)?s?\b|\bn(?:\s?[/:]\s?n){1,2}\b|\bmol(?:e|ar)?\.?\s?-?(?=\s?%)/gi],
  ["mole", /\bby (?:moles?|amount)\b|\b(?:mole|molar|amount) fractions?|\bmol(?:e|es|ar)?\b\.?/gi],
];
const BEFORE_MIXING = /\bbefore mixing\b/gi;
const COUNTED =
  /\b(?:including|incl\.?|with|counting)(?: the)? solute(?: counted)?|\bsolute(?: is)? (?:counted|included)/gi;
const FREE =
  /\bsolute[- ]free(?: basis)?|\b(?:free of|without|excluding|excl\.?)(?: the)? solute|\bsolute not counted/gi;
const PERCENT = /\bper ?cent(?:age)?\b/gi;
const FRACTION = /\bfractions?\b/i;

/** Takes the words that say a basis out of a text in lower or upper case, dashes already folded. */
export function readBasisWords(text: string): BasisWords {
  let rest = text;
  const takes = (pattern: RegExp): boolean => {
    const before = rest;
    rest = rest.replace(pattern, " ");
    return rest !== before;
  };
  // "solute not counted" holds "solute": what denies goes first.
  const free = takes(FREE);
  const counted = takes(COUNTED);
  const fraction = FRACTION.test(rest);
  if (takes(PERCENT)) rest += " %";
  const found = new Set<CompositionBasis>();
  for (const [basis, spelling] of SPELLINGS) if (takes(spelling)) found.add(basis);
  takes(BEFORE_MIXING);
  const percent = rest.includes("%") || found.has("alcoholometric volume");
  return {
    basis: [...found][0],
    contradictory: found.size > 1,
    scale: fraction ? "fraction" : percent ? "percent" : undefined,
    solute: free ? "free" : counted ? "counted" : undefined,
    rest,
  };
}

/** Longest cell read; no basis needs more. */
const LONGEST = 240;

const SYMBOLS: Readonly<Record<string, CompositionBasis>> = { x: "mole", w: "mass", φ: "volume before mixing" };

/** The basis that a symbol of the field stands for: x, w, φ. */
export function basisOfSymbol(symbol: string): CompositionBasis | undefined {
  return SYMBOLS[symbol.toLowerCase()];
}

/**
 * A cell of composition_basis: the basis it names, scale and what it says of the solute; undefined where it holds other
 * words or two bases.
 */
export function readBasisCell(text: string): Omit<BasisWords, "rest" | "contradictory"> | undefined {
  if (text.length > LONGEST) return undefined;
  const words = readBasisWords(` ${text.normalize("NFKC").replace(/[‐‑‒–—−]/g, "-")} `);
  const left = words.rest.replace(/[%(),;.\s-]|\b(?:basis|fractions?|of|the|x|w)\b/gi, "");
  const symbol = /^\s*([xwφ])\d?\s*$/i.exec(text)?.[1];
  if (symbol !== undefined) return { basis: basisOfSymbol(symbol), scale: "fraction", solute: undefined };
  return left !== "" || words.contradictory ? undefined : words;
}
