import { nameKey } from "./name-key.ts";
import { readRegistryNumber } from "./registry-number.ts";
import { faultAt, listCell, type PlacedRow, type PropertyTables, type Report, textCell } from "./table-cells.ts";

/** Everything the tables say of one substance, later tables over earlier ones. */
export interface Draft {
  /** Cells of the substance row; the place is that of the last row that spoke. */
  row: PlacedRow;
  layer: number;
  readonly roles: Set<string>;
  readonly synonyms: Map<string, string>;
  readonly references: Set<string>;
  readonly forms: Map<string, PlacedRow>;
  /** Rows of the property tables by property; tabulated densities stay apart by temperature. */
  readonly properties: Map<string, PlacedRow>;
}

/**
 * Joins tables layer by layer. A later row for the same substance (the same registry number, or the same name or
 * synonym where a registry number does not contradict) replaces the cells it fills and leaves the rest; lists grow.
 * A formula replaced by a later one takes the earlier molar mass with it, and the other way round.
 */
export function layerTables(layers: readonly PropertyTables[], report: Report): Draft[] {
  const known: Known = { drafts: [], byName: new Map(), byCas: new Map(), report };
  for (const [layer, { origin, substances, solidForms, propertyValues }] of layers.entries()) {
    const placed = (table: PlacedRow["table"], rows: PropertyTables["substances"]) =>
      rows.map((cells, row): PlacedRow => ({ origin, table, row, cells }));
    for (const row of placed("substances", substances)) addSubstance(row, layer, known);
    for (const row of placed("solid_forms", solidForms)) addForm(row, known);
    addProperties(placed("property-values", propertyValues), known);
  }
  return known.drafts;
}

interface Known {
  readonly drafts: Draft[];
  readonly byName: Map<string, Draft>;
  readonly byCas: Map<string, Draft>;
  readonly report: Report;
}

function addSubstance(given: PlacedRow, layer: number, known: Known): void {
  const { drafts, byName, byCas, report } = known;
  const name = textCell(given, "name");
  if (name === undefined) {
    report(faultAt(given, "name", "no name", "a substance without a name"));
    return;
  }
  const cas = validCas(given, report);
  const row = { ...given, cells: { ...given.cells, cas: cas ?? "" } };
  const same = (cas === undefined ? undefined : byCas.get(cas)) ?? sameByName(row, name, cas, known);
  if (same?.layer === layer) {
    const message = `"${name}" and "${same.row.cells.name}" are one substance by name or registry number`;
    report(faultAt(row, "name", "duplicate name", message));
  }
  const draft = same ?? newDraft(row, layer);
  if (same === undefined) {
    drafts.push(draft);
    byName.set(nameKey(name), draft);
  } else mergeRow(draft, row, layer);
  addNames(draft, row, name);
  for (const key of [nameKey(name), ...draft.synonyms.keys()]) if (!byName.has(key)) byName.set(key, draft);
  if (cas !== undefined) byCas.set(cas, draft);
}

function addNames(draft: Draft, row: PlacedRow, name: string): void {
  for (const role of listCell(row, "role")) draft.roles.add(role);
  const main = nameKey(draft.row.cells.name ?? "");
  for (const synonym of [...listCell(row, "synonyms"), name]) {
    const key = nameKey(synonym);
    if (key !== main) draft.synonyms.set(key, synonym);
  }
  const reference = textCell(row, "reference");
  if (reference !== undefined) draft.references.add(reference);
}

function validCas(row: PlacedRow, report: Report): string | undefined {
  const text = textCell(row, "cas");
  if (text === undefined) return undefined;
  const read = readRegistryNumber(text);
  if (read.ok) return read.cas;
  report(faultAt(row, "cas", "registry number", `"${text}": ${read.message}`));
  return undefined;
}

function sameByName(row: PlacedRow, name: string, cas: string | undefined, known: Known): Draft | undefined {
  const found = known.byName.get(nameKey(name));
  const otherCas = found === undefined ? undefined : textCell(found.row, "cas");
  if (found === undefined || cas === undefined || otherCas === undefined || otherCas === cas) return found;
  const message = `"${name}" (${cas}) is also a name of ${found.row.cells.name} (${otherCas})`;
  known.report(faultAt(row, "name", "duplicate name", message));
  return undefined;
}

function newDraft(row: PlacedRow, layer: number): Draft {
  return {
    row,
    layer,
    roles: new Set(),
    synonyms: new Map(),
    references: new Set(),
    forms: new Map(),
    properties: new Map(),
  };
}

function mergeRow(draft: Draft, row: PlacedRow, layer: number): void {
  const filled = Object.entries(row.cells).filter(([, cell]) => cell.trim() !== "");
  const cells: Record<string, string> = { ...draft.row.cells };
  const says = (column: string) => filled.some(([name]) => name === column);
  if (says("formula") && !says("molar_mass")) delete cells.molar_mass;
  if (says("molar_mass") && !says("formula")) delete cells.formula;
  if (says("density_kg_per_m3")) forgetLiquidDensities(draft);
  const name = draft.row.cells.name ?? "";
  draft.row = { ...row, cells: { ...cells, ...Object.fromEntries(filled), name } };
  draft.layer = layer;
}

function addForm(row: PlacedRow, { byName, report }: Known): void {
  const solute = textCell(row, "solute");
  const form = textCell(row, "form");
  if (solute === undefined || form === undefined) {
    report(faultAt(row, "form", "no name", "a solid form without a solute or without a name"));
    return;
  }
  const draft = byName.get(nameKey(solute));
  if (draft === undefined) report(faultAt(row, "solute", "unknown substance", `no substance is called "${solute}"`));
  else draft.forms.set(nameKey(form), row);
}

function addProperties(rows: readonly PlacedRow[], { byName, report }: Known): void {
  const restated = new Set<Draft>();
  for (const row of rows) {
    const name = textCell(row, "name");
    const property = textCell(row, "property");
    const draft = name === undefined ? undefined : byName.get(nameKey(name));
    if (property === undefined) {
      report(faultAt(row, "property", "no name", "a property without a name"));
    } else if (draft === undefined) {
      report(faultAt(row, "name", "unknown substance", `no substance is called "${name ?? ""}"`));
    } else {
      addProperty(draft, property, row, restated);
    }
  }
}

/** A layer that speaks of the density of a liquid replaces all that earlier layers said of it. */
function addProperty(draft: Draft, property: string, row: PlacedRow, restated: Set<Draft>): void {
  if (isLiquidDensity(property) && !restated.has(draft)) {
    restated.add(draft);
    forgetLiquidDensities(draft);
  }
  const temperature = property === "liquid_density" ? `@${textCell(row, "T_min_K") ?? ""}` : "";
  draft.properties.set(property + temperature, row);
}

const isLiquidDensity = (property: string): boolean => property.startsWith("liquid_density");

function forgetLiquidDensities({ properties }: Draft): void {
  for (const key of properties.keys()) if (isLiquidDensity(key)) properties.delete(key);
}
