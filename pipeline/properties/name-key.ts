import { parseFormula } from "./formula.ts";
import { foldLookAlikes } from "./look-alikes.ts";

const GREEK: ReadonlyMap<string, string> = new Map(
  (
    "αalpha βbeta γgamma δdelta εepsilon ζzeta ηeta θtheta ιiota κkappa λlambda μmu νnu ξxi οomicron πpi ρrho σsigma " +
    "ςsigma τtau υupsilon φphi χchi ψpsi ωomega"
  )
    .split(" ")
    .map((pair) => [pair.charAt(0), pair.slice(1)]),
);

const PLAIN = /^[A-Za-z\d()[\],.'+ -]*$/;

/** What is folded in a name of plain characters: crystal water after an x, and the sign of a racemate. */
const FOLDED_PLAIN = / [xX]|\(\+/;

/** Letters that stand in no formula: symbols have two at most, and an x may mark crystal water. */
const WORD = /[a-wyz]{3}/;

/** Letters that tell stereoisomers apart, where they stand alone: `D-`, `(2R,3S)`, `DL-`. */
const DESCRIPTOR = /(?<![\p{L}])(?:[DLRSEZ]|DL|LD|RS|SR)(?![\p{L}])/u;

/**
 * Folds the ways of writing one name without losing case or blanks: compatibility characters (NFKC), invisible and
 * control characters away, letters of another script that only look Latin, every dash a hyphen, primes and quotes an
 * apostrophe, Greek letters spelled out, the dots of crystal water a full stop, `(+/-)` as `(±)`.
 */
function foldSpelling(name: string): string {
  const folded = name
    .replace(/[´`ʹʼ‵′’‘]/g, "'")
    .replace(/[″“”"]/g, "''")
    .normalize("NFKC")
    .replace(/İ/g, "I")
    .replace(/ı/g, "i")
    .replace(/\s/g, " ")
    .replace(/[\p{Cf}\p{Cc}]|[\u{fe00}-\u{fe0f}]/gu, "");
  const spelled = foldLookAlikes(folded).replace(/[Α-Ωα-ω]/g, (letter) => GREEK.get(letter.toLowerCase()) ?? letter);
  // Once more, because a Greek letter spelled out may be the first Latin one.
  return foldLookAlikes(spelled)
    .replace(/[‐‑‒–—―−]/g, "-")
    .replace(/"/g, "''")
    .replace(/\(\+ ?\/? ?-\)/g, "(±)")
    .replace(/(?<=[A-Za-z\d)\]])\s*[·•∙⋅*]\s*(?=[\d.]*[A-Za-z(])/g, ".")
    .replace(/(?<=[A-Za-z\d)\]])\s+[x×X]\s*(?=[\d.]*\s*[hH]2[oO])/g, ".");
}

/**
 * The key under which names are compared: spelling folded, lower case, no blanks. `α‑D‑Glucose` and `alpha-D-glucose`
 * have one key; names that differ in a digit, a hyphen or a stereo prefix do not.
 */
export function nameKey(name: string): string {
  // Most names are plain: the long way round would only cost time.
  if (PLAIN.test(name) && !name.includes(" x") && !name.includes("(+")) return name.toLowerCase().replaceAll(" ", "");
  return foldSpelling(name).toLowerCase().replace(/\s+/g, "");
}

/**
 * The name under which a solute goes that is in no table: the same for every way of writing it that differs in case or
 * typography only, and readable. Small letters, single blanks; letters that tell stereoisomers apart keep their case
 * (`D-` is a configuration, `d-` a sign of rotation), and so does a formula (`CoCl2` is not `COCl2`).
 *
 * @example unlistedName("  HX‑7  Mesylate") // "hx-7 mesylate"
 */
export function unlistedName(name: string): string {
  const plain = PLAIN.test(name) && !FOLDED_PLAIN.test(name);
  const folded = (plain ? name : foldSpelling(name)).replace(/ +/g, " ").trim();
  if (!WORD.test(folded) && !("fault" in parseFormula(folded))) return folded;
  return folded
    .split(/(?<![\p{L}])([DLRSEZ]|DL|LD|RS|SR)(?![\p{L}])/u)
    .map((part) => (DESCRIPTOR.test(part) && part.length <= 2 ? part : part.toLowerCase()))
    .join("");
}

const RACEMIC = /^(?:\(±\)-?|±-?|\((?:rs|r,s)\)-|rac(?:em)?-|\(?dl\)?-|racemic-?)(?=.)/;

/**
 * Keys of all usual ways of naming the racemate that a text names by its prefix: `(±)-`, `rac-`, `DL-`, `(RS)-` and
 * `racemic` say the same. Empty for a text without such a prefix.
 *
 * @see IUPAC, Compendium of Chemical Terminology, "racemate": prefixes (±)- and rac- (or racem-), symbols RS and SR.
 */
export function racemateKeys(text: string): string[] {
  const key = nameKey(text);
  const rest = key.replace(RACEMIC, "");
  if (rest === key) return [];
  return [`rac-${rest}`, `(±)-${rest}`, `dl-${rest}`, `(rs)-${rest}`, `racemic${rest}`];
}
