/** Cyrillic letters that look like a Latin one in common typefaces. */
const CYRILLIC = letterPairs(
  "аa еe оo рp сc уy хx іi јj ѕs кk һh ԁd ԛq ԝw ӏl АA ВB ЕE КK МM НH ОO РP СC ТT УY ХX ІI ЈJ ЅS ҮY",
);

/** Greek letters that look like a Latin one; the small letters other than omicron are locants in their own right. */
const GREEK = letterPairs("ΑA ΒB ΕE ΖZ ΗH ΙI ΚK ΜM ΝN ΟO ΡP ΤT ΥY ΧX οo");

function letterPairs(text: string): ReadonlyMap<string, string> {
  return new Map(text.split(" ").map((pair) => [pair.charAt(0), pair.charAt(1)]));
}

const FOREIGN = /[\u0370-\u03ff\u0400-\u052f]/;
const DOUBLES = `[${[...GREEK.keys()].join("")}]`;
const GREEK_IN_LATIN = new RegExp(`(?<=[A-Za-z])${DOUBLES}|${DOUBLES}(?=[A-Za-z])`, "gu");

/**
 * Letters of another script that stand in a Latin word as if they belonged to it: Cyrillic ones where the text has Latin
 * letters too and every Cyrillic letter of it has a Latin double (a Cyrillic word is left alone), and Greek ones with no
 * meaning as a locant that touch a Latin letter.
 */
export function foldLookAlikes(text: string): string {
  if (!FOREIGN.test(text)) return text;
  const cyrillic = text.match(/[\u0400-\u052f]/g) ?? [];
  const foldable = /[A-Za-z]/.test(text) && cyrillic.every((letter) => CYRILLIC.has(letter));
  const latin = foldable ? text.replace(/[\u0400-\u052f]/g, (letter) => CYRILLIC.get(letter) ?? letter) : text;
  return latin.replace(GREEK_IN_LATIN, (letter) => GREEK.get(letter) ?? letter);
}

/**
 * The look-alike letters of a text in words, each once: `Cyrillic "а" (U+0430)`.
 *
 * @example lookAlikes("c\u0430ffeine") // ["Cyrillic \"а\" (U+0430)"]
 */
export function lookAlikes(text: string): string[] {
  const plain = text.normalize("NFKC");
  const folded = [...foldLookAlikes(plain)];
  const foreign = [...plain].filter((letter, at) => letter !== folded[at]);
  return [...new Set(foreign)].map((letter) => {
    const code = letter.codePointAt(0) ?? 0;
    const script = code < 0x400 ? "Greek" : "Cyrillic";
    return `${script} "${letter}" (U+${code.toString(16).toUpperCase().padStart(4, "0")})`;
  });
}
