// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * NAME.source.json: who measured a source, when, how, under which licence, and what each column of its table means. A field that is missing lowers the grade and stops nothing.
 */
export interface SourceCard {
  /**
   * Path of this schema, for editors. No unit.
   */
  $schema?: string;
  /**
   * Version of this file format. No unit.
   */
  format: 1;
  /**
   * Name of the source, unique in the collection: lower-case letters, digits and hyphens, at most 64. No unit.
   */
  source: string;
  /**
   * What the source is, in one line. Text, no unit.
   */
  title?: string | null;
  /**
   * Kind of source. Words, no unit.
   */
  origin?: "laboratory" | "literature" | "open-dataset" | "handbook";
  /**
   * Who reports the values; a role rather than a name. Text, no unit.
   */
  reported_by?: string | null;
  /**
   * Where they were measured; sources of one laboratory count as one for independence. Text, no unit.
   */
  laboratory?: string | null;
  /**
   * When they were measured or published, ISO 8601: a day, month or year. No unit.
   */
  date?: string | null;
  /**
   * Where they were published. Text, no unit.
   */
  reference?: string | null;
  /**
   * Digital object identifier of the publication. No unit.
   */
  doi?: string | null;
  /**
   * Terms under which the values may be passed on. Text, no unit.
   */
  licence?: string | null;
  /**
   * How all values were measured, unless a column says it row by row. Words, no unit.
   */
  method?:
    | "gravimetric"
    | "titration"
    | "hplc"
    | "uv"
    | "refractive-index"
    | "isothermal-synthetic"
    | "clear-point"
    | "cloud-point"
    | "kinetic-from-stock"
    | "unspecified";
  /**
   * Table beside the card; a path may not leave the collection. No unit.
   */
  file: string;
  /**
   * Shape of the table: `long` has one reading a row. Words, no unit.
   */
  shape?: "long";
  /**
   * How the table is written; `auto` looks at the file and tells what it found. No unit.
   */
  table?: TableFormat;
  /**
   * Field by field, the column that holds it. No unit.
   */
  columns: Columns;
  /**
   * Fields that have one value for the whole source; a field is a column or a constant, never both. No unit.
   */
  constants?: Constants;
  /**
   * Headings of columns carried through to the tables unread. No unit.
   */
  carry?: string[];
}
/**
 * How a table file is written.
 */
export interface TableFormat {
  /**
   * Character encoding. Words, no unit.
   */
  encoding?:
    "auto" | "utf-8" | "utf-16le" | "utf-16be" | "windows-1252" | "iso-8859-15" | "macintosh" | "gb18030" | "shift_jis";
  /**
   * Character between cells. No unit.
   */
  delimiter?: "auto" | "," | ";" | "\t" | "|";
  /**
   * Decimal mark of the numbers. No unit.
   */
  decimal?: "auto" | "." | ",";
  /**
   * Line of the headings, the first line of the file being 1.
   */
  header_line?: number;
  /**
   * Sheet of a workbook; null for the only one. Text, no unit.
   */
  sheet?: string | null;
  /**
   * Cells that mean `nothing reported`. No unit.
   */
  missing?: string[];
}
/**
 * Field by field, the column that holds it.
 */
