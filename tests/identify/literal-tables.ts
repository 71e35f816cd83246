import { indexSubstances, type SubstanceTables } from "../../pipeline/identify/substance-tables.ts";
import type { SubstanceIndex } from "../../pipeline/properties/substances.ts";
import { PROPERTY_VALUES_COLUMNS } from "../../pipeline/records/generated/property-values.ts";
import { SOLID_FORMS_COLUMNS } from "../../pipeline/records/generated/solid-forms.ts";
import { SUBSTANCES_COLUMNS } from "../../pipeline/records/generated/substances.ts";
import type { TableRow } from "../../pipeline/records/readings.ts";

type Cells = Readonly<Record<string, string>>;

/** Rows of a table with the columns that are not given left empty. */
function rows(file: string, columns: readonly string[], cells: readonly Cells[]): TableRow[] {
  return cells.map((given, i) => ({
    file,
    line: i + 2,
    values: { ...Object.fromEntries(columns.map((column) => [column, ""])), ...given },
  }));
}

/** Tables of substances from the cells that matter to a test. */
export function tables(
  substances: readonly Cells[],
  solidForms: readonly Cells[] = [],
  propertyValues: readonly Cells[] = [],
): SubstanceTables {
  return {
    substances: rows("substances.csv", SUBSTANCES_COLUMNS, substances),
    solidForms: rows("solid_forms.csv", SOLID_FORMS_COLUMNS, solidForms),
    propertyValues: rows("property-values.csv", PROPERTY_VALUES_COLUMNS, propertyValues),
  };
}

// Registry numbers, structures and keys are the public ones of these substances.
const SUBSTANCES: readonly Cells[] = [
  {
    name: "water",
    role: "solvent",
    synonyms: "H2O",
    cas: "7732-18-5",
    inchikey: "XLYOFNOQVPJJNP-UHFFFAOYSA-N",
    formula: "H2O",
  },
  { name: "ethanol", role: "solvent", synonyms: "EtOH", cas: "64-17-5", formula: "C2H6O" },
  { name: "methanol", role: "solvent", synonyms: "MeOH", cas: "67-56-1", formula: "CH4O" },
  { name: "urea", role: "solute;solvent", cas: "57-13-6", formula: "CH4N2O" },
  {
    name: "paracetamol",
    role: "solute",
    synonyms: "acetaminophen",
    cas: "103-90-2",
    inchikey: "RZVAJINKPMORJF-UHFFFAOYSA-N",
    smiles: "CC(=O)Nc1ccc(O)cc1",
    formula: "C8H9NO2",
  },
  {
    name: "caffeine",
    role: "solute",
    cas: "58-08-2",
    inchikey: "RYYVLZVUVIJVGH-UHFFFAOYSA-N",
    smiles: "CN1C=NC2=C1C(=O)N(C)C(=O)N2C",
    formula: "C8H10N4O2",
  },
  {
    name: "copper(II) sulfate",
    role: "solute",
    synonyms: "copper sulfate",
    cas: "7758-98-7",
    formula: "CuSO4",
  },
  { name: "copper(II) sulfate pentahydrate", role: "solute", synonyms: "blue vitriol", formula: "CuSO4·5H2O" },
  { name: "tartaric acid", role: "solute", synonyms: "acid A", formula: "C4H6O6" },
  { name: "malic acid", role: "solute", synonyms: "acid A", formula: "C4H6O5" },
];

const FORMS: readonly Cells[] = [
  { solute: "paracetamol", form: "form I", kind: "polymorph" },
  { solute: "paracetamol", form: "form II", kind: "polymorph" },
  {
    solute: "copper(II) sulfate",
    form: "pentahydrate",
    kind: "hydrate",
    guest: "water",
    guest_per_solute: "5",
  },
];

/** A small index: four solvents, of them urea a solute too, and a few solutes, one with a hydrate, two with one synonym. */
export function smallIndex(): SubstanceIndex {
  return indexSubstances(tables(SUBSTANCES, FORMS), tables([])).index;
}
