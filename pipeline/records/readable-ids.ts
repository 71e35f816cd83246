import { createHash } from "node:crypto";

/** Longest readable part of an id; the hash behind it keeps ids apart. */
const SLUG_LENGTH = 60;

const GREEK: ReadonlyMap<string, string> = new Map(
  (
    "αalpha βbeta γgamma δdelta εepsilon ζzeta ηeta θtheta ιiota κkappa λlambda μmu νnu ξxi οomicron πpi ρrho σsigma " +
    "ςsigma τtau υupsilon φphi χchi ψpsi ωomega"
  )
    .split(" ")
    .map((pair) => [pair.charAt(0), pair.slice(1)]),
);

/** Signs that tell stereoisomers apart, in words: without them two enantiomers would read alike. */
const SIGNS: readonly (readonly [sign: RegExp, word: string])[] = [
  [/\(\+\/?[-−]\)|±/g, "rac"],
  [/\(\+\)/g, "plus"],
  [/\([-−]\)/g, "minus"],
];

/**
 * ASCII slug of a text: lower case, Greek letters and the signs (±), (+), (-) in words, every run of other characters one
 * hyphen, at most 60 characters.
 * @example slug("Copper sulfate, pentahydrate") // "copper-sulfate-pentahydrate"
 */
export function slug(text: string): string {
  let plain = text.normalize("NFKD").replace(/\p{M}/gu, "").toLowerCase();
  for (const [sign, word] of SIGNS) plain = plain.replace(sign, word);
  return plain
    .replace(/[α-ω]/g, (letter) => GREEK.get(letter) ?? letter)
    .replace(/[^a-z0-9]+/g, "-")
    .slice(0, SLUG_LENGTH)
    .replace(/^-+|-+$/g, "");
}

/**
 * Readable id: slug of the words + 8 hex digits of SHA-256 of the key (16 where `digits` says so, for keys that share
 * the first eight). Small letters, digits and hyphens only, so that it is one file name on every disk.
 */
export function readableId(words: readonly string[], key: string, digits: 8 | 16 = 8): string {
  const hash = createHash("sha256").update(key, "utf8").digest("hex").slice(0, digits);
  return `${slug(words.filter((word) => word !== "").join(" "))}-${hash}`.replace(/^-/, "");
}
