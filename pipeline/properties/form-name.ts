import { nameKey, unlistedName } from "./name-key.ts";

/** Numbers of water molecules that have a Greek or Latin prefix. */
const COUNTS: readonly (readonly [prefix: string, count: number])[] = [
  ...([
    ["hemi", 0.5],
    ["mono", 1],
    ["sesqui", 1.5],
    ["di", 2],
    ["tri", 3],
    ["tetra", 4],
    ["penta", 5],
  ] as const),
  ...([
    ["hexa", 6],
    ["hepta", 7],
    ["octa", 8],
    ["nona", 9],
    ["deca", 10],
    ["dodeca", 12],
    ["octadeca", 18],
  ] as const),
];

/** Words that say no more than that a form is meant. */
const FORM_WORDS = "(?:crystal(?:line)?-?|polymorphic-?)?(?:form|polymorph|modification|mod\\.|modif\\.)";
const LABEL_AFTER = new RegExp(`^${FORM_WORDS}[-.:]?(.+)$`);
const LABEL_BEFORE = new RegExp(`^(.+?)-?${FORM_WORDS}$`);
const LABEL = /^(?:[ivx]{1,5}|\d{1,2}|[a-z]'?)$/;
const GREEK = /^(?:alpha|beta|gamma|delta|epsilon|zeta|eta|theta|kappa|lambda|mu)'?$/;

/**
 * One name for the ways of writing a solid form, so that one form is one system. Different forms keep different names:
 * a Roman and an Arabic numeral, a Greek and a Latin letter, `anhydrous` and no statement stay apart.
 *
 * - `Form I`, `form-I`, `polymorph I`, `I`, `modification i`: `form I`; `A`, `form a`: `form A`
 * - `α`, `alpha form`, `α-polymorph`: `alpha`
 * - `5-hydrate`, `·5H2O`, `5 H₂O`, `penta-hydrate`: `pentahydrate`; other counts `N-hydrate`
 * - `anhydrate`, `anhydr.`, `water-free`: `anhydrous`; `amorphous solid`: `amorphous`
 *
 * Anything else keeps its words, in small letters but for its label.
 */
export function formName(text: string): string {
  const key = nameKey(text.replace(/½/g, "0.5"));
  const [before, after] = [LABEL_BEFORE.exec(key)?.[1], LABEL_AFTER.exec(key)?.[1]];
  for (const part of [after, before, key]) {
    const known = part === undefined ? undefined : labelled(part.replace(/^\((.*)\)$/, "$1"));
    if (known !== undefined) return known;
  }
  return hydrateName(key) ?? worded(text);
}

function labelled(label: string): string | undefined {
  if (GREEK.test(label)) return label;
  if (LABEL.test(label)) return `form ${label.toUpperCase()}`;
  if (/^(?:anhydrous|anhydrate|anhydr?\.?|water-?free)$/.test(label)) return "anhydrous";
  if (/^amorph(?:ous)?(?:-?(?:solid|phase|material))?$/.test(label)) return "amorphous";
  return undefined;
}

function hydrateName(key: string): string | undefined {
  const water = /^[.·•∙⋅*(]?(\d+(?:\.\d+|\/\d+)?)?-?(?:\(?h2o\)?|waters?)\)?$/.exec(key);
  const numbered = /^(\d+(?:\.\d+|\/\d+)?)-?hydrate$/.exec(key);
  const prefix = /^([a-z]+)-?hydrate$/.exec(key)?.[1];
  const count = water ? (water[1] ?? "1") : (numbered?.[1] ?? undefined);
  const known = count === undefined ? COUNTS.find(([word]) => word === prefix) : prefixed(count);
  if (known !== undefined) return `${known[0]}hydrate`;
  return count === undefined ? undefined : `${count}-hydrate`;
}

function prefixed(count: string): readonly [string, number] | undefined {
  const [over = "", under = "1"] = count.split("/");
  const value = Number(over) / Number(under);
  return COUNTS.find(([, known]) => known === value);
}

/** Words that are no plain label: small letters, single blanks, and the labels among them as in `form II hydrate`. */
function worded(text: string): string {
  return unlistedName(text)
    .toLowerCase()
    .replace(
      /\b(form|polymorph|modification|phase|type)[ -]?([ivx]{1,5}|[a-z]|\d{1,2})\b/g,
      (_, word: string, label: string) =>
        `${word === "polymorph" || word === "modification" ? "form" : word} ${label.toUpperCase()}`,
    );
}

/** Water molecules per solute that a form's name states (`pentahydrate`, `7-hydrate`); undefined where it states none. */
export function waterCount(name: string): number | undefined {
  const [, prefix, over, under = "1"] = /^(?:([a-z]+)|(\d+(?:\.\d+)?)(?:\/(\d+))?-)hydrate$/.exec(name) ?? [];
  if (over !== undefined) return Number(over) / Number(under);
  return COUNTS.find(([known]) => known === prefix)?.[1];
}

const ROMAN: readonly string[] = "I II III IV V VI VII VIII IX X XI XII".split(" ");

/** The same form with its numeral in the other script (`form 2` for `form II`); undefined for any other name. */
export function otherNumeral(name: string): string | undefined {
  const label = /^form (.+)$/.exec(name)?.[1] ?? "";
  const roman = ROMAN.indexOf(label);
  if (roman >= 0) return `form ${roman + 1}`;
  const arabic = ROMAN[Number(label) - 1];
  return arabic === undefined ? undefined : `form ${arabic}`;
}
