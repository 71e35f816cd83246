import { nameKey } from "../properties/name-key.ts";
import type { Substance } from "../properties/substances.ts";
import type { Identifier, ReadStructure } from "./solute-cells.ts";

/**
 * How an identifier that is in no table stands to a listed substance: `other` a different one; `stereo` the same skeleton
 * with other stereochemistry, isotopes or protons; `tautomer` the same but for mobile protons; `less` the same skeleton without the stereochemistry that is listed;
 * `isomer` a structure of the same composition; `another number` a registry number other than the listed one (a
 * substance may have several); `unknown` where the tables have nothing to compare it with.
 */
export type Agreement = "other" | "stereo" | "tautomer" | "less" | "isomer" | "another number" | "unknown";

/** Second block of an InChIKey that states neither stereochemistry nor isotopes. */
const FLAT = "UHFFFAOY";

/** Compares an identifier that stands for nothing listed with a substance of the tables. */
export function agreement(identifier: Identifier, substance: Substance, read: ReadStructure): Agreement {
  if (identifier.kind === "registry number") return substance.cas === undefined ? "unknown" : "another number";
  return identifier.kind === "InChIKey"
    ? ofInchikeys(identifier.key, substance.inchikey)
    : ofStructures(identifier, substance, read);
}

function ofInchikeys(key: string, listed: string | undefined): Agreement {
  if (listed === undefined) return "unknown";
  if (skeletonOf(key) !== skeletonOf(listed)) return "other";
  return key.startsWith(FLAT, 15) && !listed.startsWith(FLAT, 15) ? "less" : "stereo";
}

function ofStructures({ structure }: Identifier, substance: Substance, read: ReadStructure): Agreement {
  if (structure === undefined || substance.smiles === undefined) return "unknown";
  const listed = read(substance.smiles);
  if (listed?.ok !== true) return "unknown";
  const flat = structure.code === structure.skeleton;
  if (structure.skeleton === listed.skeleton) return flat ? "less" : "stereo";
  if (structure.formula !== listed.formula) return "other";
  if (!flat || structure.tautomers() !== listed.tautomers()) return "isomer";
  return listed.code === listed.skeleton ? "tautomer" : "less";
}

/** First block of an InChIKey: the same for all stereoisomers of one skeleton. */
export const skeletonOf = (inchikey: string): string => inchikey.slice(0, 14);

/** Prefixes of a name that tell stereoisomers apart. */
const STEREO_PREFIX =
  /^(?:(?:\((?:[\d',]*[rsezdl±+-][\d',rsez]*)+\)|(?:d|l|dl|rac|racem|cis|trans|meso)(?=-)|±|racemic)-?)+/;

/** The key of a name without the prefixes that tell stereoisomers apart: `L-(+)-tartaric acid` and `DL-tartaric acid`. */
const nameWithoutStereo = (name: string): string => nameKey(name).replace(STEREO_PREFIX, "");

/** The prefixes of a name that tell stereoisomers apart, folded; "" where it has none. */
export const stereoPrefix = (name: string): string => STEREO_PREFIX.exec(nameKey(name))?.[0] ?? "";

/** Whether two listed substances differ in nothing but stereochemistry, by any of their identifiers or by their names. */
export function sameButStereo(a: Substance, b: Substance, read: ReadStructure): boolean {
  if (a.inchikey !== undefined && b.inchikey !== undefined) return skeletonOf(a.inchikey) === skeletonOf(b.inchikey);
  const [first, second] = [a, b].map(({ smiles }) => (smiles === undefined ? undefined : read(smiles)));
  if (first?.ok === true && second?.ok === true) return first.skeleton === second.skeleton;
  return nameWithoutStereo(a.name) === nameWithoutStereo(b.name);
}