export interface Columns {
  /**
   * Compound that dissolves: a name or synonym of the substance tables, or a registry number. Text, no unit.
   */
  solute?: TextColumn;
  /**
   * Liquid it dissolves in: a name or synonym; components of a mixture joined by ` + `. Text, no unit.
   */
  solvent?: TextColumn;
  /**
   * Temperature of the saturated solution, in the unit stated beside it (°C, K or °F).
   */
  temperature?: QuantityColumn;
  /**
   * The value measured, in the unit stated beside it; one cell is one reading.
   */
  solubility?: QuantityColumn;
  /**
   * CAS registry number of the solute; its check digit is tested. No unit.
   */
  cas?: TextColumn;
  /**
   * Standard InChIKey of the solute. No unit.
   */
  inchikey?: TextColumn;
  /**
   * SMILES of the solute. No unit.
   */
  smiles?: TextColumn;
  /**
   * Chemical formula of the unsolvated solute. No unit.
   */
  formula?: TextColumn;
  /**
   * Molar mass of the unsolvated solute, g/mol.
   */
  molar_mass?: TextColumn;
  /**
   * Solid in equilibrium with the solution: polymorph, hydrate, solvate or salt by name. Text, no unit.
   */
  solid_form?: TextColumn;
  /**
   * What of a hydrate or solvate the value counts. Words, no unit.
   */
  solute_basis?: TextColumn;
  /**
   * Composition of a mixed solvent, first component first, on the basis of composition_basis (fractions or percent as written).
   */
  composition?: TextColumn;
  /**
   * What the composition is per: mass, mole, volume before mixing, or alcoholometric volume (% vol); solute-free unless it adds `including solute`. Words, no unit.
   */
  composition_basis?: TextColumn;
  /**
   * Grade of the solvent as supplied. Text, no unit.
   */
  solvent_grade?: TextColumn;
  /**
   * Water in the solvent, percent by mass.
   */
  solvent_water_wt_percent?: TextColumn;
  /**
   * What else is dissolved: buffer, ionic strength, common ion, co-former. Text, no unit.
   */
  medium?: TextColumn;
  /**
   * pH at equilibrium, 1.
   */
  pH_final?: TextColumn;
  /**
   * Stereochemistry: racemate, enantiomer, enantiomeric excess. Text, no unit.
   */
  stereo?: TextColumn;
  /**
   * Lot of the solute. Text, no unit.
   */
  lot?: TextColumn;
  /**
   * Purity of the solute, percent by mass.
   */
  solute_purity?: TextColumn;
  /**
   * Uncertainty of the solubility, in the solubility's unit, or as a fraction of it where relative.
   */
  uncertainty?: UncertaintyColumn;
  /**
   * Coverage factor k of an expanded uncertainty, 1.
   */
  coverage_factor?: TextColumn;
  /**
   * Number of replicates behind the value, 1.
   */
  n?: TextColumn;
  /**
   * Standard uncertainty of the temperature, in the unit stated beside it (K).
   */
  temperature_uncertainty?: QuantityColumn;
  /**
   * Where the temperature was measured. Words, no unit.
   */
  temperature_probe?: TextColumn;
  /**
   * Measured density of the saturated solution, in the unit stated beside it.
   */
  solution_density?: QuantityColumn;
  /**
   * Temperature at which a volume was measured, in the unit stated beside it.
   */
  volume_temperature?: QuantityColumn;
  /**
   * Time at temperature before sampling, h.
   */
  equilibration_h?: TextColumn;
  /**
   * Side from which equilibrium was approached. Words, no unit.
   */
  approach?: TextColumn;
  /**
   * Heating rate of a clear point, K/min.
   */
  heating_rate_K_per_min?: TextColumn;
  /**
   * Temperature of the filter, in the unit stated beside it.
   */
  filter_temperature?: QuantityColumn;
  /**
   * Whether solid was left at equilibrium; `no` makes the value a lower bound. Words, no unit.
   */
  excess_solid?: TextColumn;
  /**
   * Solid phase put in. Text, no unit.
   */
  solid_before?: TextColumn;
  /**
   * Solid phase found at equilibrium. Text, no unit.
   */
  solid_after?: TextColumn;
  /**
   * How the solid was identified. Words, no unit.
   */
  solid_check?: TextColumn;
  /**
   * How the residue was dried. Text, no unit.
   */
  drying?: TextColumn;
  /**
   * Assay of the solute after equilibration, percent by mass.
   */
  assay_after?: TextColumn;
  /**
   * How the value was measured; in a column it may vary by row. Words, no unit.
   */
  method?: TextColumn;
  /**
   * Which of several repeats this row is. No unit.
   */
  replicate?: TextColumn;
  /**
   * Day of the measurement, ISO 8601. No unit.
   */
  measured_on?: TextColumn;
  /**
   * Where the value was published, by row. Text, no unit.
   */
  reference?: TextColumn;
  /**
   * Digital object identifier of that publication. No unit.
   */
  doi?: TextColumn;
  /**
   * Remark of the person who measured. Text, no unit.
   */
  note?: TextColumn;
}
/**
 * A column without a unit of its own.
 */
