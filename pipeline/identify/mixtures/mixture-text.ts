import type { CompositionBasis } from "../../bases/compositions.ts";
import { type DecimalMark, type NumberText, parseNumber } from "../../records/number-text.ts";
import { basisOfSymbol, readBasisWords } from "./composition-words.ts";

/** One number of a composition, with a percent sign or without. */
export interface Share {
  readonly value: number;
  readonly percent: boolean;
}

/** A number as written: `of` is the name a symbol gives, x(ethanol), `place` its component, x1. */
export interface CompositionNumber extends Share {
  readonly place?: number;
  readonly of?: string;
}

/** What the text of a mixture says, before names are looked up. */
export interface MixtureText {
  /** Text that is left for names; marks stand where single numbers stood. */
  readonly names: string;
  /** Shares of a ratio such as 70:30, in its order; none where there is no ratio. */
  readonly ratio: readonly Share[];
  /** Single numbers in the order of their marks. */
  readonly numbers: readonly CompositionNumber[];
  readonly basis: CompositionBasis | undefined;
  readonly scale: "percent" | "fraction" | undefined;
  readonly solute: "counted" | "free" | undefined;
  /** `aqueous` and the like: water is a component though its name is not written. */
  readonly aqueous: boolean;
}

/** Why a text of a mixture cannot be read. */
export interface MixtureTextFault {
  readonly fault: "too long" | "number" | "two bases" | "two ratios";
  readonly found: string;
}

/** Marks of single numbers are characters of the private use area, which no cell keeps. */
const FIRST_MARK = 0xe000;
const MARKS = /[\ue000-\uf8ff]/g;
const NUMBER = String.raw`(?<![\w.,\-\ue000-\uf8ff])\d+(?:[.,]\d+)?(?![\w-]|[.,]\d)`;
const SHARE = String.raw`${NUMBER}\s?%?`;
const RATIO = new RegExp(String.raw`${SHARE}(?:\s?[:/]\s?${SHARE}){1,7}`, "g");
const SINGLE = new RegExp(String.raw`(${NUMBER})(\s?%)?`, "g");
const SYMBOL =
  /(?<![\w\-:/])([xwφ])\s?(?:_?\s?([1-3]))?\s?(?:\(([^()=]{1,80})\)|_([a-z]{3,40}))?\s?=\s?(\d+(?:[.,]\d+)?)(?![\w-]|[.,]\d)/giu;
const AQUEOUS = /(?<![\w-])(?:aqueous|aqu?\.|aq)(?![\w-])|\s(?:in|with) water(?![\w-])/gi;
const FILLERS =
  /(?<![\w-])(?:(?:binary|ternary|mixed) )?(?:mixtures?|solvents?|solutions?|blends?)(?: of)?(?![\w-])|\bratio\b/gi;

/** Two whole percentages with a hyphen between them; a range has no such sum. */
const HYPHENED = /(?<![\w.,-])(\d{1,2})\s?-\s?(\d{1,2})(?![\w-]|[.,]\d)/g;
const asRatio = (text: string, a: string, b: string): string => (Number(a) + Number(b) === 100 ? `${a}:${b}` : text);

/** Longest text read; no notation of a mixture needs more. */
const LONGEST = 240;

/** Folds look-alikes: compatibility forms, dashes, ratio signs, blanks; marks of our own are taken out. */
export function tidyMixture(text: string): string {
  return text
    .normalize("NFKC")
    .replace(MARKS, " ")
    .replace(/\p{Cf}/gu, "")
    .replace(/[‐‑‒–—−]/g, "-")
    .replace(/[∶︓]/g, ":")
    .replace(/[⁄∕]/g, "/")
    .replace(/\s+/g, " ")
    .trim();
}

const count = (text: string, character: string): number => text.split(character).length - 1;

