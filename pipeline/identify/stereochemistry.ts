import { racemateKeys } from "../properties/name-key.ts";
import type { Substance, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";

const UNSTATED: ReadonlySet<string> = new Set(["", "unspecified", "unknown", "notstated", "n/a", "none"]);
const RACEMATE = /^(?:rac(?:em)?\.?|racemate|racemic(?:mixture)?|\(?±\)?|\(?\+\/?-\)?|\(?rs\)?|\(?dl\)?)-?$/i;
const SINGLE = /^\(?([RS])\)?-?(?:enantiomer|isomer)?$/i;
const CONFIGURATION = /^\(?([DL])\)?-?(?:enantiomer|isomer|form)?$/;
const ROTATION = /^(?:\((\+|-)\)-?|(\+|-))(?:enantiomer|isomer)?$/;

/**
 * One spelling for the ways of stating stereochemistry: `racemate`, `(R)`, `(S)`, `D`, `L`, `(+)`, `(-)`; anything else in
 * small letters with single blanks; "" where nothing is stated.
 */
export function stereoWord(cell: string): string {
  const text = cell
    .normalize("NFKC")
    .replace(/[‐‑‒–—−]/g, "-")
    .replace(/\p{Cf}/gu, "")
    .trim();
  const bare = text.replace(/\s+/g, "");
  if (UNSTATED.has(bare.toLowerCase())) return "";
  if (RACEMATE.test(bare)) return "racemate";
  const [single, configuration, rotation] = [SINGLE, CONFIGURATION, ROTATION].map((shape) => shape.exec(bare));
  if (single) return `(${single[1]?.toUpperCase()})`;
  if (configuration) return configuration[1] ?? "";
  if (rotation) return `(${rotation[1] ?? rotation[2]})`;
  return text.toLowerCase().replace(/\s+/g, " ");
}

/** Words that exclude one another. */
const RIVALS: readonly (readonly string[])[] = [
  ["(R)", "(S)", "racemate"],
  ["D", "L", "racemate"],
  ["(+)", "(-)", "racemate"],
];

/** Words that a name says of its stereochemistry by its prefixes, in the words of `stereoWord`. */
function wordsOf(name: string): string[] {
  if (racemateKeys(name).length > 0) return ["racemate"];
  const text = name.normalize("NFKC").replace(/[‐‑−–]/g, "-");
  return /^((?:\([RS+-]\)-?|[DL]-)+)/.exec(text)?.[1]?.match(/\([RS+-]\)|[DL]/g) ?? [];
}

/**
 * The stereochemistry of a row beyond what its solute's name says already: it keeps systems apart. A statement that
 * repeats the name adds nothing, one that contradicts it is a fault: a racemate and an enantiomer are never merged. A
 * substance that only has a synonym as a racemate (ibuprofen) may be stated as one of its enantiomers.
 *
 * @param name the solute as the row names it
 */
export function stereoBeyondName(
  cell: string,
  name: string,
  substance: Substance | undefined,
  index: SubstanceIndex,
): string | CellFault {
  const stated = stereoWord(cell);
  if (stated === "") return "";
  const { name: listed = "", synonyms = [] } = substance ?? {};
  const said = new Set([name, listed, ...synonyms.filter((text) => racemateKeys(text).length === 0)].flatMap(wordsOf));
  const rivals = RIVALS.filter((words) => words.includes(stated)).flat();
  const rival = rivals.find((word) => word !== stated && said.has(word));
  if (rival !== undefined) {
    const found = `the solute is ${listed || name} (${rival}), its stereochemistry is stated as "${cell.trim()}"`;
    return { field: "stereo", code: "contradictory-identity", found };
  }
  const racemic = stated === "racemate" && index.resolve(`racemic ${listed}`)?.substance.name === listed;
  return said.has(stated) || (racemic && listed !== "") ? "" : stated;
}
