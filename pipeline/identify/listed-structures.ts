import { parseFormula } from "../properties/formula.ts";
import { hillFormula } from "../properties/molar-mass.ts";
import type { Structure } from "../properties/smiles-structure.ts";
import type { Substance, SubstanceIndex } from "../properties/substances.ts";
import type { ReadStructure } from "./solute-cells.ts";

/** Listed substances with a SMILES by Hill formula, made once per index: only isomers need to be compared. */
const byFormula = new WeakMap<SubstanceIndex, ReadonlyMap<string, readonly Substance[]>>();

/**
 * The listed substance with this structure, however its SMILES is written; undefined where there is none, or where several
 * have it (as a table may that leaves stereochemistry out).
 */
export function listedStructure(
  structure: Structure,
  index: SubstanceIndex,
  read: ReadStructure,
): Substance | undefined {
  let isomers = byFormula.get(index);
  if (isomers === undefined) {
    isomers = groupByFormula(index.substances);
    byFormula.set(index, isomers);
  }
  const same = (isomers.get(structure.formula) ?? []).filter(({ smiles = "" }) => {
    const listed = read(smiles);
    // One structure has one skeleton, which takes a fraction of the time of its stereochemistry.
    return listed?.ok === true && listed.skeleton === structure.skeleton && listed.code === structure.code;
  });
  return same.length === 1 ? same[0] : undefined;
}

function groupByFormula(substances: readonly Substance[]): Map<string, Substance[]> {
  const groups = new Map<string, Substance[]>();
  for (const substance of substances) {
    const formula = substance.smiles === undefined ? undefined : parseFormula(substance.formula ?? "");
    if (formula === undefined || "fault" in formula) continue;
    const hill = hillFormula(formula.elements);
    groups.set(hill, [...(groups.get(hill) ?? []), substance]);
  }
  return groups;
}