export interface TextColumn {
  /**
   * Heading of the column as written in the file. No unit.
   */
  column: string;
}
/**
 * A column of numbers with their unit.
 */
export interface QuantityColumn {
  /**
   * Heading of the column as written in the file. No unit.
   */
  column: string;
  /**
   * Unit of every cell of the column, in any of the known spellings. No unit of its own.
   */
  unit?: string;
  /**
   * Heading of the column that holds the unit row by row; never together with `unit`. No unit.
   */
  unit_column?: string;
}
/**
 * A column of uncertainties of the solubility.
 */
export interface UncertaintyColumn {
  /**
   * Heading of the column as written in the file. No unit.
   */
  column: string;
  /**
   * Unit of every cell of the column, in any of the known spellings. No unit of its own.
   */
  unit?: string;
  /**
   * Heading of the column that holds the unit row by row; never together with `unit`. No unit.
   */
  unit_column?: string;
  /**
   * What the figure is: a standard uncertainty; an expanded one (divided by coverage_factor, 2 where none is given); the half-width of a range; the standard deviation of n replicates. Words, no unit.
   */
  kind?: "standard" | "expanded" | "range" | "standard deviation";
  /**
   * True where the figure is a fraction of the value (percent where its unit is `%`), false where it is in the solubility's unit. No unit.
   */
  relative?: boolean;
}
/**
 * Fields that have one value for the whole source.
 */
