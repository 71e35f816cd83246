import { type Problem, problem } from "../problems/catalogue.ts";
import { loadStructureReader } from "../properties/smiles-structure.ts";
import { substanceIndex } from "../properties/substance-index.ts";
import type { SubstanceIndex } from "../properties/substances.ts";
import type { SourceTable, TableRow } from "../records/readings.ts";
import type { ReadStructure } from "./solute-cells.ts";

/** Tables of substances as they were read: the program's own, or a group's. */
export interface SubstanceTables {
  readonly substances: readonly TableRow[];
  readonly solidForms: readonly TableRow[];
  readonly propertyValues: readonly TableRow[];
}

interface Indexed {
  readonly index: SubstanceIndex;
  readonly notices: readonly Problem[];
}

/** Indexes made, by the program's tables and the group's: `check` curates the same collection twice. */
const known = new WeakMap<SubstanceTables, WeakMap<SubstanceTables, Indexed>>();

/** The index of all substances, a group's own tables laid over the program's, and what is wrong with the group's. */
export function indexSubstances(program: SubstanceTables, own: SubstanceTables): Indexed {
  const ofProgram = known.get(program) ?? new WeakMap<SubstanceTables, Indexed>();
  known.set(program, ofProgram);
  const before = ofProgram.get(own);
  if (before !== undefined) return before;
  const made = indexed(program, own);
  ofProgram.set(own, made);
  return made;
}

function indexed(program: SubstanceTables, own: SubstanceTables): Indexed {
  const cells = (rows: readonly TableRow[]) => rows.map(({ values }) => values);
  const layer = (origin: string, { substances, solidForms, propertyValues }: SubstanceTables) => ({
    origin,
    substances: cells(substances),
    solidForms: cells(solidForms),
    propertyValues: cells(propertyValues),
  });
  const index = substanceIndex([layer("program", program), layer("collection", own)]);
  const tables = { substances: own.substances, solid_forms: own.solidForms, "property-values": own.propertyValues };
  const notices = index.faults
    .filter(({ origin }) => origin === "collection")
    .map(({ table, row, column, message }) => {
      const at = tables[table][row];
      return problem(
        "substance-left-out",
        { file: at?.file ?? table, line: at?.line ?? 1, column },
        { found: message },
      );
    });
  return { index, notices };
}

/** A reader of SMILES; the library behind it is loaded only where a source has structures. */
export async function structureReader(sources: readonly SourceTable[]): Promise<ReadStructure> {
  return sources.some(({ places }) => places.smiles !== undefined) ? loadStructureReader() : () => undefined;
}