/** Text without brackets that close outside it, or that hold all of it: `(ethanol`, `(ethanol)`. */
function withoutStrayBrackets(name: string): string {
  const [open, closed] = [count(name, "("), count(name, ")")];
  if (open > closed && name.startsWith("(")) return withoutStrayBrackets(name.slice(1).trim());
  if (closed > open && name.endsWith(")")) return withoutStrayBrackets(name.slice(0, -1).trim());
  const whole = open === 1 && closed === 1 && name.startsWith("(") && name.endsWith(")");
  return whole ? name.slice(1, -1).trim() : name;
}

/** A piece of the text for names without marks, percent signs, stray brackets and punctuation around it. */
export function bareName(piece: string): string {
  const bare = piece
    .replace(MARKS, " ")
    .replace(/%/g, " ")
    .replace(/^[\s.,;:=]+|[\s.,;:=]+$/g, "")
    .replace(/\s+/g, " ");
  return withoutStrayBrackets(bare);
}

/** Positions of the numbers whose marks stand in a piece, each with whether it stands before the name. */
export function marksIn(piece: string): { readonly number: number; readonly leads: boolean }[] {
  const trimmed = piece.trimStart();
  return [...trimmed.matchAll(MARKS)].map((match) => ({
    number: match[0].charCodeAt(0) - FIRST_MARK,
    leads: bareName(trimmed.slice(0, match.index)) === "",
  }));
}

/** Reads the words and numbers of a mixture. Numbers inside names (`1,4-dioxane`, `propan-2-ol`) are left alone. */
export function readMixtureText(text: string, decimal: DecimalMark): MixtureText | MixtureTextFault {
  if (text.length > LONGEST) return { fault: "too long", found: `a cell of ${text.length} characters` };
  let rest = tidyMixture(text);
  const faults: NumberText[] = [];
  const numbers: CompositionNumber[] = [];
  const read = (digits: string): number => {
    const number = parseNumber(digits, decimal);
    if (!number.ok) faults.push(number);
    return number.ok ? number.value : Number.NaN;
  };
  const mark = (number: CompositionNumber): string => ` ${String.fromCharCode(FIRST_MARK + numbers.push(number) - 1)} `;

  const symbols = new Set<CompositionBasis | undefined>();
  rest = rest.replace(SYMBOL, (_, symbol: string, place?: string, inside?: string, joined?: string, digits = "") => {
    symbols.add(basisOfSymbol(symbol));
    const of = inside ?? joined;
    return mark({
      value: read(digits),
      percent: false,
      ...(of === undefined ? {} : { of: of.trim() }),
      ...(place === undefined ? {} : { place: Number(place) }),
    });
  });
  const words = readBasisWords(` ${rest} `);
  const bases = new Set([words.basis, ...symbols].filter((basis) => basis !== undefined));
  if (words.contradictory || bases.size > 1) return { fault: "two bases", found: `"${text}" names two bases` };

  const ratios: Share[][] = [];
  rest = words.rest
    .replace(/\s+/g, " ")
    .replace(HYPHENED, asRatio)
    .replace(RATIO, (ratio) => {
      const shares = [...ratio.matchAll(SINGLE)];
      ratios.push(shares.map(([, digits = "", sign]) => ({ value: read(digits), percent: sign !== undefined })));
      return " ";
    });
  if (ratios.length > 1) return { fault: "two ratios", found: `"${text}" states two ratios` };
  rest = rest.replace(SINGLE, (_, digits: string, sign?: string) =>
    mark({ value: read(digits), percent: sign !== undefined }),
  );
  const [fault] = faults;
  if (fault !== undefined && !fault.ok) return { fault: "number", found: fault.found };

  let aqueous = false;
  rest = rest.replace(AQUEOUS, () => {
    aqueous = true;
    return " ";
  });
  // A bracket that held nothing but numbers and the basis is empty now.
  rest = rest
    .replace(FILLERS, " ")
    .replace(/[([][\s.,;:=%\ue000-\uf8ff-]*[)\]]/g, (bracket) => ` ${(bracket.match(MARKS) ?? []).join(" ")} `);
  return {
    names: rest.replace(/\s+/g, " ").trim(),
    ratio: ratios[0] ?? [],
    numbers,
    basis: [...bases][0],
    scale: words.scale,
    solute: words.solute,
    aqueous,
  };
}