export interface Constants {
  /**
   * Compound that dissolves: a name or synonym of the substance tables, or a registry number. Text, no unit.
   */
  solute?: string;
  /**
   * Liquid it dissolves in: a name or synonym; components of a mixture joined by ` + `. Text, no unit.
   */
  solvent?: string;
  /**
   * Temperature of the saturated solution, in the unit stated beside it (°C, K or °F).
   */
  temperature?: QuantityConstant;
  /**
   * The value measured, in the unit stated beside it; one cell is one reading.
   */
  solubility?: QuantityConstant;
  /**
   * CAS registry number of the solute; its check digit is tested. No unit.
   */
  cas?: string;
  /**
   * Standard InChIKey of the solute. No unit.
   */
  inchikey?: string;
  /**
   * SMILES of the solute. No unit.
   */
  smiles?: string;
  /**
   * Chemical formula of the unsolvated solute. No unit.
   */
  formula?: string;
  /**
   * Molar mass of the unsolvated solute, g/mol.
   */
  molar_mass?: number;
  /**
   * Solid in equilibrium with the solution: polymorph, hydrate, solvate or salt by name. Text, no unit.
   */
  solid_form?: string;
  /**
   * What of a hydrate or solvate the value counts. Words, no unit.
   */
  solute_basis?: "anhydrous" | "hydrate per added solvent" | "hydrate equivalent per total solvent";
  /**
   * Composition of a mixed solvent, first component first, on the basis of composition_basis (fractions or percent as written).
   */
  composition?: string | number;
  /**
   * What the composition is per: mass, mole, volume before mixing, or alcoholometric volume (% vol); solute-free unless it adds `including solute`. Words, no unit.
   */
  composition_basis?: string;
  /**
   * Grade of the solvent as supplied. Text, no unit.
   */
  solvent_grade?: string;
  /**
   * Water in the solvent, percent by mass.
   */
  solvent_water_wt_percent?: number;
  /**
   * What else is dissolved: buffer, ionic strength, common ion, co-former. Text, no unit.
   */
  medium?: string;
  /**
   * pH at equilibrium, 1.
   */
  pH_final?: number;
  /**
   * Stereochemistry: racemate, enantiomer, enantiomeric excess. Text, no unit.
   */
  stereo?: string;
  /**
   * Lot of the solute. Text, no unit.
   */
  lot?: string;
  /**
   * Purity of the solute, percent by mass.
   */
  solute_purity?: string | number;
  /**
   * Uncertainty of the solubility, in the solubility's unit, or as a fraction of it where relative.
   */
  uncertainty?: UncertaintyConstant;
  /**
   * Coverage factor k of an expanded uncertainty, 1.
   */
  coverage_factor?: number;
  /**
   * Number of replicates behind the value, 1.
   */
  n?: number;
  /**
   * Standard uncertainty of the temperature, in the unit stated beside it (K).
   */
  temperature_uncertainty?: QuantityConstant;
  /**
   * Where the temperature was measured. Words, no unit.
   */
  temperature_probe?: "solution" | "bath" | "jacket";
  /**
   * Measured density of the saturated solution, in the unit stated beside it.
   */
  solution_density?: QuantityConstant;
  /**
   * Temperature at which a volume was measured, in the unit stated beside it.
   */
  volume_temperature?: QuantityConstant;
  /**
   * Time at temperature before sampling, h.
   */
  equilibration_h?: number;
  /**
   * Side from which equilibrium was approached. Words, no unit.
   */
  approach?: "from below" | "from above" | "both" | "heating to clear" | "cooling to cloud";
  /**
   * Heating rate of a clear point, K/min.
   */
  heating_rate_K_per_min?: number;
  /**
   * Temperature of the filter, in the unit stated beside it.
   */
  filter_temperature?: QuantityConstant;
  /**
   * Whether solid was left at equilibrium; `no` makes the value a lower bound. Words, no unit.
   */
  excess_solid?: "yes" | "no" | "unknown";
  /**
   * Solid phase put in. Text, no unit.
   */
  solid_before?: string;
  /**
   * Solid phase found at equilibrium. Text, no unit.
   */
  solid_after?: string;
  /**
   * How the solid was identified. Words, no unit.
   */
  solid_check?: "none" | "XRPD" | "Raman" | "DSC" | "TGA" | "Karl Fischer";
  /**
   * How the residue was dried. Text, no unit.
   */
  drying?: string;
  /**
   * Assay of the solute after equilibration, percent by mass.
   */
  assay_after?: string | number;
  /**
   * How the value was measured; in a column it may vary by row. Words, no unit.
   */
  method?:
    | "gravimetric"
    | "titration"
    | "hplc"
    | "uv"
    | "refractive-index"
    | "isothermal-synthetic"
    | "clear-point"
    | "cloud-point"
    | "kinetic-from-stock"
    | "unspecified";
  /**
   * Which of several repeats this row is. No unit.
   */
  replicate?: string | number;
  /**
   * Day of the measurement, ISO 8601. No unit.
   */
  measured_on?: string;
  /**
   * Where the value was published, by row. Text, no unit.
   */
  reference?: string;
  /**
   * Digital object identifier of that publication. No unit.
   */
  doi?: string;
  /**
   * Remark of the person who measured. Text, no unit.
   */
  note?: string;
}
/**
 * A number with its unit for the whole source.
 */
export interface QuantityConstant {
  /**
   * The number, or words such as `room temperature`, in the unit beside it.
   */
  value: number | string;
  /**
   * Unit of the number. No unit of its own.
   */
  unit: string;
}
/**
 * One uncertainty of the solubility for the whole source.
 */
export interface UncertaintyConstant {
  /**
   * The figure, in `unit`; without a unit in the solubility's unit, or a fraction where relative.
   */
  value: number;
  /**
   * Unit of the figure where it is not the solubility's. No unit of its own.
   */
  unit?: string;
  /**
   * What the figure is: a standard uncertainty; an expanded one (divided by coverage_factor, 2 where none is given); the half-width of a range; the standard deviation of n replicates. Words, no unit.
   */
  kind?: "standard" | "expanded" | "range" | "standard deviation";
  /**
   * True where the figure is a fraction of the value (percent where its unit is `%`), false where it is in the solubility's unit. No unit.
   */
  relative?: boolean;
}

/** How a table is read where its card does not say. */
export const DEFAULT_TABLE_FORMAT: Required<TableFormat> = {
  "encoding": "auto",
  "delimiter": "auto",
  "decimal": "auto",
  "header_line": 1,
  "sheet": null,
  "missing": [
    "",
    "n.d.",
    "-"
  ]
};
