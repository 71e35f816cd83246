import type { ProblemCode } from "../problems/catalogue.ts";
import { lookAlikes } from "../properties/look-alikes.ts";
import { unlistedName } from "../properties/name-key.ts";
import type { ResolvedName, SolidForm, Substance, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import { configurationOrRotation } from "./configuration-or-rotation.ts";
import { decideSolute } from "./decide-solute.ts";
import { type ReadStructure, readIdentifiers, type SoluteCells } from "./solute-cells.ts";
import { compositionOf } from "./solute-mass.ts";

/** Something worth telling about an identity that refuses nothing. */
export interface Remark {
  readonly code: ProblemCode;
  readonly found: string;
  readonly mend?: string;
}

/** A solute that was told apart from all others. */
export interface KnownSolute {
  /** Name in the substance tables, else the strongest identifier given, in its one spelling. */
  readonly key: string;
  readonly substance?: Substance;
  /** Solid form that the name or identifier itself stands for (`blue vitriol`). */
  readonly namedForm?: SolidForm;
  /** Molar mass of the unsolvated solute, g/mol; NaN where unknown. */
  readonly molarMass: number;
  /** Identifiers as given, for the table of substances. */
  readonly cells: SoluteCells;
  /** Contradictions with both readings, and what could not be compared. */
  readonly remarks: readonly Remark[];
}

/**
 * Resolves a solute. The strongest identifier decides: InChIKey, registry number, SMILES, name. An unknown solute is keyed
 * by it and stays usable where no property is needed. Nothing is guessed from a near spelling.
 *
 * Two identifiers of one row that stand for two substances are a fault, and so are a name and an identifier that differ
 * in stereochemistry only: which of them was dissolved is open. A name that stands for an altogether different substance
 * is remarked, with both readings.
 */
export function resolveSolute(cells: SoluteCells, index: SubstanceIndex, read: ReadStructure): KnownSolute | CellFault {
  const bare = cells.cas === "" && cells.inchikey === "" && cells.smiles === "";
  if (bare && unlistedName(cells.solute) === "") {
    const found = cells.solute === "" ? "the cell is empty" : "the cell holds invisible characters only";
    return { field: "solute", code: "missing-solute", found };
  }
  const told = readIdentifiers(cells, index, read);
  if ("code" in told) return told;
  const { identifiers, name, structureFault } = told;
  const byName = identifiers.length > 0 ? undefined : nameAlone(name, index);
  if (byName !== undefined && "code" in byName) return byName;
  const decided = decideSolute(identifiers, name, index, read);
  if ("code" in decided) return decided;
  const { base, key } = decided;
  const composition = compositionOf(cells, base?.substance, identifiers, index);
  if ("code" in composition) return composition;
  const form = formOf(base, composition.form);
  if (form !== undefined && "code" in form) return form;
  const remarks = [
    ...lookAlikeRemarks(cells.solute),
    ...(byName === undefined ? [] : [byName.remark]),
    ...decided.remarks,
    ...[structureFault, composition.unread].flatMap((found) =>
      found === undefined ? [] : [{ code: "identifier-not-checked" as const, found }],
    ),
  ];
  return {
    ...{ key, molarMass: composition.molarMass, cells, remarks },
    ...(base === undefined ? {} : { substance: base.substance }),
    ...(form === undefined ? {} : { namedForm: form }),
  };
}

/** What speaks against a name that stands alone: two substances that bear it, or a prefix with two meanings. */
function nameAlone(name: string, index: SubstanceIndex): { readonly remark: Remark } | CellFault | undefined {
  const namesakes = index.namesakes(name).map((substance) => substance.name);
  if (namesakes.length > 1) {
    return { field: "solute", code: "unresolved-identity", found: `"${name}" can be ${namesakes.join(" or ")}` };
  }
  return configurationOrRotation(name, index);
}

/** The form that the identifiers or the name stand for, and the one that the formula does. */
function formOf(base: ResolvedName | undefined, ofFormula: SolidForm | undefined): SolidForm | CellFault | undefined {
  if (base?.form === undefined || ofFormula === undefined || base.form.form === ofFormula.form) {
    return base?.form ?? ofFormula;
  }
  const found = `the solute stands for its ${base.form.form}, the formula for its ${ofFormula.form}`;
  return { field: "formula", code: "contradictory-identity", found };
}

/** A remark on a name with letters of another script that look like Latin ones. */
export function lookAlikeRemarks(name: string): Remark[] {
  const letters = lookAlikes(name);
  if (letters.length === 0) return [];
  return [{ code: "look-alike-letters", found: `"${name}" holds ${letters.join(", ")}` }];
}
